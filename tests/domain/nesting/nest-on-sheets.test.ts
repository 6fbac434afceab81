import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { checkNest, type NestRequest, nestOnSheets } from "~/domain/nesting";

const inch = 25.4;
const birch = { length: 2440, width: 1220 };

describe("nesting boxes", () => {
  it("cuts 12 parts of 23 × 15 in from a 48 × 96 in sheet, 89.8 % of it (grid worked by arithmetic)", () => {
    const request: NestRequest = {
      items: [{ id: "A", width: 15 * inch, height: 23 * inch, mayTurn90: true, quantity: 13 }],
      sheet: { length: 96 * inch, width: 48 * inch },
      spacing: 0.5 * inch,
      margin: 0.5 * inch,
    };
    const nest = nestOnSheets(request);
    expect(nest.sheets.map((sheet) => sheet.placements.length)).toEqual([12, 1]);
    expect(nest.sheets[0].yield * 100).toBeCloseTo(89.8, 1);
    expect(checkNest(nest, request)).toEqual({ ok: true });
  });

  it("fills a sheet exactly where nothing is to be left between", () => {
    const items = [{ id: "A", width: 610, height: 610, mayTurn90: false, quantity: 8 }];
    const nest = nestOnSheets({ items, sheet: birch, spacing: 0, margin: 0 });
    expect(nest.sheets).toHaveLength(1);
    expect(nest.sheets[0].yield).toBeCloseTo(1, 12);
  });

  it("turns a part only where its grain is free", () => {
    const tall = { id: "A", width: 600, height: 1800, quantity: 1 };
    const request = { sheet: birch, spacing: 10, margin: 10 };
    const free = nestOnSheets({ ...request, items: [{ ...tall, mayTurn90: true }] });
    expect(free.sheets[0].placements[0].turnDegrees).toBe(90);
    const held = nestOnSheets({ ...request, items: [{ ...tall, mayTurn90: false }] });
    expect(held).toEqual({ sheets: [], unplaced: [{ item: "A", copy: 1 }] });
  });

  it("leaves out what no sheet holds and nests the rest", () => {
    const items = [
      { id: "A", width: 2430, height: 300, mayTurn90: true, quantity: 2 },
      { id: "B", width: 700, height: 400, mayTurn90: true, quantity: 3 },
    ];
    const nest = nestOnSheets({ items, sheet: birch, spacing: 10, margin: 10 });
    expect(nest.unplaced.map(({ item, copy }) => `${item}${copy}`)).toEqual(["A1", "A2"]);
    expect(nest.sheets.flatMap((sheet) => sheet.placements)).toHaveLength(3);
  });

  it("needs no sheet for nothing", () => {
    expect(nestOnSheets({ items: [], sheet: birch, spacing: 10, margin: 10 })).toEqual({
      sheets: [],
      unplaced: [],
    });
  });

  it("leaves the offcut in one piece at the end of the sheet", () => {
    const items = [{ id: "A", width: 400, height: 390, mayTurn90: true, quantity: 3 }];
    const { sheets } = nestOnSheets({ items, sheet: birch, spacing: 10, margin: 10 });
    expect(Math.max(...sheets[0].placements.map(({ x }) => x))).toBe(10);
  });
});

const someRequest: fc.Arbitrary<NestRequest> = fc.record({
  items: fc
    .array(
      fc.record({
        width: fc.double({ min: 5, max: 1500, noNaN: true }),
        height: fc.double({ min: 5, max: 1500, noNaN: true }),
        mayTurn90: fc.boolean(),
        quantity: fc.integer({ min: 1, max: 9 }),
      }),
      { minLength: 1, maxLength: 12 },
    )
    .map((items) => items.map((item, i) => ({ ...item, id: `P${i}` }))),
  sheet: fc.constantFrom(birch, { length: 1525, width: 1525 }),
  spacing: fc.constantFrom(0, 6.35, 12.7),
  margin: fc.constantFrom(0, 8, 13),
});

describe("whatever the parts", () => {
  it("the nest passes the independent check", () => {
    fc.assert(
      fc.property(someRequest, (request) => {
        expect(checkNest(nestOnSheets(request), request)).toEqual({ ok: true });
      }),
      { numRuns: 200 },
    );
  });

  it("the same request gives the same nest", () => {
    fc.assert(
      fc.property(someRequest, (request) => {
        expect(nestOnSheets(structuredClone(request))).toEqual(nestOnSheets(request));
      }),
      { numRuns: 30 },
    );
  });

  it("no sheet is empty, and none covers more than itself", () => {
    fc.assert(
      fc.property(someRequest, (request) => {
        const { sheets } = nestOnSheets(request);
        for (const sheet of sheets) {
          expect(sheet.placements.length).toBeGreaterThan(0);
          expect(sheet.yield).toBeLessThanOrEqual(1 + 1e-9);
        }
      }),
      { numRuns: 100 },
    );
  });
});
