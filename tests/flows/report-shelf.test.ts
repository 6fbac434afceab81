import { expect, it } from "vitest";
import type { PartsReport } from "~/domain/parts";
import { createReportShelf } from "~/flows/report-shelf";

const report = (holes: number): PartsReport => ({
  parts: [],
  open: [],
  bridges: [],
  overlaps: [],
  crossings: [],
  nearEqual: [],
  setAside: [],
  duplicates: 0,
  drawn: {
    curves: 0,
    length: 0,
    uniqueLength: 0,
    hiddenLength: 0,
    loops: 0,
    depths: {},
    openChains: 0,
    branches: 0,
    extents: null,
  },
  totals: { parts: 0, distinctParts: 0, holes, cutLength: 0, area: 0, box: { width: 0, height: 0 } },
});

it("lets go of what was used longest ago, never of more than it must", () => {
  const shelf = createReportShelf(100);
  shelf.put("a", report(1), 40);
  shelf.put("b", report(2), 40);
  expect(shelf.take("a")?.totals.holes).toBe(1);
  shelf.put("c", report(3), 40);
  expect(shelf.take("b")).toBeUndefined();
  expect([shelf.take("a")?.totals.holes, shelf.take("c")?.totals.holes]).toEqual([1, 3]);
});

it("takes nothing larger than itself and counts nothing twice", () => {
  const shelf = createReportShelf(100);
  shelf.put("a", report(1), 60);
  shelf.put("a", report(1), 60);
  shelf.put("large", report(2), 101);
  expect(shelf.take("large")).toBeUndefined();
  shelf.put("b", report(3), 40);
  expect(shelf.take("a")?.totals.holes).toBe(1);
  expect(shelf.take("b")?.totals.holes).toBe(3);
});
