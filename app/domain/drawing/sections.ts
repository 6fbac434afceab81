import { firstInteger, firstValue, type GroupRecord, type RecordScan, scanRecords } from "./groups";
import type { RawEntity } from "./normal-entity";
import { readNumber } from "./numbers";
import { unescapeCharacters } from "./strings";

/** Header variables the reader needs. */
export interface DxfHeader {
  /** The `$INSUNITS` code. */
  readonly units: number | null;
}

/** A layer is hidden when it is off (negative colour, code 62) or frozen (code 70, bit 1). */
export interface DxfLayer {
  readonly name: string;
  readonly off: boolean;
  readonly frozen: boolean;
}

export interface DxfBlock<Item> {
  readonly name: string;
  readonly base: { readonly x: number; readonly y: number };
  readonly entities: readonly Item[];
}

/** A file taken apart into sections, each entity as what `take` made of it. */
export interface DxfSections<Item> {
  readonly header: DxfHeader;
  readonly layers: readonly DxfLayer[];
  readonly blocks: readonly DxfBlock<Item>[];
  readonly entities: readonly Item[];
  /** Whether an ENTITIES section was met, and whether the file goes on past its end. */
  readonly hasEntities: boolean;
  readonly entitiesClosed: boolean;
  readonly scan: Readonly<RecordScan>;
}

const OWNER_OF_MEMBER: ReadonlyMap<string, string> = new Map([
  ["VERTEX", "POLYLINE"],
  ["ATTRIB", "INSERT"],
]);

function readHeader(record: GroupRecord): DxfHeader {
  const variables = new Map<string, string>();
  let name: string | null = null;
  for (const { code, value } of record.groups) {
    if (code === 9) name = value;
    else if (name !== null && !variables.has(name)) variables.set(name, value);
  }
  const units = Number(variables.get("$INSUNITS") ?? Number.NaN);
  return { units: Number.isInteger(units) ? units : null };
}

function readLayer(record: GroupRecord): DxfLayer {
  return {
    name: unescapeCharacters(firstValue(record, 2) ?? ""),
    off: firstInteger(record, 62, 7) < 0,
    frozen: (firstInteger(record, 70, 0) & 1) === 1,
  };
}

function readBlockHead(record: GroupRecord): Omit<DxfBlock<never>, "entities"> {
  const coordinate = (code: number) => readNumber(firstValue(record, code) ?? "0") ?? 0;
  return { name: firstValue(record, 2) ?? "", base: { x: coordinate(10), y: coordinate(20) } };
}

/**
 * Sorts a file's records into sections. Missing ENDSEC, ENDTAB, ENDBLK and SEQEND are taken as meant: each new section or
 * block closes the one before, and a member belongs to the last owner of its kind if nothing came between.
 * `take` is called once per entity, in the file's order; `isCut` says that the file ends within it.
 */
export function readSections<Item>(
  text: string,
  take: (entity: RawEntity, isCut: boolean) => Item,
): DxfSections<Item> {
  const scan: RecordScan = { strayLines: 0, ended: false };
  let header: DxfHeader = { units: null };
  const layers: DxfLayer[] = [];
  const blocks: (DxfBlock<Item> & { entities: Item[] })[] = [];
  const entities: Item[] = [];
  let hasEntities = false;
  let entitiesClosed = false;
  let section = "";
  let block: (typeof blocks)[number] | null = null;
  let owner: { record: GroupRecord; members: GroupRecord[]; into: Item[] } | null = null;

  const finishOwner = (isCut: boolean) => {
    if (owner)
      owner.into.push(
        take({ type: owner.record.type, groups: owner.record.groups, members: owner.members }, isCut),
      );
    owner = null;
  };

  for (const record of scanRecords(text, scan)) {
    const { type } = record;
    const ownerType = OWNER_OF_MEMBER.get(type);
    if (owner !== null && ownerType === owner.record.type) {
      owner.members.push(record);
      continue;
    }
    finishOwner(false);
    if (type === "SECTION") {
      section = firstValue(record, 2) ?? "";
      block = null;
      if (section === "HEADER") header = readHeader(record);
      if (section === "ENTITIES") hasEntities = true;
      else if (hasEntities) entitiesClosed = true;
    } else if (type === "ENDSEC") {
      if (section === "ENTITIES") entitiesClosed = true;
      section = "";
      block = null;
    } else if (section === "TABLES" && type === "LAYER") {
      layers.push(readLayer(record));
    } else if (section === "BLOCKS" && type === "BLOCK") {
      block = { ...readBlockHead(record), entities: [] };
      blocks.push(block);
    } else if (section === "BLOCKS" && type === "ENDBLK") {
      block = null;
    } else if ((section === "ENTITIES" || block !== null) && type !== "SEQEND") {
      owner = { record, members: [], into: block?.entities ?? entities };
    }
  }
  finishOwner(!scan.ended);
  return { header, layers, blocks, entities, hasEntities, entitiesClosed, scan };
}
