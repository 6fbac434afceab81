import makerjs from "makerjs";
import { describe, expect, it } from "vitest";
import { boxHeight, boxWidth, pathBox } from "~/domain/geometry";
import { read, totalLength } from "./dxf-text";

const { models, paths, model, measure, exporter } = makerjs;

/** Shapes drawn and exported by another library, which also says how long and how large they are. */
const shapes: Record<string, makerjs.IModel> = {
  rectangle: new models.Rectangle(600, 400),
  "rounded rectangle": new models.RoundRectangle(100, 50, 10),
  slot: new models.Slot([0, 0], [80, 30], 6),
  "ring of holes": new models.BoltCircle(40, 3, 12),
  "dogbone mortise": new models.Dogbone(90, 18, 3),
  "oval grid": new models.OvalArc(120, 40, 10, 3),
  star: new models.Star(7, 50, 20),
  "rounded polygon": new models.Polygon(8, 30, 12),
  "turned and moved": model.move(model.rotate(new models.RoundRectangle(200, 80, 15), 33), [-400, 250]),
  mirrored: model.mirror(new models.Slot([0, 0], [80, 30], 6), true, false),
  scaled: model.scale(new models.Dogbone(9, 4, 0.5), 25.4),
  "circle and stroke": {
    paths: {
      ring: new paths.Circle([10, 10], 17.5),
      stroke: new paths.Line([0, 0], [3, 4]),
      bow: new paths.Arc([5, 5], 8, 300, 45),
    },
  },
};

describe("lengths and sizes against makerjs", () => {
  it.each(Object.entries(shapes))("agree for a %s", (_, shape) => {
    let expected = 0;
    let count = 0;
    model.walk(shape, {
      onPath: ({ pathContext }) => {
        expected += measure.pathLength(pathContext);
        count++;
      },
    });
    const extents = measure.modelExtents(shape);
    const drawing = read(exporter.toDXF(shape, { units: makerjs.unitType.Millimeter }));
    expect(drawing.declared).toBe("mm");
    expect(drawing.notes).toEqual([]);
    expect(drawing.paths).toHaveLength(count);
    // makerjs finds where arcs meet lines to about 1e-7, and exports what it found.
    expect(totalLength(drawing)).toBeCloseTo(expected, 6);
    const boxes = drawing.paths.map(({ path }) => pathBox(path));
    const [minX, maxX] = [Math.min(...boxes.map((b) => b.minX)), Math.max(...boxes.map((b) => b.maxX))];
    const [minY, maxY] = [Math.min(...boxes.map((b) => b.minY)), Math.max(...boxes.map((b) => b.maxY))];
    const box = { minX, minY, maxX, maxY };
    expect(boxWidth(box)).toBeCloseTo(extents?.width ?? Number.NaN, 6);
    expect(boxHeight(box)).toBeCloseTo(extents?.height ?? Number.NaN, 6);
  });

  it("agree in inches and for exported polylines", () => {
    const shape = new models.RoundRectangle(10, 5, 1);
    const drawing = read(exporter.toDXF(shape, { units: makerjs.unitType.Inch, usePOLYLINE: true }));
    expect(drawing.declared).toBe("in");
    expect(drawing.entities).toEqual({ POLYLINE: 1 });
    // 2·(8 + 3) + 2π.
    expect(totalLength(drawing)).toBeCloseTo(22 + 2 * Math.PI, 6);
  });
});
