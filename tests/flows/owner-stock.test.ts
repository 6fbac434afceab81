import { eq } from "drizzle-orm";
import { beforeEach, describe, expect, test } from "vitest";
import { db } from "~/db/client.server";
import { auditEntries, lotReadings, lots, materials } from "~/db/schema";
import { READING_POINTS } from "~/domain/fit";
import { addLot } from "~/flows/add-lot.server";
import { changeLot } from "~/flows/change-lot.server";
import { readThickness } from "~/flows/read-thickness.server";
import { retire } from "~/flows/retire.server";
import { saveMaterial } from "~/flows/save-material.server";
import { done, refused } from "../support/chain";
import { freshDatabase, resetDatabase } from "../support/database";
import { makePerson, makeShop } from "../support/scene";

freshDatabase();
beforeEach(resetDatabase);

const FIELDS = {
  code: "BB-12",
  name: "12 mm birch",
  kind: "birch-plywood",
  nominalThickness: 12,
  sheetLength: 2440,
  sheetWidth: 1220,
  hasGrain: true,
  density: 690,
  sheetPrice: 6_150,
} as const;
const LOT = { code: "BB-18/9", supplierLot: "K-1", supplierDocument: null, sheetsOnHand: 12 };
const readings = (values: readonly number[], sheet = 1) =>
  values.map((thickness, at) => ({ sheet, position: READING_POINTS[at], thickness }));
const EIGHT = [17.9, 17.8, 17.95, 17.85, 17.9, 18, 17.92, 17.88];

const entries = async () =>
  (await db.select().from(auditEntries)).map(({ act, actorId, detail }) => ({ act, actorId, detail }));

describe("materials", () => {
  test("an operator adds one; its code is its own", async () => {
    const { material } = await makeShop();
    const operator = await makePerson({ roles: ["operator"] });
    const { materialId } = await done(saveMaterial({ actor: operator, material: null, fields: FIELDS }));
    expect(await db.select().from(materials).where(eq(materials.id, materialId))).toMatchObject([
      { ...FIELDS, active: true, version: 1 },
    ]);
    const twin = await refused(
      saveMaterial({ actor: operator, material: null, fields: { ...FIELDS, code: material.code } }),
    );
    expect(twin).toMatchObject({ reason: "invalid", words: expect.stringContaining(material.name) });
    expect(await entries()).toMatchObject([{ act: "material.add", actorId: operator.id }]);
  });

  test("a change is written down with what was before; a stale one changes nothing", async () => {
    const { material } = await makeShop();
    const owner = await makePerson({ roles: ["owner"] });
    const { id, active: _active, version, createdAt: _createdAt, ...fields } = material;
    const dearer = { ...fields, sheetPrice: 10_400 };
    await done(saveMaterial({ actor: owner, material: { id, version }, fields: dearer }));
    expect(await entries()).toEqual([
      {
        act: "material.change",
        actorId: owner.id,
        detail: { code: "BB-18", changes: { sheetPrice: { before: 9_800, after: 10_400 } } },
      },
    ]);
    const stale = await refused(
      saveMaterial({ actor: owner, material: { id, version }, fields: { ...fields, sheetPrice: 1 } }),
    );
    expect(stale.reason).toBe("changed");
    expect((await db.select().from(materials))[0]).toMatchObject({
      sheetPrice: 10_400,
      version: version + 1,
    });
    expect(await entries()).toHaveLength(1);
  });

  test.each([[["clerk"]], [["builder"]]] as const)("%j may not", async (roles) => {
    const actor = await makePerson({ roles });
    expect((await refused(saveMaterial({ actor, material: null, fields: FIELDS }))).reason).toBe(
      "not-allowed",
    );
  });
});

describe("lots", () => {
  test("a stack comes in with its readings; its figures are theirs", async () => {
    const { material } = await makeShop();
    const operator = await makePerson({ roles: ["operator"] });
    const { lotId } = await done(
      addLot({ actor: operator, materialId: material.id, fields: LOT, readings: readings(EIGHT) }),
    );
    const [lot] = await db.select().from(lots).where(eq(lots.id, lotId));
    expect(lot).toMatchObject({ ...LOT, thicknessMin: 17.8, thicknessMean: 17.9, thicknessMax: 18 });
    const stored = await db.select().from(lotReadings).where(eq(lotReadings.lotId, lotId));
    expect(stored).toHaveLength(8);
    expect(stored.every((reading) => reading.measuredBy === operator.id)).toBe(true);
    const short = addLot({
      actor: operator,
      materialId: material.id,
      fields: { ...LOT, code: "BB-18/10" },
      readings: readings(EIGHT.slice(0, 5)),
    });
    expect((await refused(short)).words).toContain("EN 324-1");
  });

  test("measured anew, the newest figures count and the earlier readings stay", async () => {
    const { material } = await makeShop();
    const operator = await makePerson({ roles: ["operator"] });
    const { lotId } = await done(
      addLot({ actor: operator, materialId: material.id, fields: LOT, readings: readings(EIGHT) }),
    );
    const thinner = readings(EIGHT.map((thickness) => thickness - 0.2));
    const now = new Date("2026-12-03T18:00:00Z");
    await done(readThickness({ actor: operator, lotId, version: 1, readings: thinner, now }));
    const [lot] = await db.select().from(lots).where(eq(lots.id, lotId));
    expect(lot).toMatchObject({ thicknessMean: 17.7, measuredAt: now, version: 2 });
    expect(await db.select().from(lotReadings).where(eq(lotReadings.lotId, lotId))).toHaveLength(16);
    const stale = await refused(readThickness({ actor: operator, lotId, version: 1, readings: thinner }));
    expect(stale.reason).toBe("changed");
  });

  test("reserved sheets are neither counted away nor retired", async () => {
    const { lot } = await makeShop();
    const owner = await makePerson({ roles: ["owner"] });
    await db.update(lots).set({ sheetsReserved: 3 }).where(eq(lots.id, lot.id));
    const fields = { code: lot.code, supplierLot: "S-9", supplierDocument: "Binder 1", sheetsOnHand: 2 };
    const counted = await refused(changeLot({ actor: owner, lotId: lot.id, version: 1, fields }));
    expect(counted.words).toContain("3 sheets are reserved");
    const away = { actor: owner, kind: "lot", id: lot.id, version: 1, active: false } as const;
    expect((await refused(retire(away))).reason).toBe("wrong-stage");
    await done(
      changeLot({ actor: owner, lotId: lot.id, version: 1, fields: { ...fields, sheetsOnHand: 3 } }),
    );
    expect((await entries()).at(-1)).toMatchObject({
      act: "lot.change",
      detail: {
        changes: {
          sheetsOnHand: { before: 20, after: 3 },
          supplierLot: { before: null, after: "S-9" },
        },
      },
    });
  });

  test("a retired material takes no lot until it is in use again", async () => {
    const { material } = await makeShop();
    const owner = await makePerson({ roles: ["owner"] });
    const away = { actor: owner, kind: "material", id: material.id, version: 1, active: false } as const;
    await done(retire(away));
    const lot = { actor: owner, materialId: material.id, fields: LOT, readings: readings(EIGHT) };
    expect((await refused(addLot(lot))).words).toContain("retired");
    await done(retire({ ...away, version: 2, active: true }));
    await done(addLot(lot));
    expect((await entries()).map(({ act }) => act)).toEqual([
      "material.retire",
      "material.restore",
      "lot.add",
    ]);
  });
});
