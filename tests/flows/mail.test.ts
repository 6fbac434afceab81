import { eq } from "drizzle-orm";
import { beforeEach, describe, expect, test } from "vitest";
import { readUnsubscribeToken, unsubscribeToken } from "~/auth/unsubscribe-token.server";
import { db } from "~/db/client.server";
import { auditEntries, newId, outbox } from "~/db/schema";
import { GATHER_MS } from "~/flows/mail-message.server";
import { markThreadRead } from "~/flows/mark-read.server";
import { postMessage } from "~/flows/post-message.server";
import { remakePiece } from "~/flows/remake-piece.server";
import { resendMail } from "~/flows/resend-mail.server";
import { setMailChoices, turnOffMail } from "~/flows/set-mail-choices.server";
import { sendDueMails } from "~/jobs/outbox.server";
import { createDraftOrder } from "~/models/draft-orders.server";
import {
  countMails,
  countTroubledMails,
  listMails,
  listTroubledMails,
  queueMail,
} from "~/models/outbox.server";
import { findAddressee } from "~/models/people.server";
import { listPieces } from "~/models/pieces.server";
import { asked, done, makeReceived, nest, refused } from "../support/chain";
import { resetDatabase } from "../support/database";
import { freshScene, makePerson, makeShop, type TestPerson, type TestShop } from "../support/scene";
import { receiveWebhooks } from "../support/webhook-receiver";

const running = freshScene();
const receiver = receiveWebhooks();
let shop: TestShop;
let builder: TestPerson;
let operator: TestPerson;
let owner: TestPerson;
let orderId: string;
let reference: string;

beforeEach(async () => {
  await resetDatabase();
  running.fakes.mail.clear();
  shop = await makeShop();
  builder = await makePerson({ name: "Wren Halloran" });
  operator = await makePerson({ name: "Odile Marsh", roles: ["operator"] });
  owner = await makePerson({ name: "Ada Ferrier", roles: ["owner", "operator"] });
  const order = await createDraftOrder(db, { builderId: builder.id, name: "Galley <port> & co" });
  orderId = order.id;
  reference = order.reference;
});

const START = new Date("2026-12-01T18:00:00Z").getTime();
const at = (minutes: number) => new Date(START + minutes * 60_000);
const write = (actor: TestPerson, body: string, minutes: number) =>
  done(postMessage({ actor, orderId, messageId: newId(), audience: "both", body, now: at(minutes) }));
const sendAt = (minutes: number) => sendDueMails(() => at(minutes));
const inboxOf = (person: TestPerson) => running.fakes.mail.messages(person.email);

describe("mails of messages", () => {
  test("go to the other side: the shop's answer to the builder, the builder's question to operators and owners", async () => {
    const clerk = await makePerson({ roles: ["clerk"] });
    const neighbour = await makePerson();
    await write(builder, "Is it thick enough?", 0);
    expect(await sendAt(0)).toBe(2);
    expect([operator, owner, clerk, builder, neighbour].map((person) => inboxOf(person).length)).toEqual([
      1, 1, 0, 0, 0,
    ]);
    await write(operator, "It is.", 1);
    await sendAt(1);
    expect([operator, owner, clerk, builder, neighbour].map((person) => inboxOf(person).length)).toEqual([
      1, 1, 0, 1, 0,
    ]);
    const [question] = inboxOf(owner);
    const [answer] = inboxOf(builder);
    expect(question?.subject).toBe(`Wren Halloran wrote on ${reference}`);
    expect(question?.text).toContain(`/shop/orders/${orderId}#thread`);
    expect(answer?.text).toContain(`/orders/${orderId}#thread`);
    expect(answer?.text).not.toContain("/shop/");
  });

  test("are one in five minutes: what comes meanwhile waits in one mail that has it all", async () => {
    await write(operator, "First", 0);
    await sendAt(0);
    await write(operator, "Second", 1);
    await write(owner, "Third", 2);
    expect(await sendAt(4.9)).toBe(0);
    expect(await db.select().from(outbox)).toHaveLength(2);
    expect(await sendAt(GATHER_MS / 60_000)).toBe(1);
    const [first, gathered, ...more] = inboxOf(builder);
    expect(more).toEqual([]);
    expect(first?.text).toContain("> First");
    expect(gathered?.subject).toBe(`2 messages on ${reference} from Odile Marsh and Ada Ferrier`);
    for (const part of [gathered?.text, gathered?.html]) {
      expect(part).toContain("Second");
      expect(part).toContain("Third");
      expect(part).not.toContain("First");
    }
    await write(operator, "Fourth", 20);
    expect(await sendAt(20)).toBe(1);
    expect(inboxOf(builder).at(-1)?.text).not.toContain("Third");
  });

  test("written before the first has left they are one mail", async () => {
    await write(operator, "First", 0);
    await write(operator, "Second", 0.01);
    expect(await sendAt(0.02)).toBe(1);
    expect(inboxOf(builder)[0]?.text).toMatch(/> First[\s\S]*> Second/);
  });

  test("of more than twenty messages have the newest, and say that there are others", async () => {
    await write(operator, "First", 0);
    await sendAt(0);
    for (let n = 1; n <= 22; n++) await write(operator, `number ${n}.`, 1 + n / 60);
    await sendAt(6);
    const mail = inboxOf(builder).at(-1);
    expect(mail?.subject).toBe(`More than 20 messages on ${reference} from Odile Marsh`);
    for (const part of [mail?.text, mail?.html]) {
      expect(part).toContain("the earlier ones stand there");
      expect(part).toContain("number 3.");
      expect(part).toContain("number 22.");
      expect(part).not.toContain("number 2.");
    }
  });

  test("what is read meanwhile is not mailed, and the next message is mailed at once", async () => {
    await write(operator, "First", 0);
    await sendAt(0);
    const { messageId } = await write(operator, "Second", 1);
    await done(markThreadRead({ actor: builder, orderId, messageId, now: at(2) }));
    expect(await sendAt(30)).toBe(0);
    await write(operator, "Third", 3);
    expect(await sendAt(3)).toBe(1);
    expect(inboxOf(builder).map(({ text }) => /> (\w+)/.exec(text)?.[1])).toEqual(["First", "Third"]);
  });

  test("are not written to who has turned them off; the others get theirs", async () => {
    await done(turnOffMail({ userId: operator.id, kind: "message" }));
    await write(builder, "Anybody?", 0);
    await sendAt(0);
    expect([inboxOf(operator).length, inboxOf(owner).length]).toEqual([0, 1]);
  });

  test("an owner who orders as a builder is not mailed what they wrote themselves", async () => {
    const both = await makePerson({ roles: ["owner", "builder"] });
    const own = await createDraftOrder(db, { builderId: both.id, name: "Own" });
    await done(
      postMessage({
        actor: both,
        orderId: own.id,
        messageId: newId(),
        audience: "both",
        body: "Hello",
        now: at(0),
      }),
    );
    await sendAt(0);
    expect(inboxOf(both)).toEqual([]);
    expect(inboxOf(owner)).toHaveLength(1);
  });
});

describe("turning mails off", () => {
  test("a mail that may be turned off offers it in its headers and its words; the link turns off that kind alone", async () => {
    await write(operator, "Hello", 0);
    await sendAt(0);
    const [mail] = inboxOf(builder);
    const [, url = ""] = /^<(.+)>$/.exec(mail?.headers["list-unsubscribe"] ?? "") ?? [];
    // RFC 8058, 3.1: the header's value is exactly this.
    expect(mail?.headers["list-unsubscribe-post"]).toBe("List-Unsubscribe=One-Click");
    expect(mail?.headers["auto-submitted"]).toBe("auto-generated");
    for (const part of [mail?.text, mail?.html]) {
      expect(part).toContain("Turn off mails about messages");
      expect(part).toContain(url);
    }
    const asked = readUnsubscribeToken(new URL(url).searchParams.get("token") ?? "");
    expect(asked).toEqual({ userId: builder.id, kind: "message" });
    await done(turnOffMail(asked ?? { userId: "", kind: "message" }));
    await done(turnOffMail({ userId: builder.id, kind: "message" }));
    expect((await findAddressee(db, builder.id))?.mutedMails).toEqual(["message"]);
  });

  test("a link that was not signed here, or for another kind or person, is none", () => {
    const token = unsubscribeToken({ userId: "ann", kind: "quote" });
    expect(readUnsubscribeToken(token)).toEqual({ userId: "ann", kind: "quote" });
    for (const bad of [
      "",
      token.slice(0, -1),
      `${token.slice(0, -1)}${token.endsWith("A") ? "B" : "A"}`,
      token.replace("ann", "ben"),
      token.replace("quote", "stage"),
      token.replace("quote", "receipt"),
    ])
      expect(readUnsubscribeToken(bad), bad).toBeNull();
  });

  test("the account's choice replaces what was chosen before", async () => {
    await done(setMailChoices({ userId: builder.id, wanted: ["stage"] }));
    expect((await findAddressee(db, builder.id))?.mutedMails).toEqual(["quote", "message"]);
    await done(setMailChoices({ userId: builder.id, wanted: ["stage", "quote", "message"] }));
    expect((await findAddressee(db, builder.id))?.mutedMails).toEqual([]);
  });
});

describe("a shortage", () => {
  test("is mailed to the builder once, whatever they turned off, and with nothing to turn off", async () => {
    await done(setMailChoices({ userId: builder.id, wanted: [] }));
    running.fakes.payments.pointWebhooksAt(receiver.url);
    const order = await makeReceived({ builder, operator }, shop, running.fakes.payments);
    await done(nest(operator, shop, [order.id]));
    await sendDueMails();
    running.fakes.mail.clear();
    const [piece] = await listPieces(db, order.id);
    const options = {
      ...(await asked(operator, order.id)),
      pieceId: piece?.id ?? "",
      state: "spoiled",
      reason: "a <knot> & a tear",
      payer: "shop",
    } as const;
    await done(remakePiece(options));
    await done(remakePiece(options));
    await sendDueMails();
    const [mail, ...more] = inboxOf(builder);
    expect(more).toEqual([]);
    expect(mail?.subject).toBe(`${order.reference}: part ${piece?.part.label} is made again`);
    expect(mail?.headers["list-unsubscribe"]).toBeUndefined();
    expect(mail?.text).toContain("a <knot> & a tear");
    expect(mail?.html).toContain("a &lt;knot&gt; &amp; a tear");
    for (const part of [mail?.text, mail?.html]) {
      expect(part).toContain("spoiled");
      expect(part).toContain(`${piece?.number} of ${piece?.of}`);
      expect(part).toContain("at its own cost");
      expect(part).not.toContain("Turn off");
    }
  });
});

describe("the outbox page", () => {
  const mailTo = (
    recipient: string,
    subject: string,
    more: { template?: string; orderId?: string; now?: Date } = {},
  ) =>
    queueMail(db, { recipient, template: "receipt", subject, text: "Words", html: "<p>Words</p>", ...more });

  test("a bounced mail stands on its order and with the owner until it was sent again", async () => {
    const mailId = (await mailTo("bounce-wren@kerfpost.example", "Receipt", { orderId })) ?? "";
    await sendDueMails();
    expect(await countTroubledMails(db, new Date(0))).toBe(1);
    expect(await countTroubledMails(db, new Date(Date.now() + 1_000))).toBe(0);
    expect(await listTroubledMails(db, orderId)).toMatchObject([
      {
        id: mailId,
        subject: "Receipt",
        status: "bounced",
        lastError: expect.stringContaining("no such mailbox"),
      },
    ]);
    expect(await listTroubledMails(db, orderId, builder.email)).toEqual([]);
    expect(await listTroubledMails(db, orderId, "bounce-wren@kerfpost.example")).toHaveLength(1);

    const again = { actor: owner, mailId, requestId: "press-1" };
    const { mailId: newMail } = await done(resendMail(again));
    expect((await done(resendMail(again))).mailId).toBeNull();
    expect(await db.select().from(outbox).where(eq(outbox.resendOf, mailId))).toMatchObject([
      {
        id: newMail,
        status: "pending",
        recipient: "bounce-wren@kerfpost.example",
        orderId,
        payload: { subject: "Receipt", text: "Words", html: "<p>Words</p>" },
      },
    ]);
    expect(await countTroubledMails(db, new Date(0))).toBe(0);
    expect(await db.select().from(auditEntries)).toMatchObject([
      { actorId: owner.id, act: "mail.resend", subjectId: mailId },
    ]);
    await sendDueMails();
    expect((await listTroubledMails(db, orderId)).map(({ id }) => id)).toContain(newMail);
  });

  test("only the owner sends again, and not what is on its way nor a link that lets somebody in", async () => {
    const pending = (await mailTo("ann@kerfpost.example", "Waiting")) ?? "";
    const press = (actor: TestPerson, mailId: string) => resendMail({ actor, mailId, requestId: newId() });
    expect(await refused(press(operator, pending))).toMatchObject({ reason: "not-allowed" });
    expect(await refused(press(owner, pending))).toMatchObject({ reason: "wrong-stage" });
    expect(await refused(press(owner, "no-such-mail"))).toMatchObject({ reason: "not-found" });
    const reset =
      (await mailTo("ann@kerfpost.example", "Choose a new password", { template: "reset" })) ?? "";
    await sendDueMails();
    expect(await refused(press(owner, reset))).toMatchObject({ reason: "not-allowed" });
    await done(press(owner, pending));
  });

  test("lists by status, kind, address, subject and order, in pages, newest first", async () => {
    for (let n = 0; n < 7; n++) await mailTo(`person-${n}@kerfpost.example`, `Receipt ${n}`, { now: at(n) });
    await mailTo("bounce@kerfpost.example", "100 % of_it", { template: "stage", orderId, now: at(9) });
    await sendDueMails(() => at(10));
    const subjects = async (filter: Parameters<typeof listMails>[1], page = 1, size = 3) => {
      const { mails, total } = await listMails(db, filter, { page, size });
      return [total, ...mails.map(({ subject }) => subject)];
    };
    expect(await subjects({})).toEqual([8, "100 % of_it", "Receipt 6", "Receipt 5"]);
    expect(await subjects({}, 3)).toEqual([8, "Receipt 1", "Receipt 0"]);
    expect(await subjects({ status: "bounced" })).toEqual([1, "100 % of_it"]);
    expect(await subjects({ template: "stage" })).toEqual([1, "100 % of_it"]);
    expect(await subjects({ text: "person-4@" })).toEqual([1, "Receipt 4"]);
    expect(await subjects({ text: reference })).toEqual([1, "100 % of_it"]);
    expect(await subjects({ text: "0 % of_" })).toEqual([1, "100 % of_it"]);
    expect(await subjects({ text: "_%" })).toEqual([0]);
    expect(await countMails(db)).toEqual({ pending: 0, sent: 7, failed: 0, bounced: 1 });
  });
});
