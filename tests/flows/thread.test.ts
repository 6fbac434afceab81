import { createHash } from "node:crypto";
import { beforeEach, describe, expect, test } from "vitest";
import { db } from "~/db/client.server";
import { attachments, events, messages, newId, outbox } from "~/db/schema";
import { attachmentType } from "~/flows/attachment-type";
import { keepAttachment } from "~/flows/keep-attachment.server";
import { markThreadRead } from "~/flows/mark-read.server";
import { openAttachment } from "~/flows/open-attachment.server";
import { type PostMessageOptions, postMessage } from "~/flows/post-message.server";
import { createDraftOrder } from "~/models/draft-orders.server";
import { eventsAfter } from "~/models/events.server";
import { countUnread, listMessages, listUnreadOrders } from "~/models/messages.server";
import { done, refused } from "../support/chain";
import { resetDatabase } from "../support/database";
import { shelvesDxf } from "../support/drawings";
import { freshScene, makePerson, makeShop, type TestPerson } from "../support/scene";

const running = freshScene();
let builder: TestPerson;
let operator: TestPerson;
let orderId: string;

beforeEach(async () => {
  await resetDatabase();
  await makeShop();
  builder = await makePerson({ name: "Wren Halloran" });
  operator = await makePerson({ name: "Odile Marsh", roles: ["operator"] });
  orderId = (await createDraftOrder(db, { builderId: builder.id, name: "Galley" })).id;
});

const write = (actor: TestPerson, body: string, more: Partial<PostMessageOptions> = {}) =>
  postMessage({ actor, orderId, messageId: newId(), audience: "both", body, ...more });
const unreadOf = async (person: TestPerson, reader: "builder" | "staff") =>
  (await countUnread(db, { userId: person.id, reader, orderIds: [orderId] })).get(orderId) ?? 0;
const PNG = Buffer.from("89504e470d0a1a0a0000000d49484452", "hex");

describe("writing", () => {
  test("a message stands in the thread under its side, with what it points at", async () => {
    await done(
      write(builder, " Is 1.2 mm enough?\r\nThanks ", { partLabel: "C", spot: { x: 210.5, y: 30 } }),
    );
    await done(write(operator, "Yes."));
    const thread = await listMessages(db, { orderId, reader: "builder", limit: 10 });
    expect(thread).toMatchObject([
      {
        side: "builder",
        authorName: "Wren Halloran",
        body: "Is 1.2 mm enough?\nThanks",
        partLabel: "C",
        spotX: 210.5,
        spotY: 30,
      },
      { side: "shop", authorName: "Odile Marsh", body: "Yes.", partLabel: null, spotX: null },
    ]);
  });

  test("the same message sent twice is written, told and mailed once", async () => {
    const messageId = newId();
    await done(write(builder, "Once", { messageId }));
    await done(write(builder, "Once", { messageId }));
    expect(await db.select().from(messages)).toHaveLength(1);
    expect(await db.select().from(events)).toHaveLength(1);
    expect(await db.select().from(outbox)).toHaveLength(1);
  });

  test("somebody else's message id is not taken over", async () => {
    const messageId = newId();
    await done(write(builder, "Mine", { messageId }));
    expect(await refused(write(operator, "Yours", { messageId }))).toMatchObject({ reason: "invalid" });
    expect(await db.select().from(messages)).toMatchObject([{ body: "Mine" }]);
  });

  test("nothing, too much, and another builder's order are refused and leave nothing", async () => {
    const stranger = await makePerson();
    expect(await refused(write(builder, "  \n "))).toMatchObject({ reason: "incomplete" });
    const long = await refused(write(builder, "x".repeat(4_001)));
    expect(long).toMatchObject({ reason: "invalid", words: expect.stringContaining("4,001") });
    expect(await refused(write(stranger, "Hello"))).toMatchObject({ reason: "not-found" });
    const nobody = await makePerson({ roles: [] });
    expect(await refused(write(nobody, "Hello"))).toMatchObject({ reason: "not-allowed" });
    for (const table of [messages, events, outbox]) expect(await db.select().from(table)).toEqual([]);
    await done(write(builder, "x".repeat(4_000)));
  });
});

describe("notes for the staff", () => {
  test("never reach the builder: not in the thread, events, counts, mails or files", async () => {
    const { kept } = await done(keepAttachment({ fileName: "note.png", file: new Blob([PNG]) }));
    const clerk = await makePerson({ roles: ["clerk"] });
    await done(write(operator, "He pays late.", { audience: "staff", files: [kept] }));
    expect(await listMessages(db, { orderId, reader: "builder", limit: 10 })).toEqual([]);
    expect(await eventsAfter(db, orderId, 0, "builder")).toEqual([]);
    expect(await unreadOf(builder, "builder")).toBe(0);
    expect(
      await listUnreadOrders(db, { userId: builder.id, scope: { kind: "builder", userId: builder.id } }),
    ).toEqual([]);
    expect(await db.select().from(outbox)).toEqual([]);

    const [note] = await listMessages(db, { orderId, reader: "staff", limit: 10 });
    expect(note).toMatchObject({ audience: "staff", body: "He pays late." });
    expect(await eventsAfter(db, orderId, 0, "staff")).toMatchObject([{ kind: "message" }]);
    expect(await unreadOf(clerk, "staff")).toBe(1);
  });

  test("are the staff's to write, and nothing a builder could mark as read", async () => {
    expect(await refused(write(builder, "secret", { audience: "staff" }))).toMatchObject({
      reason: "not-allowed",
    });
    const { messageId } = await done(write(operator, "secret", { audience: "staff" }));
    expect(await refused(markThreadRead({ actor: builder, orderId, messageId }))).toMatchObject({
      reason: "not-found",
    });
  });
});

describe("unread", () => {
  test("counts what others wrote after what was read, each person for themselves", async () => {
    const second = await makePerson({ roles: ["operator", "owner"] });
    await done(write(builder, "one"));
    const { messageId } = await done(write(builder, "two"));
    await done(write(builder, "three", { now: new Date(Date.now() + 5) }));
    expect([
      await unreadOf(operator, "staff"),
      await unreadOf(second, "staff"),
      await unreadOf(builder, "builder"),
    ]).toEqual([3, 3, 0]);
    await done(markThreadRead({ actor: operator, orderId, messageId }));
    expect([await unreadOf(operator, "staff"), await unreadOf(second, "staff")]).toEqual([1, 3]);
    expect(await listUnreadOrders(db, { userId: operator.id, scope: { kind: "staff" } })).toEqual([orderId]);
  });

  test("reading an older message again takes nothing back", async () => {
    const now = Date.now();
    const first = await done(write(builder, "one", { now: new Date(now) }));
    const second = await done(write(builder, "two", { now: new Date(now + 10) }));
    await done(markThreadRead({ actor: operator, orderId, messageId: second.messageId }));
    await done(markThreadRead({ actor: operator, orderId, messageId: first.messageId }));
    expect(await unreadOf(operator, "staff")).toBe(0);
    expect(await listUnreadOrders(db, { userId: operator.id, scope: { kind: "staff" } })).toEqual([]);
  });

  test("somebody who came later is not told of what was written before", async () => {
    await done(write(builder, "long ago", { now: new Date(Date.now() - 60_000) }));
    const late = await makePerson({ roles: ["clerk"] });
    expect(await unreadOf(late, "staff")).toBe(0);
    await done(write(builder, "now", { now: new Date(Date.now() + 10) }));
    expect(await unreadOf(late, "staff")).toBe(1);
  });
});

describe("attachments", () => {
  test("are told by their bytes, never by their names", () => {
    const head = (text: string) => new TextEncoder().encode(text);
    const latin = (text: string) => Uint8Array.from(text, (sign) => sign.charCodeAt(0));
    // Openings as published: PNG (W3C) 5.2, JPEG (ITU-T T.81) SOI, GIF89a 17, WebP (RFC 9649) 2.1, PDF (ISO 32000-1) 7.5.2.
    expect(attachmentType(PNG)).toEqual({ ok: true, contentType: "image/png" });
    expect(attachmentType(latin("\xff\xd8\xff\xe0"))).toEqual({ ok: true, contentType: "image/jpeg" });
    expect(attachmentType(head("GIF89a..."))).toEqual({ ok: true, contentType: "image/gif" });
    expect(attachmentType(head("RIFF1234WEBPVP8 "))).toEqual({ ok: true, contentType: "image/webp" });
    expect(attachmentType(head("%PDF-1.7\n"))).toEqual({ ok: true, contentType: "application/pdf" });
    expect(attachmentType(shelvesDxf())).toEqual({ ok: true, contentType: "image/vnd.dxf" });
    for (const bad of [
      "",
      "<svg onload=alert(1)>",
      "<html>",
      "MZ",
      "PK\x03\x04",
      "#!/bin/sh",
      "RIFF1234WAVE",
    ])
      expect(attachmentType(head(bad)), bad).toMatchObject({ ok: false });
  });

  test("are kept by their hash and come back byte for byte, only in their own order", async () => {
    const bytes = shelvesDxf({ mark: 77 });
    const { kept } = await done(
      keepAttachment({ fileName: "C:\\plans\\shel\u0007f.dxf", file: new Blob([new Uint8Array(bytes)]) }),
    );
    expect(kept).toEqual({
      fileName: "shelf.dxf",
      contentType: "image/vnd.dxf",
      size: bytes.length,
      sha256: createHash("sha256").update(bytes).digest("hex"),
    });
    await done(write(builder, "", { files: [kept] }));
    const [row] = await db.select({ id: attachments.id }).from(attachments);
    const attachmentId = row?.id ?? "";
    const opened = await openAttachment({ orderId, attachmentId, reader: "builder" });
    const chunks: Buffer[] = [];
    for await (const chunk of opened?.body ?? []) chunks.push(chunk as Buffer);
    expect(opened).toMatchObject({ fileName: "shelf.dxf", contentType: "image/vnd.dxf", size: bytes.length });
    expect(Buffer.concat(chunks).equals(bytes)).toBe(true);
    const other = await createDraftOrder(db, { builderId: builder.id, name: "Other" });
    expect(await openAttachment({ orderId: other.id, attachmentId, reader: "builder" })).toBeUndefined();
  });

  test("of a staff note are not there for a builder", async () => {
    const { kept } = await done(keepAttachment({ fileName: "note.png", file: new Blob([PNG]) }));
    await done(write(operator, "", { audience: "staff", files: [kept] }));
    const [row] = await db.select({ id: attachments.id }).from(attachments);
    const attachmentId = row?.id ?? "";
    expect(await openAttachment({ orderId, attachmentId, reader: "builder" })).toBeUndefined();
    const opened = await openAttachment({ orderId, attachmentId, reader: "staff" });
    opened?.body.destroy();
    expect(opened).toMatchObject({ contentType: "image/png" });
  });

  test("that are something else are refused with what may be sent", async () => {
    const script = await refused(keepAttachment({ fileName: "photo.png", file: new Blob(["<script>"]) }));
    expect(script).toMatchObject({
      reason: "invalid",
      words: expect.stringMatching(/^photo\.png: Attach a picture/),
    });
    expect(
      await running.services.storage.exists(
        `attachments/${createHash("sha256").update("<script>").digest("hex")}`,
      ),
    ).toBe(false);
  });
});
