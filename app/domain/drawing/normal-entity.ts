import type { IgnoredReason } from "./drawing";
import { firstInteger, firstValue, type Group, type GroupRecord } from "./groups";
import { isPlainNumber, readNumber } from "./numbers";
import { unescapeCharacters } from "./strings";

/** An entity as the file has it, with the records that belong to it: vertices of a POLYLINE, attributes of an INSERT. */
export interface RawEntity {
  readonly type: string;
  readonly groups: readonly Group[];
  readonly members: readonly GroupRecord[];
}

/** What is kept of an entity beside its curves. */
export interface NormalEntity {
  readonly type: string;
  readonly layer: string;
  readonly paperSpace: boolean;
  readonly invisible: boolean;
  /** Name of the block an INSERT places. */
  readonly block: string | null;
  /** Numbers were rewritten (decimal comma, exponent letter D). */
  readonly mended: boolean;
  /** Kept for texts only. */
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

const POLYLINE_HEAD = form([], EXTRUSION);

const FORMS: ReadonlyMap<string, EntityForm> = new Map([
  ["LINE", form([10, 20, 11, 21], [30, 31])],
  ["CIRCLE", form([10, 20, 40], EXTRUSION)],
  ["ARC", form([10, 20, 40, 50, 51], EXTRUSION)],
  ["ELLIPSE", form([10, 20, 11, 21, 40], [31, 41, 42, ...EXTRUSION])],
  ["LWPOLYLINE", form([10, 20], [42, ...EXTRUSION])],
  ["POLYLINE", POLYLINE_HEAD],
  ["SPLINE", form([71], [70, 40, 41, 10, 20, 30, 11, 21, 31, 12, 22, 13, 23])],
  ["INSERT", form([10, 20], [41, 42, 50, 70, 71, 44, 45, ...EXTRUSION])],
]);
const VERTEX = form([10, 20], [30, 42]);

/** TEXT-like types whose strings are kept. */
export const TEXT_TYPES: ReadonlySet<string> = new Set(["TEXT", "MTEXT", "ATTRIB"]);

/** Groups from here on are another object's (embedded, from the 2018 format on) or a program's own data. */
const endsOwnGroups = (code: number): boolean => code === 101 || code >= 1000;

/** Heights, nearly always zero: those are left out, and an absent height is zero. */
const HEIGHTS: ReadonlySet<number> = new Set([30, 31]);

/** Bits of POLYLINE and VERTEX code 70. */
const CLOSED = 1;
const WORLD = 8;
const MESH = 16 | 64;
const FRAME_VERTEX = 16;

/** Writes checked lines; a number that is none makes the whole entity damaged. */
class Body {
  readonly lines: string[];
  damaged = false;
  mended = false;

  constructor(lines: string[]) {
    this.lines = lines;
  }

  push(code: number, text: string): void {
    if (isPlainNumber(text)) {
      this.lines.push(String(code), text);
      return;
    }
    const number = readNumber(text);
    if (number === null) this.damaged = true;
    else this.lines.push(String(code), String(number));
    this.mended = true;
  }

  /** Every wanted group, in the file's order. False where a required one is missing. */
  pushWanted(groups: readonly Group[], { required, wanted }: EntityForm): boolean {
    for (const { code, value } of groups) {
      if (endsOwnGroups(code)) break;
      if (wanted.has(code) && !(HEIGHTS.has(code) && Number(value) === 0)) this.push(code, value);
    }
    return required.every((code) => groups.some((group) => group.code === code));
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
  body.pushWanted(entity.groups, POLYLINE_HEAD);
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

/** Pushes the entity's groups; false where it is damaged. */
function pushBody(body: Body, entity: RawEntity, form: EntityForm, isCut: boolean): boolean {
  const isLight = entity.type === "LWPOLYLINE";
  if (!isLight && entity.type !== "POLYLINE") return body.pushWanted(entity.groups, form);
  // The end of a polyline that is cut short is not known to meet its start.
  const kept = (isLight ? 0 : WORLD) | (isCut ? 0 : CLOSED);
  body.push(70, String(firstInteger(entity, 70, 0) & kept));
  return isLight ? pushLightVertices(body, entity, isCut) : pushOldVertices(body, entity, isCut);
}

const isMesh = (entity: RawEntity): boolean =>
  entity.type === "POLYLINE" && (firstInteger(entity, 70, 0) & MESH) !== 0;

export interface Normalised {
  readonly entity: NormalEntity;
  /** Why nothing was pushed; null where the parser is to read the entity. */
  readonly why: IgnoredReason | null;
}

/**
 * Pushes the groups the reader needs of an entity on `lines`, in an order and spelling that the parser takes, after its
 * type and `ordinal`. `isCut` says that the file ends within the entity.
 */
export function normaliseEntity(
  raw: RawEntity,
  isCut: boolean,
  lines: string[],
  ordinal: number,
): Normalised {
  const form = FORMS.get(raw.type);
  const before = lines.length;
  const body = new Body(lines);
  let why: IgnoredReason | null = null;
  if (!form) why = "not-a-curve";
  else if (isMesh(raw)) why = "three-dimensional";
  else {
    lines.push("0", raw.type, "5", String(ordinal));
    if (!pushBody(body, raw, form, isCut) || body.damaged) why = "damaged";
  }
  if (why !== null) lines.length = before;
  const layer = firstValue(raw, 8) ?? "";
  const hasText = TEXT_TYPES.has(raw.type) || raw.members.some(({ type }) => type === "ATTRIB");
  const entity = {
    type: raw.type,
    layer: layer === "" ? "0" : unescapeCharacters(layer),
    paperSpace: firstInteger(raw, 67, 0) === 1,
    invisible: firstInteger(raw, 60, 0) === 1,
    block: raw.type === "INSERT" ? firstValue(raw, 2) : null,
    mended: why === null && body.mended,
    raw: hasText ? raw : null,
  };
  return { entity, why };
}
