import { describe, expect, it } from "vitest";
import { DEMO_DRAWINGS, type DemoDrawing } from "~/db/seed/drawings";
import { DEMO_MACHINES } from "~/db/seed/machines";
import { DEMO_PEOPLE, SIGN_INS } from "~/db/seed/people";
import { DEMO_PRICE_BOOK } from "~/db/seed/price-book";
import { DEMO_SETTINGS } from "~/db/seed/settings";
import { DEMO_MATERIALS } from "~/db/seed/stock";
import { readDrawing, scaleDrawing } from "~/domain/drawing";
import { thicknessOf } from "~/domain/fit";
import { checkNest, nestOnSheets } from "~/domain/nesting";
import { shipToSchema, shopSettingsSchema } from "~/domain/orders";
import { findParts, type Part } from "~/domain/parts";
import { type PricedStock, priceBookSchema, priceOrder } from "~/domain/pricing";
import { instantAt, promiseDate, weekCalendarSchema } from "~/domain/scheduling";
import { parcelLimits, plannedParcels } from "~/domain/shipping";

describe("the demonstration's definitions", () => {
  it("are what the schemas ask", () => {
    expect(shopSettingsSchema.parse(DEMO_SETTINGS)).toEqual(DEMO_SETTINGS);
    expect(priceBookSchema.parse(DEMO_PRICE_BOOK)).toEqual(DEMO_PRICE_BOOK);
    for (const { calendar } of DEMO_MACHINES) expect(weekCalendarSchema.parse(calendar)).toEqual(calendar);
    for (const { addresses } of Object.values(DEMO_PEOPLE)) {
      for (const address of addresses) expect(shipToSchema.parse(address)).toEqual(address);
    }
  });

  it("name nobody's real mail: every address is under a name reserved for examples (RFC 2606)", () => {
    const mails = [...Object.values(DEMO_PEOPLE).map(({ email }) => email), DEMO_SETTINGS.shop.email];
    expect(new Set(mails).size).toBe(mails.length);
    for (const mail of mails) expect(mail).toMatch(/\.example$/);
  });

  it("have one sign-in for every role", () => {
    expect(SIGN_INS.map((name) => DEMO_PEOPLE[name].roles)).toEqual([
      ["builder"],
      ["operator"],
      ["clerk"],
      ["owner"],
    ]);
  });

  // Least and greatest thickness from a European all-birch plywood data sheet.
  it.each([
    ["BB-6.5", 6.1, 6.9],
    ["BB-9", 8.8, 9.5],
    ["BB-12", 11.5, 12.5],
    ["BB-18", 17.1, 18.1],
  ])("lots of %s lie between %d and %d mm", (code, least, greatest) => {
    const stacks = DEMO_MATERIALS.find((material) => material.code === code)?.lots ?? [];
    expect(stacks.length).toBeGreaterThan(0);
    for (const { readings } of stacks) {
      const { min, max } = thicknessOf(readings);
      expect(min).toBeGreaterThanOrEqual(least);
      expect(max).toBeLessThanOrEqual(greatest);
    }
  });
});

const { spacing, margin, plannedYield } = DEMO_SETTINGS.nesting;

function cut(drawing: DemoDrawing): { stock: PricedStock; parts: readonly Part[]; hasGrain: boolean } {
  const material = DEMO_MATERIALS.find(({ code }) => code === drawing.material);
  const result = readDrawing(new TextEncoder().encode(drawing.draw()));
  if (!material || !result.ok) throw new Error("no material, or not readable");
  const { parts } = findParts(scaleDrawing(result.drawing, drawing.unit), { layers: [] });
  return {
    parts,
    hasGrain: material.hasGrain,
    stock: {
      materialId: material.code,
      materialName: material.name,
      lotId: material.lots[0].code,
      lotCode: material.lots[0].code,
      nominalThickness: material.nominalThickness,
      thickness: thicknessOf(material.lots[0].readings),
      density: material.density,
      sheet: { length: material.sheetLength, width: material.sheetWidth },
      sheetPrice: material.sheetPrice,
      parts: parts.map((part) => ({
        label: part.id,
        quantity: part.quantity,
        cutLength: part.outerLength + part.innerLength,
        outerLength: part.outerLength,
        holes: part.holes,
        area: part.area,
        grossArea: part.grossArea,
        box: { width: part.box.maxX - part.box.minX, height: part.box.maxY - part.box.minY },
      })),
    },
  };
}

describe("every drawing of the demonstration", () => {
  const limits = parcelLimits("private", "2026-12-01");
  if (!limits) throw new Error("no limits");

  for (const [name, drawing] of Object.entries(DEMO_DRAWINGS)) {
    it(`${name} can be priced, promised and nested in its material`, () => {
      const { stock, hasGrain } = cut(drawing);
      const priced = priceOrder(
        {
          stocks: [stock],
          sanding: "arrises",
          leaveTabs: false,
          delivery: "ship",
          shipToRegion: "WA",
          parcels: plannedParcels([stock], limits, DEMO_PRICE_BOOK.freight.maxParcelKilograms),
          taxExempt: false,
          tax: DEMO_SETTINGS.tax.regions[0],
          plannedYield,
          spacing,
        },
        DEMO_PRICE_BOOK,
      );
      if (!priced.ok) throw new Error(priced.reason);
      expect(priced.quote.total).toBeGreaterThan(DEMO_PRICE_BOOK.minimumOrder);

      const promised = promiseDate({
        approvedAt: instantAt("2026-12-01", "09:00", DEMO_SETTINGS.shop.timeZone),
        timeZone: DEMO_SETTINGS.shop.timeZone,
        lead: DEMO_SETTINGS.lead,
        calendars: DEMO_MACHINES.map(({ calendar }) => calendar),
        load: {},
        minutes: priced.quote.machineMinutes,
      });
      expect(promised.ok && promised.promise.shipsOn).toBe("2026-12-04");

      const request = {
        items: stock.parts.map(({ label, box, quantity }) => ({
          id: label,
          ...box,
          mayTurn90: !hasGrain,
          quantity,
        })),
        sheet: stock.sheet,
        spacing,
        margin,
      };
      const nest = nestOnSheets(request);
      expect(checkNest(nest, request)).toEqual({ ok: true });
      expect(nest.unplaced).toEqual([]);
      // The plan holds: no drawing needs more sheets than it is charged.
      expect(nest.sheets.length).toBeLessThanOrEqual(priced.quote.sheets[0].sheets);
    });
  }
});
