import {
  type Affine,
  affineCompose,
  affineMove,
  affineRotation,
  type Box,
  boxHeight,
  boxIsEmpty,
  boxUnion,
  boxWidth,
  EMPTY_BOX,
  endOf,
  type Path,
  pathBox,
  startOf,
  transformPath,
} from "~/domain/geometry";
import type { Copy, Depth, Feature, Part, PartsReport } from "~/domain/parts";
import { formatMillimetres } from "~/domain/units";
import { clearSpot } from "./clear-spot";
import { pathToSvg } from "./svg-path";
import type {
  Spot,
  ViewCopy,
  ViewGeometry,
  ViewOutline,
  ViewPart,
  ViewSetAside,
  ViewWords,
} from "./view-geometry";

/** A reading as the viewer shows it. All of it is plain JSON, so a loader can return it. */
export function viewGeometryOf(report: PartsReport): ViewGeometry {
  const byExtent = [...report.parts].sort((one, other) => areaOf(other.box) - areaOf(one.box));
  const parts = byExtent.map(viewPartOf);
  const openPaths = report.open.map((chain): Path => ({ curves: chain.curves, closed: false }));
  const setAside = report.setAside.filter((group) => group.paths.length > 0);
  const extents = unionOf([...parts.map((part) => part.box), ...openPaths.map(pathBox)]);
  const asideBoxes = setAside.flatMap((group) => group.paths.map(pathBox));
  return {
    parts,
    open: { d: mergedPath(openPaths), ends: openPaths.flatMap(endsOf) },
    setAside: setAside.map(
      (group): ViewSetAside => ({ what: `${group.what} on ${group.layer}`, d: mergedPath(group.paths) }),
    ),
    extents: orNull(extents),
    fullExtents: orNull(boxUnion(extents, unionOf(asideBoxes))),
    snaps: [...snapsOf(report.parts), ...openPaths.flatMap(endsOf).flat()],
    totals: {
      parts: report.totals.parts,
      kinds: report.totals.distinctParts,
      cutLength: report.totals.cutLength,
    },
  };
}

/** What a list shows of a part: its outline with its openings, standing as first drawn. */
export function silhouetteOf(part: Part): { readonly d: string; readonly box: Box } {
  const openings = part.features.filter((feature) => isOpening(feature)).map((feature) => feature.path);
  return { d: mergedPath([part.outer, ...openings]), box: part.box };
}

const areaOf = (box: Box): number => boxWidth(box) * boxHeight(box);
const unionOf = (boxes: readonly Box[]): Box => boxes.reduce(boxUnion, EMPTY_BOX);
const orNull = (box: Box): Box | null => (boxIsEmpty(box) ? null : box);
const mergedPath = (paths: readonly Path[]): string => paths.map((path) => pathToSvg(path)).join("");
const isOpening = (feature: Feature): boolean =>
  feature.depth === null && (feature.kind === "cut-through" || feature.kind === "drill");

/** The motion that carries a part's first copy onto this one. */
const motionOf = (copy: Copy): Affine =>
  affineCompose(affineMove(copy.move), affineRotation((copy.turnDegrees * Math.PI) / 180));

function viewPartOf(part: Part): ViewPart {
  const motions = part.copies.map(motionOf);
  const spread = (path: Path): Path[] => motions.map((motion) => transformPath(path, motion));
  const copies = part.copies.map((copy, index): ViewCopy => {
    const outer = transformPath(part.outer, motions[index]);
    const taken = part.features.map((feature) => pathBox(transformPath(feature.path, motions[index])));
    const counted = index === 0 && part.quantity > 1;
    return {
      label: counted ? `${part.id} ×${part.quantity}` : part.id,
      labelAt: clearSpot(outer, taken, copy.at),
      box: pathBox(outer),
    };
  });
  return {
    id: part.id,
    name: part.name,
    quantity: part.quantity,
    size: { width: boxWidth(part.box), height: boxHeight(part.box) },
    outlines: [{ kind: "outside", d: mergedPath(spread(part.outer)) }, ...featureOutlines(part, spread)],
    words: part.features.flatMap((feature) => wordsOf(feature, spread)),
    circles: part.features.flatMap((feature) => circlesOf(feature, spread)),
    copies,
    box: unionOf(copies.map((copy) => copy.box)),
  };
}

/** Features merged by kind and depth, in the order they are met. */
function featureOutlines(part: Part, spread: (path: Path) => Path[]): ViewOutline[] {
  const merged = new Map<string, { kind: Feature["kind"]; depthLabel?: string; d: string[] }>();
  for (const feature of part.features) {
    const depthLabel = depthWords(feature.depth);
    const key = `${feature.kind} ${depthLabel ?? ""}`;
    const outline = merged.get(key) ?? { kind: feature.kind, depthLabel, d: [] };
    outline.d.push(mergedPath(spread(feature.path)));
    merged.set(key, outline);
  }
  return [...merged.values()].map(({ kind, depthLabel, d }) => ({
    kind,
    d: d.join(""),
    ...(depthLabel === undefined ? {} : { depthLabel }),
  }));
}

/** `6.35 deep` from the top face, `leave 6.35` above the bottom face. */
function depthWords(depth: Depth): string | undefined {
  if (depth === null) return undefined;
  return "depth" in depth
    ? `${formatMillimetres(depth.depth, 2)} deep`
    : `leave ${formatMillimetres(depth.leave, 2)}`;
}

function wordsOf(feature: Feature, spread: (path: Path) => Path[]): ViewWords[] {
  const text = depthWords(feature.depth);
  if (feature.kind !== "pocket" || text === undefined) return [];
  return spread(feature.path).map((path) => {
    const box = pathBox(path);
    return { text, at: middleOf(box), room: boxWidth(box) };
  });
}

function circlesOf(feature: Feature, spread: (path: Path) => Path[]): [number, number, number][] {
  const { diameter } = feature;
  if (diameter === null) return [];
  return spread(feature.path).map((path) => [...middleOf(pathBox(path)), diameter / 2]);
}

const middleOf = (box: Box): [number, number] => [(box.minX + box.maxX) / 2, (box.minY + box.maxY) / 2];

function endsOf(path: Path): Spot[] {
  const first = path.curves[0];
  const last = path.curves.at(-1);
  if (!first || !last) return [];
  return [startOf(first), endOf(last)].map((point): Spot => [point.x, point.y]);
}

function snapsOf(parts: readonly Part[]): number[] {
  return parts.flatMap((part) =>
    part.copies.flatMap((copy) => {
      const motion = motionOf(copy);
      return [part.outer, ...part.features.map((feature) => feature.path)].flatMap((path) =>
        transformPath(path, motion).curves.flatMap((curve) => {
          const start = startOf(curve);
          const centre =
            curve.kind === "arc" || curve.kind === "ellipse" ? [curve.centre.x, curve.centre.y] : [];
          return [start.x, start.y, ...centre];
        }),
      );
    }),
  );
}
