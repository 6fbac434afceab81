import { mkdtemp, rm } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { describe, expect, it } from "vitest";
import { createMail } from "~/services/mail.server";
import { type CaughtMail, startMail } from "~fakes/mail";
import { fakesForTests, takeUnexpected } from "../../support/fakes";

const running = fakesForTests();

const letter = {
  to: "Ines@Kiosk.example",
  subject: "Your parts are cut – 3 sheets",
  text: "Follow the order: http://127.0.0.1:4800/orders/abc\nSchöne Grüße",
  html: '<p>Follow <a href="http://127.0.0.1:4800/orders/abc">the order</a>.</p>',
};

describe("mail", () => {
  it("is caught with both parts, headers, id and attachment as sent", async () => {
    const sent = await running.services.mail.send({
      ...letter,
      messageId: "<outbox-1@alder-ferry.example>",
      replyTo: "shop@alder-ferry.example",
      headers: { "X-Kerfpost-Order": "K-1001" },
      attachments: [
        { filename: "slip.pdf", contentType: "application/pdf", content: Buffer.from("%PDF-1.7 x") },
      ],
    });
    expect(sent).toEqual({ ok: true, messageId: "<outbox-1@alder-ferry.example>" });
    const caught = await running.fakes.mail.waitFor("ines@kiosk.example");
    expect(caught).toMatchObject({
      from: "orders@alder-ferry.example",
      to: ["ines@kiosk.example"],
      subject: letter.subject,
      messageId: "<outbox-1@alder-ferry.example>",
    });
    expect(caught.sender).toContain("Alder Ferry Panelworks");
    expect(caught.text.trim()).toBe(letter.text);
    expect(caught.html).toContain(letter.html);
    expect(caught.headers).toMatchObject({
      "x-kerfpost-order": "K-1001",
      "reply-to": "shop@alder-ferry.example",
    });
    expect(caught.attachments).toEqual([
      {
        filename: "slip.pdf",
        contentType: "application/pdf",
        content: Buffer.from("%PDF-1.7 x").toString("base64"),
      },
    ]);
  });

  it("is listed by recipient, read and cleared over HTTP", async () => {
    const { mail } = running.fakes;
    await running.services.mail.send({ ...letter, to: "one@example.com", subject: "First" });
    await running.services.mail.send({ ...letter, to: "two@example.com", subject: "<b>Second</b>" });
    const found = (await (await fetch(`${mail.url}/api/messages?to=two@example.com`)).json()) as CaughtMail[];
    expect(found.map(({ subject }) => subject)).toEqual(["<b>Second</b>"]);
    const list = await (await fetch(mail.url)).text();
    expect(list).toContain("First");
    expect(list).toContain("&lt;b&gt;Second&lt;/b&gt;");
    const single = await (await fetch(`${mail.url}/messages/${found[0]?.id}`)).text();
    expect(single).toContain(
      '<a href="http://127.0.0.1:4800/orders/abc">http://127.0.0.1:4800/orders/abc</a>',
    );
    const html = await (await fetch(`${mail.url}/messages/${found[0]?.id}/html`)).text();
    expect(html).toContain(letter.html);
    expect((await fetch(`${mail.url}/api/messages`, { method: "DELETE" })).status).toBe(204);
    expect(mail.messages()).toEqual([]);
  });

  it("tells a refused mailbox from one that is only busy", async () => {
    expect(await running.services.mail.send({ ...letter, to: "bounce.ines@kiosk.example" })).toMatchObject({
      ok: false,
      reason: "permanent",
      code: 550,
    });
    expect(await running.services.mail.send({ ...letter, to: "later@kiosk.example" })).toMatchObject({
      ok: false,
      reason: "passing",
      code: 451,
    });
    expect(running.fakes.mail.messages("bounce.ines@kiosk.example")).toEqual([]);
  });

  it("goes through once a host in trouble has recovered", async () => {
    running.fakes.mail.failNext(1);
    const again = { ...letter, to: "again@example.com", messageId: "<again@alder-ferry.example>" };
    expect(await running.services.mail.send(again)).toMatchObject({
      ok: false,
      reason: "passing",
      code: 451,
    });
    expect(await running.services.mail.send(again)).toMatchObject({ ok: true });
    expect(running.fakes.mail.messages("again@example.com")).toHaveLength(1);
  });

  it("calls a host that does not answer a passing failure, and no address a lasting one", async () => {
    const nobody = createMail({ smtpUrl: "smtp://127.0.0.1:9", from: "orders@alder-ferry.example" });
    expect(await nobody.send(letter)).toMatchObject({ ok: false, reason: "passing", code: undefined });
    nobody.close();
    expect(await running.services.mail.send({ ...letter, to: "" })).toMatchObject({
      ok: false,
      reason: "permanent",
    });
  });

  it("keeps a header to one line, whatever a subject holds", async () => {
    await running.services.mail.send({
      ...letter,
      to: "crlf@example.com",
      subject: "Hello\r\nBcc: thief@example.com",
    });
    const caught = await running.fakes.mail.waitFor("crlf@example.com");
    expect(caught.to).toEqual(["crlf@example.com"]);
    expect(caught.headers.bcc).toBeUndefined();
  });

  it("outlives a restart with a data directory", async () => {
    const dataDirectory = await mkdtemp(join(tmpdir(), "mail-"));
    const first = await startMail({ port: 0, inboxPort: 0, dataDirectory });
    const client = createMail({ smtpUrl: first.smtpUrl, from: "orders@alder-ferry.example" });
    await client.send(letter);
    client.close();
    await first.stop();
    const second = await startMail({ port: 0, inboxPort: 0, dataDirectory });
    expect(second.messages("ines@kiosk.example").map(({ subject }) => subject)).toEqual([letter.subject]);
    await second.stop();
    await rm(dataDirectory, { recursive: true });
  });

  it("fails loudly at requests the inbox does not know", async () => {
    const answer = await fetch(`${running.fakes.mail.url}/api/folders`);
    expect(answer.status).toBe(501);
    expect(await answer.text()).toContain("does not know GET /api/folders");
    expect(takeUnexpected(running.fakes)).toHaveLength(1);
  });
});
