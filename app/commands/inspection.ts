import type { Drawing } from "~/domain/drawing";
import { checkFit, type Finding } from "~/domain/fit";
import type { Point } from "~/domain/geometry";
import { type Feature, type Part, type PartsReport, unitQuestion } from "~/domain/parts";
import type { LengthUnit } from "~/domain/units";
import type { Thickness } from "./inspect-arguments";

/** Stock and tool that findings are checked against where the command line says nothing of them, millimetres. */
const ASSUMED_SHEET = { width: 2440, height: 1220 };
const ASSUMED_MARGIN = 6;
const ASSUMED_TOOL = 3.175;

interface Inspected {
  readonly drawing: Drawing;
  readonly report: PartsReport;
  readonly used: LengthUnit;
  readonly told: boolean;
  readonly thickness: Thickness | null;
}

/** The document that `inspect` prints: lengths in millimetres, areas in square millimetres. */
export function inspectionOf({ drawing, report, used, told, thickness }: Inspected) {
  const { drawn, totals } = report;
  return {
    units: { declared: drawing.declared, used, ...unitsAnswer(drawing, report, used, told) },
    entities: drawing.entities,
    ignored: drawing.ignored,
    drawn: {
      curves: drawn.curves,
      lengthMm: drawn.length,
      uniqueLengthMm: drawn.uniqueLength,
      hiddenLengthMm: drawn.hiddenLength,
      loops: drawn.loops,
      depths: drawn.depths,
      openChains: drawn.openChains,
      branches: drawn.branches,
      extentsMm: drawn.extents && [
        drawn.extents.minX,
        drawn.extents.minY,
        drawn.extents.maxX,
        drawn.extents.maxY,
      ],
    },
    setAside: report.setAside.map(({ what, layer, count }) => ({ what, layer, count })),
    parts: report.parts.map(partOf),
    open: report.open.map(({ layer, length, gap, at }) => ({
      layer,
      lengthMm: length,
      gapMm: gap,
      at: pair(at),
    })),
    bridges: report.bridges.map(({ layer, gap, at, asked }) => ({ layer, gapMm: gap, asked, at: pair(at) })),
    duplicates: report.duplicates,
    overlaps: report.overlaps.map(({ layer, length, at }) => ({ layer, lengthMm: length, at: pair(at) })),
    crossings: report.crossings.map(({ at, ...crossing }) => ({ ...crossing, at: pair(at) })),
    nearEqual: report.nearEqual.map(({ one, other, difference }) => ({
      one,
      other,
      differenceMm: difference,
    })),
    totals: {
      parts: totals.parts,
      distinctParts: totals.distinctParts,
      holes: totals.holes,
      cutLengthMm: totals.cutLength,
      areaMm2: totals.area,
      boundingBoxMm: [totals.box.width, totals.box.height],
    },
    ...(thickness && { findings: findingsOf(report, thickness) }),
  };
}

const pair = ({ x, y }: Point): [number, number] => [x, y];

function unitsAnswer({ declared }: Drawing, report: PartsReport, used: LengthUnit, told: boolean) {
  if (told) return { how: "told", question: null };
  const asked = unitQuestion(report, { declared, used });
  return {
    how: declared === null ? "assumed" : "declared",
    question: asked?.words ?? null,
    readings: asked?.readings.map(({ unit, longest, smallest, plausible }) => ({
      unit,
      longestMm: longest,
      smallestMm: smallest,
      plausible,
    })),
  };
}

function partOf(part: Part) {
  return {
    id: part.id,
    name: part.name,
    quantity: part.quantity,
    mirrorOf: part.mirrorOf,
    layer: part.layer,
    outerLengthMm: part.outerLength,
    innerLengthMm: part.innerLength,
    areaMm2: part.area,
    boundingBoxMm: [part.box.maxX - part.box.minX, part.box.maxY - part.box.minY],
    smallestRectMm: [part.smallestRect.long, part.smallestRect.short],
    holes: part.holes,
    operations: operationsOf(part),
    copies: part.copies.map(({ at, turnDegrees, move }, i) => ({
      copy: i + 1,
      at: pair(at),
      turnDegrees,
      moveMm: pair(move),
    })),
  };
}

/** Features of one kind and depth together, the outline first. */
function operationsOf({ outerLength, features }: Part) {
  const outside = { kind: "outside", depthMm: null, count: 1, lengthMm: outerLength };
  const byKind = new Map<
    string,
    { kind: Feature["kind"]; depth: Feature["depth"]; count: number; length: number }
  >();
  for (const { kind, depth, length } of features) {
    const key = `${kind} ${JSON.stringify(depth)}`;
    const held = byKind.get(key) ?? { kind, depth, count: 0, length: 0 };
    byKind.set(key, { ...held, count: held.count + 1, length: held.length + length });
  }
  const inside = [...byKind.values()].map(({ kind, depth, count, length }) => ({
    kind,
    ...(depth !== null && "leave" in depth ? { leaveMm: depth.leave } : { depthMm: depth?.depth ?? null }),
    count,
    lengthMm: length,
  }));
  return [outside, ...inside];
}

function findingsOf(report: PartsReport, thickness: Thickness) {
  const found = checkFit({
    report,
    stock: { thickness, sheet: ASSUMED_SHEET, margin: ASSUMED_MARGIN },
    tools: { smallestDiameter: ASSUMED_TOOL },
  });
  return found.map(({ at, remedy, ...finding }: Finding) => ({ ...finding, at: at && pair(at) }));
}
