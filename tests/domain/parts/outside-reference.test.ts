import makerjs from "makerjs";
import { describe, expect, it } from "vitest";
import type { DrawnPath } from "~/domain/drawing";
import type { Curve } from "~/domain/geometry";
import { findParts } from "~/domain/parts";
import { drawingOf, drawn } from "./drawn";

const RADIANS = Math.PI / 180;

/** Lines, arcs and circles of a makerjs model, each a path of its own, as its DXF export writes them. */
function pathsOf(model: makerjs.IModel): DrawnPath[] {
  const found: DrawnPath[] = [];
  makerjs.model.walk(model, {
    onPath: ({ pathContext, offset }) => {
      const curve = curveOf(pathContext, offset);
      if (curve) found.push(drawn({ closed: pathContext.type === "circle", curves: [curve] }));
    },
  });
  return found;
}

function curveOf(path: makerjs.IPath, offset: makerjs.IPoint): Curve | null {
  const at = (point: makerjs.IPoint) => ({ x: point[0] + offset[0], y: point[1] + offset[1] });
  switch (path.type) {
    case "line":
      return { kind: "line", from: at(path.origin), to: at((path as makerjs.IPathLine).end) };
    case "arc": {
      const arc = path as makerjs.IPathArc;
      const sweep = makerjs.angle.ofArcSpan(arc) * RADIANS;
      return {
        kind: "arc",
        centre: at(arc.origin),
        radius: arc.radius,
        start: arc.startAngle * RADIANS,
        sweep,
      };
    }
    case "circle": {
      const { origin, radius } = path as makerjs.IPathCircle;
      return { kind: "arc", centre: at(origin), radius, start: 0, sweep: 2 * Math.PI };
    }
    default:
      return null;
  }
}

/** Length of all lines and arcs by makerjs 0.19.2. */
function lengthByMaker(model: makerjs.IModel): number {
  let length = 0;
  makerjs.model.walk(model, {
    onPath: ({ pathContext }) => {
      length += makerjs.measure.pathLength(pathContext);
    },
  });
  return length;
}

const models: Record<string, makerjs.IModel> = {
  "rounded rectangle": new makerjs.models.RoundRectangle(300, 200, 25),
  slot: new makerjs.models.Slot([0, 0], [120, 40], 12),
  "oval arc": new makerjs.models.OvalArc(20, 160, 80, 12),
  polygon: new makerjs.models.Polygon(7, 60, 10),
  dome: new makerjs.models.Dome(120, 80, 20),
  star: new makerjs.models.Star(9, 80, 40),
  belt: new makerjs.models.Belt(30, 120, 50),
};

describe("lengths by makerjs 0.19.2, a reader and measurer of its own", () => {
  it.each(Object.entries(models))("%s", (_name, model) => {
    const report = findParts(drawingOf(pathsOf(model)), { layers: [] });
    const length = lengthByMaker(model);
    const [part] = report.parts;
    expect(report.totals.parts).toBe(1);
    expect(part.outerLength + part.innerLength).toBeCloseTo(length, 6);
    expect(report.totals.cutLength).toBeCloseTo(length, 6);
    expect(report.drawn.openChains).toBe(0);
    const extents = makerjs.measure.modelExtents(model);
    expect(report.totals.box.width).toBeCloseTo(extents?.width ?? 0, 6);
    expect(report.totals.box.height).toBeCloseTo(extents?.height ?? 0, 6);
  });

  it("a panel with bolt holes keeps its parts apart", () => {
    const panel: makerjs.IModel = {
      models: {
        outline: new makerjs.models.RoundRectangle(400, 250, 15),
        bolts: makerjs.model.move(new makerjs.models.BoltRectangle(340, 190, 4.2), [30, 30]),
      },
    };
    const twin = makerjs.model.move(makerjs.model.rotate(makerjs.cloneObject(panel), 31), [900, 0]);
    const report = findParts(drawingOf([...pathsOf(panel), ...pathsOf(twin)]), { layers: [] });
    expect(report.parts).toMatchObject([{ quantity: 2, holes: 4 }]);
    expect(report.totals.cutLength).toBeCloseTo(lengthByMaker(panel) + lengthByMaker(twin), 6);
  });
});
