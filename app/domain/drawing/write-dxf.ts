import { boxIsEmpty, boxUnion, EMPTY_BOX, type Path, pathBox } from "../geometry";
import type { LengthUnit } from "../units";
import { DxfLines, escapeText } from "./dxf-lines";
import { codeOfUnit } from "./units-code";
import { type DxfVersion, EntityWriter } from "./write-entities";
import { writeBlocks, writeObjects, writeTables } from "./write-tables";

/** A path and the layer it goes on. */
export interface LayeredPath {
  readonly path: Path;
  readonly layer: string;
}

/** Layer names of R12: 31 letters, digits, `$`, `-` and `_` (DXF Reference, symbol table names). */
const R12_LAYER = /^[A-Za-z0-9$_-]{1,31}$/;
/** Characters that no layer name may have. */
const NEVER_IN_LAYERS = /[<>/\\":;?*|=`]/g;

/** R12 is read by everything; ellipses, splines and free layer names need R2000. */
function versionFor(paths: readonly LayeredPath[]): DxfVersion {
  const isOld = ({ path, layer }: LayeredPath) =>
    R12_LAYER.test(layer) && path.curves.every(({ kind }) => kind === "line" || kind === "arc");
  return paths.every(isOld) ? "R12" : "R2000";
}

const layerName = (name: string): string => escapeText(name.replace(NEVER_IN_LAYERS, "_")).trim() || "0";

/**
 * DXF text of the paths, whose coordinates are in `unit`: in the R12 form where that can hold them, else in the 2000
 * form. Read again it gives the same curves, but that arcs over a half turn within an outline come in two.
 */
export function writeDxf(paths: readonly LayeredPath[], unit: LengthUnit): string {
  const version = versionFor(paths);
  const body = new DxfLines();
  const owners = writeTables(
    body,
    version,
    paths.map(({ layer }) => layerName(layer)),
  );
  writeBlocks(body, version, owners);
  body.text(0, "SECTION");
  body.text(2, "ENTITIES");
  const entities = new EntityWriter(body, version, owners.model);
  for (const { path, layer } of paths) entities.path(path, layerName(layer));
  body.text(0, "ENDSEC");
  if (version === "R2000") writeObjects(body);
  body.text(0, "EOF");
  return `${headerOf(paths, unit, version, body.newHandle())}${body}`;
}

function headerOf(
  paths: readonly LayeredPath[],
  unit: LengthUnit,
  version: DxfVersion,
  nextHandle: string,
): string {
  const header = new DxfLines();
  header.text(0, "SECTION");
  header.text(2, "HEADER");
  header.text(9, "$ACADVER");
  header.text(1, version === "R12" ? "AC1009" : "AC1015");
  header.text(9, "$INSUNITS");
  header.integer(70, codeOfUnit(unit));
  if (version === "R2000") {
    header.text(9, "$DWGCODEPAGE");
    header.text(3, "ANSI_1252");
    header.text(9, "$HANDSEED");
    header.text(5, nextHandle);
  }
  const box = paths.reduce((all, { path }) => boxUnion(all, pathBox(path)), EMPTY_BOX);
  if (!boxIsEmpty(box)) {
    header.text(9, "$EXTMIN");
    header.point(10, { x: box.minX, y: box.minY });
    header.text(9, "$EXTMAX");
    header.point(10, { x: box.maxX, y: box.maxY });
  }
  header.text(0, "ENDSEC");
  return header.toString();
}
