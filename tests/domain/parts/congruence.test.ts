import * as fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  type Affine,
  affineApply,
  affineCompose,
  affineMove,
  affineRotation,
  affineScale,
  type Curve,
  containsPoint,
  distancePointToCurve,
  type Path,
  pointAt,
  reversePath,
  transformPath,
} from "~/domain/geometry";
import { findParts, type Part } from "~/domain/parts";
import { drawingOf, drawn, exploded, hole, lineCurve, rectangle, ring, turnedPaths } from "./drawn";

const placed = (degrees: number, x: number, y: number, mirrored = false): Affine =>
  affineCompose(
    affineMove({ x, y }),
    affineCompose(affineRotation((degrees * Math.PI) / 180), affineScale(mirrored ? -1 : 1, 1)),
  );

/** A bracket that is no mirror image of itself, 120 by 80, with two holes. */
const bracket: Path[] = [
  ring([
    [0, 0],
    [120, 0],
    [120, 30],
    [40, 30],
    [40, 80],
    [0, 80],
  ]),
  hole(20, 60, 12),
  hole(90, 15, 8.5),
];

const partsOf = (paths: readonly Path[]) =>
  findParts(drawingOf(paths.map((path) => drawn(path))), { layers: [] }).parts;

/** Checks that each copy's turn and move carry the first copy's outline onto a drawn one. */
function expectCarried(part: Part, drawnPaths: readonly Path[]) {
  for (const { turnDegrees, move, at } of part.copies) {
    const carry = affineCompose(affineMove(move), affineRotation((turnDegrees * Math.PI) / 180));
    const target = drawnPaths.filter((path) => containsPoint(path, at));
    expect(target.length).toBeGreaterThan(0);
    for (const curve of part.outer.curves) {
      const point = affineApply(carry, pointAt(curve, 0.37));
      const gap = Math.min(
        ...target.flatMap(({ curves }) => curves.map((one) => distancePointToCurve(one, point))),
      );
      expect(gap).toBeLessThan(0.05);
    }
  }
}

describe("equal parts", () => {
  it("are counted together however they are turned and moved", () => {
    const turns = [0, 17, 90, 123.4, 180, 271];
    const copies = turns.map((turn, i) => turnedPaths(bracket, placed(turn, i * 300, i * 40)));
    const parts = partsOf(copies.flat());
    expect(parts).toMatchObject([{ quantity: 6, holes: 2, mirrorOf: null }]);
    parts[0].copies.forEach(({ turnDegrees }, i) => {
      expect(turnDegrees).toBeCloseTo(turns[i], 6);
    });
    expectCarried(
      parts[0],
      copies.map(([outer]) => outer),
    );
  });

  it("are numbered in the order they are drawn, exploded or not", () => {
    const copy = (x: number) => turnedPaths([rectangle(0, 0, 90, 60)], placed(0, x, 0))[0];
    const paths = [...exploded(copy(0)), drawn(copy(200)), ...exploded(copy(400)), drawn(copy(600))];
    const [{ copies }] = findParts(drawingOf(paths), { layers: [] }).parts;
    expect(copies.map(({ move }) => Math.round(move.x))).toEqual([0, 200, 400, 600]);
  });

  it("a mirror image is another part that names its twin", () => {
    const parts = partsOf([
      ...bracket,
      ...turnedPaths(bracket, placed(33, 400, 0, true)),
      ...turnedPaths(bracket, placed(90, 800, 0, true)),
    ]);
    expect(parts.map(({ id, quantity, mirrorOf }) => [id, quantity, mirrorOf])).toEqual([
      ["A", 1, null],
      ["B", 2, "A"],
    ]);
  });

  it("a part that is its own mirror image is one kind", () => {
    const tee = [
      ring([
        [0, 0],
        [100, 0],
        [100, 20],
        [60, 20],
        [60, 90],
        [40, 90],
        [40, 20],
        [0, 20],
      ]),
      hole(50, 50, 7),
    ];
    expect(partsOf([...tee, ...turnedPaths(tee, placed(45, 300, 0, true))])).toMatchObject([
      { quantity: 2, mirrorOf: null },
    ]);
  });

  it("outlines whose corners are all equally far from the centre are turned by them", () => {
    const hexagon = ring(
      [0, 1, 2, 3, 4, 5].map((i) => [50 * Math.cos((i * Math.PI) / 3), 50 * Math.sin((i * Math.PI) / 3)]),
    );
    for (const shape of [rectangle(0, 0, 80, 30), rectangle(0, 0, 60, 60), hexagon]) {
      expect(partsOf([shape, ...turnedPaths([shape], placed(17, 300, 0))])).toMatchObject([{ quantity: 2 }]);
    }
  });

  it("holes decide between turns of a square, and make a twin of it", () => {
    const square = [rectangle(0, 0, 100, 100), hole(20, 30, 9), hole(80, 30, 9), hole(80, 60, 9)];
    const parts = partsOf([
      ...square,
      ...turnedPaths(square, placed(90, 300, 0)),
      ...turnedPaths(square, placed(0, 600, 0, true)),
    ]);
    expect(parts.map(({ quantity, mirrorOf }) => [quantity, mirrorOf])).toEqual([
      [2, null],
      [1, "A"],
    ]);
  });

  it("discs are turned by their holes", () => {
    const disc = [hole(0, 0, 200), hole(60, 0, 9), hole(0, 50, 9), hole(-40, 0, 11)];
    const parts = partsOf([
      ...disc,
      ...turnedPaths(disc, placed(77, 400, 0)),
      ...turnedPaths(disc, placed(0, 800, 0, true)),
    ]);
    expect(parts.map(({ quantity, mirrorOf }) => [quantity, mirrorOf])).toEqual([
      [2, null],
      [1, "A"],
    ]);
    expect(parts[0].copies[1].turnDegrees).toBeCloseTo(77, 6);
  });

  it("a disc with a square hole about its centre is turned by the square", () => {
    const disc = [hole(0, 0, 200), rectangle(-30, -30, 60, 60)];
    expect(partsOf([...disc, ...turnedPaths(disc, placed(30, 400, 0))])).toMatchObject([{ quantity: 2 }]);
  });

  it("smooth outlines without a corner are laid on each other", () => {
    const ellipse = (affine: Affine): Path =>
      transformPath(
        {
          closed: true,
          curves: [
            {
              kind: "ellipse",
              centre: { x: 0, y: 0 },
              major: { x: 90, y: 0 },
              ratio: 0.6,
              start: 0,
              sweep: 2 * Math.PI,
            },
          ],
        },
        affine,
      );
    const paths = [ellipse(placed(0, 0, 0)), ellipse(placed(37, 300, 0)), ellipse(placed(11, 600, 0, true))];
    const parts = partsOf(paths);
    expect(parts).toMatchObject([{ quantity: 3, mirrorOf: null }]);
    expectCarried(parts[0], paths);
  });

  it("0.04 mm apart are equal, 0.08 mm apart are not", () => {
    const strip = (length: number, x: number) => rectangle(x, 0, length, 40);
    expect(partsOf([strip(300, 0), strip(300.06, 400)])).toMatchObject([{ quantity: 2 }]);
    // Laid on each other as well as can be, each end is off by half of the difference.
    expect(partsOf([strip(300, 0), strip(300.16, 400)])).toHaveLength(2);
    const drilled = (at: number, x: number) => [strip(300, x), hole(x + at, 20, 9), hole(x + 20, 10, 9)];
    expect(partsOf([...drilled(100, 0), ...drilled(100.04, 400)])).toMatchObject([{ quantity: 2 }]);
    expect(partsOf([...drilled(100, 0), ...drilled(100.08, 400)])).toHaveLength(2);
  });

  it("features of another depth make another part", () => {
    const one = [drawn(rectangle(0, 0, 90, 60)), drawn(hole(20, 20, 9), "POCKET_D5")];
    const other = [drawn(rectangle(200, 0, 90, 60)), drawn(hole(220, 20, 9), "POCKET_D6")];
    expect(findParts(drawingOf([...one, ...other]), { layers: [] }).parts).toHaveLength(2);
  });
});

/** A star of straight and bulged sides about the origin, its corners at random distances. */
const anyOutline: fc.Arbitrary<Path> = fc
  .array(fc.record({ radius: fc.integer({ min: 60, max: 150 }), bulged: fc.boolean() }), {
    minLength: 5,
    maxLength: 12,
  })
  .map((corners) => {
    const at = (i: number) => {
      const angle = (2 * Math.PI * i) / corners.length;
      const { radius } = corners[i % corners.length];
      return { x: radius * Math.cos(angle), y: radius * Math.sin(angle) };
    };
    const curves = corners.map(({ bulged }, i): Curve => {
      const from = at(i);
      const to = at(i + 1);
      if (!bulged) return lineCurve(from, to);
      const chord = Math.hypot(to.x - from.x, to.y - from.y);
      const sweep = 0.4;
      const radius = chord / 2 / Math.sin(sweep / 2);
      const middle = { x: (from.x + to.x) / 2, y: (from.y + to.y) / 2 };
      const away = radius * Math.cos(sweep / 2);
      const centre = {
        x: middle.x - ((to.y - from.y) / chord) * away,
        y: middle.y + ((to.x - from.x) / chord) * away,
      };
      return { kind: "arc", centre, radius, start: Math.atan2(from.y - centre.y, from.x - centre.x), sweep };
    });
    return { closed: true, curves };
  });

/** Cuts every straight side in two. */
const splitSides = ({ curves, closed }: Path): Path => ({
  closed,
  curves: curves.flatMap((curve) =>
    curve.kind === "line"
      ? [lineCurve(curve.from, pointAt(curve, 0.3)), lineCurve(pointAt(curve, 0.3), curve.to)]
      : [curve],
  ),
});

const begunAt = ({ curves, closed }: Path, offset: number): Path => ({
  closed,
  curves: [...curves.slice(offset % curves.length), ...curves.slice(0, offset % curves.length)],
});

describe("any part, turned, mirrored, exploded, split, shuffled and drawn twice", () => {
  const place = fc.record({
    degrees: fc.double({ min: 0, max: 360, noNaN: true }),
    how: fc.constantFrom("whole", "exploded", "split", "reversed", "begun elsewhere"),
    offset: fc.nat(11),
    doubled: fc.boolean(),
  });

  it("gives the same parts", () => {
    fc.assert(
      fc.property(
        anyOutline,
        fc.array(place, { minLength: 2, maxLength: 5 }),
        fc.boolean(),
        fc.nat(),
        (outline, places, mirrored, seed) => {
          const piece = [outline, hole(10, 0, 9), hole(0, 25, 14)];
          const paths = places.flatMap(({ degrees, how, offset, doubled }, i) => {
            const [outer, ...holes] = turnedPaths(piece, placed(degrees, i * 500, 0, mirrored && i === 1));
            const shapes = {
              whole: [drawn(outer)],
              exploded: exploded(outer),
              split: exploded(splitSides(outer)),
              reversed: [drawn(reversePath(outer))],
              "begun elsewhere": [drawn(begunAt(outer, offset))],
            }[how];
            return [...shapes, ...(doubled ? shapes : []), ...holes.map((path) => drawn(path))];
          });
          const report = findParts(drawingOf(shuffled(paths, seed)), { layers: [] });
          expect(report.totals.parts).toBe(places.length);
          expect(report.open).toEqual([]);
          const counts = report.parts.map(({ quantity }) => quantity).sort();
          const twins = report.parts.filter(({ mirrorOf }) => mirrorOf !== null);
          if (mirrored && report.parts.length > 1) {
            expect(counts).toEqual([1, places.length - 1].sort());
            expect(twins).toHaveLength(1);
          } else {
            expect(counts).toEqual([places.length]);
          }
          for (const part of report.parts) {
            expect(part.holes).toBe(2);
            expect(part.innerLength).toBeCloseTo(23 * Math.PI, 6);
          }
        },
      ),
      { numRuns: 60 },
    );
  });
});

/** The same list in another order, for a seed. */
function shuffled<T>(list: readonly T[], seed: number): T[] {
  const keyed = list.map((item, i) => ({ item, key: Math.sin(seed + i * 12.9898) * 43758.5453 }));
  return keyed.sort((p, q) => (p.key % 1) - (q.key % 1)).map(({ item }) => item);
}
