import { describe, expect, it } from "vitest";
import { offcutOf, placedBox, type SheetView } from "~/components/sheet-viewer/sheet-view";

const SHEET: SheetView = {
  length: 2440,
  width: 1220,
  margin: 10,
  spacing: 12,
  hasGrain: true,
  yield: 0.5,
  minutes: 10,
  parts: [],
};
const part = (maxX: number) => ({
  id: "p",
  label: "2047 A·1",
  order: 0,
  d: null,
  turnDegrees: 0,
  x: 0,
  y: 0,
  box: { minX: 10, minY: 10, maxX, maxY: 400 },
});

describe("parts on a sheet", () => {
  it("lie where their frame's turn and move put them, quarter turns exactly", () => {
    const box = { minX: 5, minY: 7, maxX: 105, maxY: 57 };
    expect(placedBox(box, { turnDegrees: 0, x: 10, y: 20 })).toEqual({
      minX: 15,
      minY: 27,
      maxX: 115,
      maxY: 77,
    });
    // A quarter turn takes (x, y) to (-y, x): x from -57 to -7, y from 5 to 105.
    expect(placedBox(box, { turnDegrees: 90, x: 67, y: 5 })).toEqual({
      minX: 10,
      minY: 10,
      maxX: 60,
      maxY: 110,
    });
    // Half a turn takes it to (-x, -y).
    expect(placedBox(box, { turnDegrees: 180, x: 105, y: 57 })).toEqual({
      minX: 0,
      minY: 0,
      maxX: 100,
      maxY: 50,
    });
  });

  it("leave an offcut beyond the last of them, one spacing away, where it is worth keeping", () => {
    expect(offcutOf({ ...SHEET, parts: [part(1200), part(800)] })).toEqual({
      minX: 1212,
      minY: 0,
      maxX: 2440,
      maxY: 1220,
    });
    expect(offcutOf({ ...SHEET, parts: [part(2300)] })).toBeNull();
    expect(offcutOf(SHEET)).toBeNull();
  });
});
