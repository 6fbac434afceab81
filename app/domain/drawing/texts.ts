import type { Point } from "../geometry";
import { firstInteger, firstValue, type GroupRecord } from "./groups";
import { type RawEntity, TEXT_TYPES } from "./normal-entity";
import { readNumber } from "./numbers";
import { plainParagraphs, plainText } from "./strings";

/** A string in the coordinates of the section or block that holds it. */
export interface PlacedText {
  readonly text: string;
  readonly at: Point;
  readonly height: number;
}

function readText(record: GroupRecord): PlacedText | null {
  const number = (code: number) => readNumber(firstValue(record, code) ?? "0") ?? 0;
  const isParagraphs = record.type === "MTEXT";
  const pieces = record.groups.filter(({ code }) => code === 1 || (isParagraphs && code === 3));
  const joined = (isParagraphs ? pieces : pieces.slice(0, 1)).map(({ value }) => value).join("");
  const text = isParagraphs ? plainParagraphs(joined) : plainText(joined).trim();
  if (text === "") return null;
  // An aligned TEXT stands at its second point; the first is then only derived from it.
  const isAligned = !isParagraphs && (firstInteger(record, 72, 0) !== 0 || firstInteger(record, 73, 0) !== 0);
  const code = isAligned && firstValue(record, 11) !== null ? 11 : 10;
  return { text, at: { x: number(code), y: number(code + 10) }, height: Math.abs(number(40)) };
}

/** The strings an entity shows: its own, or those of an insert's attributes. */
export function readTexts(entity: RawEntity): PlacedText[] {
  const records = TEXT_TYPES.has(entity.type)
    ? [entity]
    : entity.members.filter(({ type }) => type === "ATTRIB");
  return records.flatMap((record) => readText(record) ?? []);
}
