import { beforeEach, describe, expect, test } from "vitest";
import { db } from "~/db/client.server";
import {
  auditEntries,
  machines,
  nestSheets,
  nests,
  priceBookVersions,
  quotes,
  runs,
  tools,
} from "~/db/schema";
import { draftPriceBook, dropPriceBookDraft, savePriceBookDraft } from "~/flows/draft-price-book.server";
import { priceBookStamp } from "~/flows/price-book-stamp.server";
import { publishPriceBook } from "~/flows/publish-price-book.server";
import { retire } from "~/flows/retire.server";
import { saveMachine } from "~/flows/save-machine.server";
import { saveSettings } from "~/flows/save-settings.server";
import { saveTool } from "~/flows/save-tool.server";
import { tryPriceBook } from "~/flows/try-price-book.server";
import { pageOfAudit } from "~/models/audit-list.server";
import { findDraftPriceBook } from "~/models/price-books.server";
import { findSettings } from "~/models/settings.server";
import { done, makeQuoted, refused } from "../support/chain";
import { resetDatabase } from "../support/database";
import { freshScene, makePerson, makeShop, PRICE_BOOK, SETTINGS } from "../support/scene";

freshScene();
beforeEach(resetDatabase);

const owner = () => makePerson({ roles: ["owner"] });
const acts = async () => (await db.select().from(auditEntries)).map(({ act }) => act);

async function draftOf() {
  const draft = await findDraftPriceBook(db);
  if (!draft) throw new Error("There is no draft.");
  return { draft, stamp: priceBookStamp(draft) };
}

describe("the price book", () => {
  test("a draft is a copy, one at a time, and is not in force", async () => {
    await makeShop();
    const actor = await owner();
    await done(draftPriceBook({ actor }));
    await done(draftPriceBook({ actor }));
    const versions = await db.select().from(priceBookVersions);
    expect(versions.map(({ number, status }) => [number, status])).toEqual([
      [1, "published"],
      [2, "draft"],
    ]);
    expect(versions[1]?.content).toEqual(PRICE_BOOK);
    expect(await acts()).toEqual(["price-book.draft"]);
  });

  test("tried on quotes, published, and the quotes keep theirs", async () => {
    const shop = await makeShop();
    const actor = await owner();
    const builder = await makePerson();
    const order = await makeQuoted(builder, shop);
    await done(draftPriceBook({ actor }));
    const content = { ...PRICE_BOOK, setUp: PRICE_BOOK.setUp + 500 };
    await done(
      savePriceBookDraft({ actor, stamp: (await draftOf()).stamp, content, note: "Set-up is dearer." }),
    );
    const [tried, ...others] = await tryPriceBook((await draftOf()).draft.content);
    expect(others).toEqual([]);
    expect(tried?.quote.reference).toBe(order.reference);
    /* $5.00 of set-up and its tax of 8.5 % (WA in the scene's settings): 500 and 42.5, within a cent of rounding. */
    if (!tried?.repriced.ok) throw new Error("It was not priced.");
    const { was, now, differences } = tried.repriced;
    expect(differences.map(({ kind, difference }) => [kind, difference])).toEqual([
      ["set-up", 500],
      ["tax", now - was - 500],
    ]);
    expect(Math.abs(now - was - 542.5)).toBeLessThanOrEqual(0.5);
    await done(publishPriceBook({ actor, stamp: (await draftOf()).stamp }));
    const versions = await db.select().from(priceBookVersions);
    expect(versions.map(({ number, status }) => [number, status])).toEqual([
      [1, "superseded"],
      [2, "published"],
    ]);
    const [kept] = await db.select().from(quotes);
    expect(kept).toMatchObject({ priceBookVersionId: shop.priceBook.id, total: was });
    const next = await makeQuoted(builder, shop);
    const made = (await db.select().from(quotes)).find(({ orderId }) => orderId === next.id);
    expect(made).toMatchObject({ priceBookVersionId: versions[1]?.id, total: now });
    const published = (await db.select().from(auditEntries)).at(-1);
    expect(published).toMatchObject({
      act: "price-book.publish",
      detail: { number: 2, instead: 1, changes: { setUp: { before: 3_500, after: 4_000 } } },
    });
  });

  test("what was changed meanwhile is neither saved over, thrown away nor published", async () => {
    await makeShop();
    const actor = await owner();
    await done(draftPriceBook({ actor }));
    const { stamp } = await draftOf();
    await done(savePriceBookDraft({ actor, stamp, content: { ...PRICE_BOOK, setUp: 1 }, note: null }));
    const other = { ...PRICE_BOOK, setUp: 2 };
    expect((await refused(savePriceBookDraft({ actor, stamp, content: other, note: null }))).reason).toBe(
      "changed",
    );
    expect((await refused(publishPriceBook({ actor, stamp }))).reason).toBe("changed");
    expect((await refused(dropPriceBookDraft({ actor, stamp }))).reason).toBe("changed");
    await done(dropPriceBookDraft({ actor, stamp: (await draftOf()).stamp }));
    expect(await db.select().from(priceBookVersions)).toHaveLength(1);
  });

  test("prices are the owner's", async () => {
    await makeShop();
    const actor = await makePerson({ roles: ["operator", "clerk", "builder"] });
    const refusals = [
      await refused(draftPriceBook({ actor })),
      await refused(savePriceBookDraft({ actor, stamp: "", content: PRICE_BOOK, note: null })),
      await refused(publishPriceBook({ actor, stamp: "" })),
      await refused(saveSettings({ actor, version: 1, content: SETTINGS })),
    ];
    expect(refusals.map(({ reason }) => reason)).toEqual(Array(4).fill("not-allowed"));
  });
});

test("settings are saved once for the version read, with what was before", async () => {
  await makeShop();
  const actor = await owner();
  const content = { ...SETTINGS, quote: { validDays: 21 } };
  await done(saveSettings({ actor, version: 1, content }));
  expect(await findSettings(db)).toMatchObject({ version: 2, content: { quote: { validDays: 21 } } });
  expect((await db.select().from(auditEntries))[0]).toMatchObject({
    act: "settings.change",
    detail: { changes: { "quote.validDays": { before: 14, after: 21 } } },
  });
  const late = await refused(saveSettings({ actor, version: 1, content: SETTINGS }));
  expect(late.reason).toBe("changed");
  expect(await findSettings(db)).toMatchObject({ version: 2, content: { quote: { validDays: 21 } } });
});

describe("tools and machines", () => {
  const TOOL = {
    number: 1,
    name: "9.5 mm compression",
    kind: "compression",
    nominalDiameter: 9.525,
    measuredDiameter: 9.46,
    measuredAt: new Date("2026-12-01T20:00:00Z"),
    flutes: 2,
    feed: 10_000,
    plunge: 3_000,
    rpm: 18_000,
    maxPassDepth: 9.5,
  } as const;

  test("a tool measured anew says what it was", async () => {
    const actor = await owner();
    await done(saveTool({ actor, tool: null, fields: TOOL }));
    expect((await refused(saveTool({ actor, tool: null, fields: TOOL }))).words).toContain("T1 is");
    const [tool] = await db.select().from(tools);
    const id = tool?.id ?? "";
    await done(saveTool({ actor, tool: { id, version: 1 }, fields: { ...TOOL, measuredDiameter: 9.41 } }));
    expect((await db.select().from(auditEntries)).at(-1)).toMatchObject({
      act: "tool.change",
      detail: { changes: { measuredDiameter: { before: 9.46, after: 9.41 } } },
    });
    const stale = saveTool({ actor, tool: { id, version: 1 }, fields: TOOL });
    expect((await refused(stale)).reason).toBe("changed");
  });

  test("a machine with sheets on its days is not retired", async () => {
    const { machine, material } = await makeShop();
    const actor = await owner();
    const { id, active: _active, version, calibration: _calibration, ...fields } = machine;
    const calendar = { shifts: [{ weekday: 6, from: "08:00", to: "12:00" }], closed: ["2026-12-24"] };
    await done(saveMachine({ actor, machine: { id, version }, fields: { ...fields, calendar } }));
    expect((await db.select().from(machines))[0]).toMatchObject({ calendar, version: 2 });
    const [nest] = await db
      .insert(nests)
      .values({ number: 1, materialId: material.id, status: "locked", spacing: 12, margin: 10, seed: 1 })
      .returning();
    const [sheet] = await db
      .insert(nestSheets)
      .values({
        nestId: nest?.id ?? "",
        number: 1,
        length: 2440,
        width: 1220,
        yield: 0.5,
        estimatedMinutes: 20,
      })
      .returning();
    await db.insert(runs).values({
      sheetId: sheet?.id ?? "",
      machineId: id,
      day: "2026-12-05",
      sequence: 1,
      plannedMinutes: 20,
    });
    const away = { actor, kind: "machine", id, version: 2, active: false } as const;
    expect((await refused(retire(away))).words).toContain("has a sheet on its days");
    await db.update(runs).set({ finishedAt: new Date(), actualMinutes: 22 });
    await done(retire(away));
    expect((await db.select().from(machines))[0]?.active).toBe(false);
  });
});

test("the audit shows moves and acts together, by person, act, order and day", async () => {
  const shop = await makeShop();
  const actor = await owner();
  const builder = await makePerson();
  const order = await makeQuoted(builder, shop);
  await done(draftPriceBook({ actor }));
  const all = await pageOfAudit(db, { page: 1, size: 50 });
  expect(all.rows.map(({ act, actorId }) => [act, actorId]).toSorted()).toEqual(
    expect.arrayContaining([
      ["order.quote", builder.id],
      ["price-book.draft", actor.id],
    ]),
  );
  expect(all.found).toBe(all.rows.length);
  const quoted = all.rows.find(({ act }) => act === "order.quote");
  expect(quoted).toMatchObject({
    reference: order.reference,
    actor: builder.name,
    role: "builder",
    detail: { from: "draft", to: "quoted" },
  });
  const shown = async (search: object) =>
    (await pageOfAudit(db, { page: 1, size: 50, ...search })).rows.map(({ act }) => act);
  expect(await shown({ actor: actor.id })).toEqual(["price-book.draft"]);
  expect(await shown({ act: "price-book.draft" })).toEqual(["price-book.draft"]);
  expect(await shown({ reference: order.reference })).not.toContain("price-book.draft");
  expect(await shown({ before: new Date("2020-01-01") })).toEqual([]);
  expect(await shown({ from: new Date("2020-01-01") })).toHaveLength(all.found);
  const second = await pageOfAudit(db, { page: 2, size: 1 });
  expect(second.rows.map(({ id }) => id)).toEqual([all.rows[1]?.id]);
});
