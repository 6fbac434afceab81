import { beforeEach, expect, test } from "vitest";
import { db, transact } from "~/db/client.server";
import { outbox } from "~/db/schema";
import { sendDueMails, sendNextMail } from "~/jobs/outbox.server";
import { leaseMails, queueMail } from "~/models/outbox.server";
import { resetDatabase } from "../support/database";
import { freshScene } from "../support/scene";

const running = freshScene();
beforeEach(async () => {
  await resetDatabase();
  running.fakes.mail.clear();
});

const mailTo = (recipient: string, more: { dedupeKey?: string } = {}) => ({
  recipient,
  template: "stage-received",
  subject: "Your order is here",
  text: "We have it.",
  html: "<p>We have it.</p>",
  ...more,
});
const minutesOn = (minutes: number) => () => new Date(Date.now() + minutes * 60_000);

test("a queued mail leaves once, with the outbox id in its Message-ID", async () => {
  const id = await queueMail(db, mailTo("ann@kerfpost.example"));
  expect(await sendDueMails()).toBe(1);
  expect(await sendDueMails()).toBe(0);
  const [mail, ...more] = running.fakes.mail.messages("ann@kerfpost.example");
  expect(more).toEqual([]);
  expect(mail).toMatchObject({ subject: "Your order is here", messageId: `<${id}@mail.kerfpost.invalid>` });
  expect(mail?.text.trim()).toBe("We have it.");
  expect(mail?.html).toContain("<p>We have it.</p>");
  expect(await db.select().from(outbox)).toMatchObject([{ status: "sent", attempts: 1, lastError: null }]);
});

test("a mail whose cause is rolled back is never sent", async () => {
  const cause = transact(async (tx) => {
    await queueMail(tx, mailTo("ann@kerfpost.example"));
    throw new Error("no such order after all");
  });
  await expect(cause).rejects.toThrow("after all");
  expect(await sendDueMails()).toBe(0);
});

test("the same cause writes one mail", async () => {
  expect(await queueMail(db, mailTo("ann@kerfpost.example", { dedupeKey: "received:1" }))).toBeDefined();
  expect(await queueMail(db, mailTo("ann@kerfpost.example", { dedupeKey: "received:1" }))).toBeUndefined();
  expect(await sendDueMails()).toBe(1);
});

test("a host in trouble is tried again later, with the same Message-ID", async () => {
  const id = await queueMail(db, mailTo("ann@kerfpost.example"));
  running.fakes.mail.failNext(2);
  expect(await sendDueMails()).toBe(1);
  expect(await db.select().from(outbox)).toMatchObject([
    { status: "pending", attempts: 1, lastError: expect.stringContaining("451") },
  ]);
  expect(await sendDueMails()).toBe(0);
  expect(await sendDueMails(minutesOn(1))).toBe(1);
  expect(await sendDueMails(minutesOn(1.2))).toBe(0);
  expect(await sendDueMails(minutesOn(10))).toBe(1);
  const mails = running.fakes.mail.messages("ann@kerfpost.example");
  expect(mails.map(({ messageId }) => messageId)).toEqual([`<${id}@mail.kerfpost.invalid>`]);
  expect(await db.select().from(outbox)).toMatchObject([{ status: "sent", attempts: 3 }]);
});

test("an address that is refused for good bounces and is not tried again", async () => {
  await queueMail(db, mailTo("bounce-ann@kerfpost.example"));
  await queueMail(db, mailTo("ben@kerfpost.example"));
  expect(await sendDueMails()).toBe(2);
  expect(await sendDueMails(minutesOn(1_000))).toBe(0);
  const rows = await db.select().from(outbox);
  expect(rows.find(({ recipient }) => recipient.startsWith("bounce"))).toMatchObject({
    status: "bounced",
    lastError: expect.stringContaining("no such mailbox"),
  });
  expect(running.fakes.mail.messages("ben@kerfpost.example")).toHaveLength(1);
});

test("many runners share the outbox without sending twice, and a lease that ran out is taken over", async () => {
  for (let n = 0; n < 12; n++) await queueMail(db, mailTo(`person-${n}@kerfpost.example`));
  await Promise.all(Array.from({ length: 4 }, () => sendDueMails()));
  expect(running.fakes.mail.messages()).toHaveLength(12);

  await queueMail(db, mailTo("late@kerfpost.example"));
  await leaseMails(db, { now: new Date(), leaseMs: 60_000, limit: 1 });
  expect(await sendNextMail()).toBe(false);
  expect(await sendNextMail(minutesOn(2))).toBe(true);
  expect(running.fakes.mail.messages("late@kerfpost.example")).toHaveLength(1);
});
