import { describe, expect, it } from "vitest";
import { heldPoint, measuredWords } from "~/components/drawing-viewer/measuring";
import {
  fittedView,
  roundLength,
  toDrawing,
  toScreen,
  viewAt,
  viewShowing,
  zoomedView,
} from "~/components/drawing-viewer/view";

const size = { width: 960, height: 560 };
const box = { minX: -100, minY: 50, maxX: 1900, maxY: 850 };

describe("the view of a drawing", () => {
  it("fits a box inside its window, y up", () => {
    const view = fittedView(box, size);
    const [left, top] = toScreen(view, [box.minX, box.maxY]);
    const [right, bottom] = toScreen(view, [box.maxX, box.minY]);
    expect(left).toBeGreaterThanOrEqual(0);
    expect(top).toBeGreaterThanOrEqual(0);
    expect(right).toBeLessThanOrEqual(size.width);
    expect(bottom).toBeLessThanOrEqual(size.height);
    expect(right - left).toBeCloseTo(2000 * view.scale, 6);
    expect(left).toBeCloseTo(size.width - right, 6);
  });

  it("keeps the point under the cursor when it zooms, and comes back", () => {
    const view = fittedView(box, size);
    const under = toDrawing(view, [300, 200]);
    const near = zoomedView(view, 3.7, 300, 200);
    expect(toDrawing(near, [300, 200])[0]).toBeCloseTo(under[0], 9);
    expect(toDrawing(near, [300, 200])[1]).toBeCloseTo(under[1], 9);
    expect(zoomedView(near, 1 / 3.7, 300, 200).x).toBeCloseTo(view.x, 9);
  });

  it("stops at its nearest and farthest scale without sliding", () => {
    const nearest = zoomedView({ scale: 1, x: 10, y: 20 }, 1e9, 100, 100);
    expect(zoomedView(nearest, 2, 300, 50)).toEqual(nearest);
  });

  it("brings a part outside the window into its middle, and leaves one inside alone", () => {
    const view = fittedView(box, size);
    expect(viewShowing(view, { minX: 0, minY: 100, maxX: 50, maxY: 150 }, size)).toBe(view);
    const shown = viewShowing(view, { minX: 5000, minY: 100, maxX: 5100, maxY: 200 }, size);
    expect(toScreen(shown, [5050, 150])[0]).toBeCloseTo(size.width / 2, 6);
    expect(toScreen(shown, [5050, 150])[1]).toBeCloseTo(size.height / 2, 6);
  });

  it.each([
    [0.5, 70, 200],
    [0.7, 70, 100],
    [3, 70, 50],
    [0.0101, 70, 10_000],
  ])("at %f px a millimetre a scale of at least %i px is %i mm", (scale, pixels, length) => {
    expect(roundLength(scale, pixels)).toBeCloseTo(length, 6);
  });
});

describe("a place that is pointed at", () => {
  const size = { width: 1000, height: 500 };

  it("comes to the middle, near enough to see half a metre around it, and no farther than it was", () => {
    const far = viewAt({ scale: 0.1, x: 7, y: 9 }, [1200, 300], size);
    expect(far.scale).toBe(1);
    expect(toScreen(far, [1200, 300])).toEqual([500, 250]);
    const near = viewAt({ scale: 8, x: 0, y: 0 }, [1200, 300], size);
    expect(near.scale).toBe(8);
    expect(toScreen(near, [1200, 300])).toEqual([500, 250]);
  });
});

describe("measuring", () => {
  const snaps = [0, 0, 420, 0, 420, 620];

  it("holds on to the nearest end within twelve pixels", () => {
    expect(heldPoint(snaps, [415, 6], 1)).toEqual({ at: [420, 0], exact: true });
    expect(heldPoint(snaps, [400, 20], 1)).toEqual({ at: [400, 20], exact: false });
    expect(heldPoint(snaps, [400, 20], 0.4)).toEqual({ at: [420, 0], exact: true });
  });

  it("says a distance in both units, and says about where a point was free", () => {
    const from = { at: [0, 0], exact: true } as const;
    // 420 / 25.4 = 16.535 in; 16 17/32 = 16.531 in is the nearest 1/64.
    expect(measuredWords(from, { at: [420, 0], exact: true }, "mm")).toBe("420.00 mm · 16 17/32 in");
    expect(measuredWords(from, { at: [420, 0], exact: false }, "in")).toBe(
      "about 16.535 in (16 17/32) · 420.00 mm",
    );
  });
});
