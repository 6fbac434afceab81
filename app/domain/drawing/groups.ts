/** One group: its code and its value as written, blanks at both ends dropped unless it is a piece of text. */
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

/** Group codes run up to 1071 (DXF Reference, group codes in numerical order). */
const HIGHEST_CODE = 1071;
const COMMENT = 999;
/** Pieces of text, whose blanks count where pieces are put together. */
const TEXT_CODES: ReadonlySet<number> = new Set([1, 3]);
/** Names a record can have; anything else after a code 0 is damage. */
const RECORD_TYPE = /^\w*[A-Za-z]\w*$/;

const ZERO = 48;
const NINE = 57;
/** Blanks, tabs and carriage returns round a code. */
const isBlank = (letter: number): boolean => letter === 32 || letter === 9 || letter === 13;

type CodeLine = number | "blank" | "stray";

/** The line from `from` to `to` as a group code, read in place. */
function readCode(text: string, from: number, to: number): CodeLine {
  let start = from;
  let end = to;
  while (start < end && isBlank(text.charCodeAt(start))) start++;
  while (end > start && isBlank(text.charCodeAt(end - 1))) end--;
  if (start === end) return "blank";
  if (end - start > 4) return "stray";
  let code = 0;
  for (let i = start; i < end; i++) {
    const letter = text.charCodeAt(i);
    if (letter < ZERO || letter > NINE) return "stray";
    code = code * 10 + letter - ZERO;
  }
  return code <= HIGHEST_CODE ? code : "stray";
}

/**
 * The records of a file up to its end mark, in one pass. Comments and blank lines between groups are dropped; where
 * code and value lines are out of step, lines are passed over until a code is met. A last line without a line break
 * in a file without an end mark may be half a number, so it is left out.
 */
export function* scanRecords(source: string, scan: RecordScan): Generator<GroupRecord> {
  const text = /\r(?!\n)/.test(source) ? source.replace(/\r\n?/g, "\n") : source;
  let type: string | null = null;
  let groups: Group[] = [];
  let at = 0;
  for (;;) {
    const codeEnd = text.indexOf("\n", at);
    if (codeEnd < 0) break;
    const code = readCode(text, at, codeEnd);
    at = codeEnd + 1;
    if (typeof code === "string") {
      if (code === "stray") scan.strayLines++;
      continue;
    }
    const lineBreak = text.indexOf("\n", at);
    const line = text.slice(at, lineBreak < 0 ? undefined : lineBreak);
    const value = TEXT_CODES.has(code) ? line.replace(/\r$/, "") : line.trim();
    if (lineBreak < 0 && value !== "EOF") break;
    at = lineBreak < 0 ? text.length : lineBreak + 1;
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
