import type { IgnoredReason } from "./drawing";
import { firstInteger, firstValue, type Group, type GroupRecord } from "./groups";
import { readNumber } from "./numbers";
import { unescapeCharacters } from "./strings";

/** An entity as the file has it, with the records that belong to it: vertices of a POLYLINE, attributes of an INSERT. */
export interface RawEntity {
  readonly type: string;
  readonly groups: readonly Group[];
  readonly members: readonly GroupRecord[];
}

/** An entity brought into an order and spelling that the parser takes: lines of DXF, or why there are none. */
export interface NormalEntity {
  readonly type: string;
  readonly layer: string;
  readonly paperSpace: boolean;
  readonly invisible: boolean;
  /** Name of the block an INSERT places. */
  readonly block: string | null;
  readonly body: { readonly lines: readonly string[] } | { readonly why: IgnoredReason };
  /** Numbers were rewritten (decimal comma, exponent letter D). */
  readonly mended: boolean;
  /** Kept for texts only: everything else is in the body. */
  readonly raw: RawEntity | null;
}

/** The codes a reader needs of each type, and those that must be there (DXF Reference, ENTITIES section). */
interface EntityForm {
  readonly required: readonly number[];
  readonly wanted: ReadonlySet<number>;
}

const EXTRUSION = [210, 220, 230];
const form = (required: readonly number[], optional: readonly number[]): EntityForm => ({
  required,
  wanted: new Set([...required, ...optional]),
});

const FORMS: ReadonlyMap<string, EntityForm> = new Map([
  ["LINE", form([10, 20, 11, 21], [30, 31])],
  ["CIRCLE", form([10, 20, 40], EXTRUSION)],
  ["ARC", form([10, 20, 40, 50, 51], EXTRUSION)],
  ["ELLIPSE", form([10, 20, 11, 21, 40], [31, 41, 42, ...EXTRUSION])],
  ["LWPOLYLINE", form([10, 20], [42, ...EXTRUSION])],
  ["POLYLINE", form([], EXTRUSION)],
  ["SPLINE", form([71], [70, 40, 41, 10, 20, 30, 11, 21, 31, 12, 22, 13, 23])],
  ["INSERT", form([10, 20], [41, 42, 50, 70, 71, 44, 45, ...EXTRUSION])],
]);
const VERTEX = form([10, 20], [30, 42]);

/** Types read as curves, or expanded into them. */
export const READABLE_TYPES: readonly string[] = [...FORMS.keys()];

/** TEXT-like types whose strings are kept. */
export const TEXT_TYPES: ReadonlySet<string> = new Set(["TEXT", "MTEXT", "ATTRIB"]);

/** Groups from here on are another object's (embedded, from the 2018 format on) or a program's own data. */
const endsOwnGroups = (code: number): boolean => code === 101 || code >= 1000;

/** Bits of POLYLINE and VERTEX code 70. */
const CLOSED = 1;
const MESH = 16 | 64;
const FRAME_VERTEX = 16;

/** Collects checked lines; a number that is none makes the whole entity damaged. */
class Body {
  readonly lines: string[] = [];
  damaged = false;
  mended = false;

  push(code: number, text: string): void {
    const number = readNumber(text);
    if (number === null) {
      this.damaged = true;
      return;
    }
    if (number.mended) this.mended = true;
    this.lines.push(String(code), number.mended ? String(number.value) : text);
  }

  /** Every wanted group, in the file's order. False where a required one is missing. */
  pushWanted(groups: readonly Group[], { required, wanted }: EntityForm): boolean {
    const seen = new Set<number>();
    for (const { code, value } of groups) {
      if (endsOwnGroups(code)) break;
      if (!wanted.has(code)) continue;
      seen.add(code);
      this.push(code, value);
    }
    return required.every((code) => seen.has(code));
  }
}

/** Vertices with every bulge in step: missing bulges before a given one are written as zero. */
function pushLightVertices(body: Body, entity: RawEntity, isCut: boolean): boolean {
  const counts = { x: 0, y: 0, bulge: 0 };
  for (const { code, value } of entity.groups) {
    if (endsOwnGroups(code)) break;
    if (code === 10) counts.x++;
    else if (code === 20) counts.y++;
    else if (code === 42) {
      const vertex = Math.max(counts.x, counts.y) - 1;
      if (vertex < counts.bulge) continue;
      for (; counts.bulge < vertex; counts.bulge++) body.push(42, "0");
      counts.bulge++;
    } else if (!EXTRUSION.includes(code)) continue;
    body.push(code, value);
  }
  if (isCut && counts.x === counts.y + 1) body.lines.splice(-2);
  else if (counts.x !== counts.y) return false;
  return counts.y > 0;
}

function pushOldVertices(body: Body, entity: RawEntity, isCut: boolean): boolean {
  body.pushWanted(entity.groups, FORMS.get("POLYLINE") ?? VERTEX);
  let vertices = 0;
  let bulges = 0;
  for (const [index, member] of entity.members.entries()) {
    if ((firstInteger(member, 70, 0) & FRAME_VERTEX) !== 0) continue;
    const isLast = index === entity.members.length - 1;
    if (isCut && isLast && !VERTEX.required.every((code) => firstValue(member, code) !== null)) break;
    if (firstValue(member, 42) !== null) {
      for (; bulges < vertices; bulges++) body.push(42, "0");
      bulges++;
    }
    if (!body.pushWanted(member.groups, VERTEX)) return false;
    vertices++;
  }
  return vertices > 0;
}

function normalBody(entity: RawEntity, isCut: boolean): { body: NormalEntity["body"]; mended: boolean } {
  const wanted = FORMS.get(entity.type);
  if (!wanted) return { body: { why: "not-a-curve" }, mended: false };
  const body = new Body();
  const isPolyline = entity.type === "LWPOLYLINE" || entity.type === "POLYLINE";
  if (isPolyline) {
    const flags = firstInteger(entity, 70, 0);
    if (entity.type === "POLYLINE" && (flags & MESH) !== 0) {
      return { body: { why: "three-dimensional" }, mended: false };
    }
    // The end of a polyline that is cut short is not known to meet its start.
    body.push(70, String(isCut ? flags & ~CLOSED : flags & CLOSED));
  }
  const isWhole = isPolyline
    ? (entity.type === "POLYLINE" ? pushOldVertices : pushLightVertices)(body, entity, isCut)
    : body.pushWanted(entity.groups, wanted);
  if (!isWhole || body.damaged) return { body: { why: "damaged" }, mended: false };
  return { body: { lines: body.lines }, mended: body.mended };
}

/** `isCut`: the file ends within this entity. */
export function normaliseEntity(entity: RawEntity, isCut: boolean): NormalEntity {
  const { body, mended } = normalBody(entity, isCut);
  const layer = firstValue(entity, 8) ?? "";
  return {
    type: entity.type,
    layer: layer === "" ? "0" : unescapeCharacters(layer),
    paperSpace: firstInteger(entity, 67, 0) === 1,
    invisible: firstInteger(entity, 60, 0) === 1,
    block: entity.type === "INSERT" ? firstValue(entity, 2) : null,
    body,
    mended,
    raw: TEXT_TYPES.has(entity.type) || entity.members.some(({ type }) => type === "ATTRIB") ? entity : null,
  };
}
