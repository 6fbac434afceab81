import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { priceOrder } from "~/domain/pricing";
import {
  type FlatPiece,
  flatPiecesOf,
  lengthPlusGirth,
  type ParcelLimits,
  parcelLimits,
  plannedParcels,
  suggestParcels,
} from "~/domain/shipping";
import { birch, book, type facts, panel, someFacts } from "../pricing/facts";

function limitsOfPrivate(): ParcelLimits {
  const limits = parcelLimits("private", "2026-11-30");
  if (!limits) throw new Error("no limits");
  return limits;
}
const limits = { ...limitsOfPrivate(), maxKilograms: 23 };
const bare = { around: 0, kilogramsPerSquareMetre: 0 };
const piece = (id: string, width: number, height: number, kilograms: number): FlatPiece => ({
  id,
  width,
  height,
  thickness: 18,
  kilograms,
});

describe("stacks of panels", () => {
  it("are sorted by size and closed when the next piece would be too heavy", () => {
    const pieces = [
      piece("a", 400, 300, 6),
      piece("b", 800, 600, 12),
      piece("c", 300, 700, 8),
      piece("d", 400, 300, 6),
    ];
    const parcels = suggestParcels(pieces, limits, bare);
    expect(parcels.map((parcel) => parcel.pieces)).toEqual([
      ["b", "c"],
      ["a", "d"],
    ]);
    expect(parcels[0]).toMatchObject({ length: 800, width: 600, height: 36, kilograms: 20, oversize: false });
  });

  it("add their packing", () => {
    const [parcel] = suggestParcels([piece("a", 970, 470, 5)], limits, {
      around: 15,
      kilogramsPerSquareMetre: 2,
    });
    expect(parcel).toMatchObject({ length: 1000, width: 500, height: 48 });
    expect(parcel.kilograms).toBeCloseTo(6, 9);
  });

  it("set apart what no parcel may be", () => {
    const parcels = suggestParcels(
      [
        piece("long", 2800, 100, 5),
        piece("girthy", 1400, 1450, 20),
        piece("heavy", 900, 900, 24),
        piece("fine", 500, 500, 3),
      ],
      limits,
      bare,
    );
    expect(parcels.map(({ pieces, oversize }) => [pieces[0], oversize])).toEqual([
      ["long", true],
      ["girthy", true],
      ["heavy", true],
      ["fine", false],
    ]);
  });
});

const somePieces = fc
  .array(
    fc.record({
      width: fc.double({ min: 20, max: 2900, noNaN: true }),
      height: fc.double({ min: 20, max: 1200, noNaN: true }),
      thickness: fc.constantFrom(6.5, 9, 12, 18),
      kilograms: fc.double({ min: 0.05, max: 30, noNaN: true }),
    }),
    { minLength: 1, maxLength: 40 },
  )
  .map((pieces) => pieces.map((one, i) => ({ ...one, id: `p${i}` })));

describe("whatever the pieces", () => {
  it("each is in one stack, and a stack of several keeps the limits", () => {
    fc.assert(
      fc.property(somePieces, (pieces) => {
        const parcels = suggestParcels(pieces, limits);
        expect(parcels.flatMap((parcel) => parcel.pieces).toSorted()).toEqual(
          pieces.map(({ id }) => id).toSorted(),
        );
        for (const parcel of parcels) {
          if (parcel.pieces.length > 1) expect(parcel.oversize).toBe(false);
          if (parcel.oversize) continue;
          expect(parcel.kilograms).toBeLessThanOrEqual(limits.maxKilograms);
          expect(lengthPlusGirth(parcel)).toBeLessThanOrEqual(limits.maxLengthPlusGirth);
        }
      }),
    );
  });

  it("fewer pieces never need more stacks", () => {
    fc.assert(
      fc.property(somePieces, fc.nat(), (pieces, pick) => {
        const fewer = pieces.filter((_, i) => i !== pick % pieces.length);
        expect(suggestParcels(fewer, limits).length).toBeLessThanOrEqual(
          suggestParcels(pieces, limits).length,
        );
      }),
    );
  });
});

describe("parcels of an order", () => {
  it("hold every piece of every stock at its weight", () => {
    const pieces = flatPiecesOf([
      birch,
      { ...birch, materialId: "other", parts: [{ ...panel, quantity: 2 }] },
    ]);
    expect(pieces).toHaveLength(6);
    expect(new Set(pieces.map(({ id }) => id)).size).toBe(6);
    expect(pieces[0].kilograms).toBeCloseTo(0.224292 * 0.0179 * 685, 9);
  });

  it("keep the shop's own heaviest parcel", () => {
    const parcels = plannedParcels([birch], limitsOfPrivate(), 7);
    // Four panels of 2.75 kg and about 0.5 kg of packing: two to a parcel.
    expect(parcels).toHaveLength(2);
    expect(plannedParcels([birch], limitsOfPrivate(), 1000)).toHaveLength(1);
  });

  it("make one more of a part never cost less, freight by its own parcels included", () => {
    const priced = (of: typeof facts): number => {
      const parcels = plannedParcels(of.stocks, limitsOfPrivate(), book.freight.maxParcelKilograms);
      const result = priceOrder({ ...of, parcels }, book);
      if (!result.ok) throw new Error(result.reason);
      return result.quote.total;
    };
    fc.assert(
      fc.property(someFacts, (some) => {
        const [first, ...others] = some.stocks;
        const [kind, ...kinds] = first.parts;
        const more = [{ ...first, parts: [{ ...kind, quantity: kind.quantity + 1 }, ...kinds] }, ...others];
        expect(priced({ ...some, stocks: more })).toBeGreaterThanOrEqual(priced(some));
      }),
    );
  });
});
