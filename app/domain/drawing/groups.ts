/** One group: its code and its value as written, blanks at both ends dropped. */
export interface Group {
  readonly code: number;
  readonly value: string;
}

/** What starts with a code 0: its type and the groups up to the next code 0. */
export interface GroupRecord {
  readonly type: string;
  readonly groups: readonly Group[];
}

export interface RecordScan {
  /** Lines passed over because no group code stood where one must stand. */
  strayLines: number;
  /** Whether the end mark was met. */
  ended: boolean;
}

/** Group codes run from -5 to 1071 (DXF Reference, group codes in numerical order). */
const GROUP_CODE = /^-?\d{1,4}$/;
const HIGHEST_CODE = 1071;
const COMMENT = 999;
/** Names a record can have; anything else after a code 0 is damage. */
const RECORD_TYPE = /^\w*[A-Za-z]\w*$/;

/**
 * The records of a file up to its end mark, in one pass. Comments and blank lines between groups are dropped; where
 * code and value lines are out of step, lines are passed over until a code is met. A last line without a line break
 * in a file without an end mark may be half a number, so it is left out.
 */
export function* scanRecords(text: string, scan: RecordScan): Generator<GroupRecord> {
  const lines = text.split(/\r\n|\n|\r/);
  const lastLine = lines.length - 1;
  let type: string | null = null;
  let groups: Group[] = [];
  let at = 0;
  while (at < lastLine) {
    const codeText = lines[at].trim();
    const code = GROUP_CODE.test(codeText) ? Number(codeText) : Number.NaN;
    if (!(code <= HIGHEST_CODE)) {
      if (codeText !== "") scan.strayLines++;
      at++;
      continue;
    }
    const value = lines[at + 1].trim();
    const isCut = at + 1 === lastLine && value !== "EOF";
    at += 2;
    if (isCut) break;
    if (code === COMMENT) continue;
    if (code !== 0) {
      if (type !== null) groups.push({ code, value });
      continue;
    }
    if (!RECORD_TYPE.test(value)) {
      scan.strayLines++;
      continue;
    }
    if (type !== null) yield { type, groups };
    if (value === "EOF") {
      scan.ended = true;
      return;
    }
    type = value;
    groups = [];
  }
  if (type !== null) yield { type, groups };
}

/** The first value of a code, or null. */
export function firstValue(record: GroupRecord, code: number): string | null {
  for (const group of record.groups) if (group.code === code) return group.value;
  return null;
}

/** The first value of a code as a whole number; `otherwise` where it is absent or not a number. */
export function firstInteger(record: GroupRecord, code: number, otherwise: number): number {
  const value = Math.trunc(Number(firstValue(record, code) ?? Number.NaN));
  return Number.isFinite(value) ? value : otherwise;
}
