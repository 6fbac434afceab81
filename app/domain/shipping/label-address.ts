/** What an address on a label is made of. */
export interface Addressed {
  readonly recipient: string;
  readonly company?: string | undefined;
  readonly line1: string;
  readonly line2?: string | undefined;
  readonly city: string;
  readonly region: string;
  readonly postcode: string;
}

/**
 * The lines of an address as US Postal Service Publication 28 asks: recipient, company, delivery line with the
 * secondary unit at its end, then city, state and ZIP; capitals, no punctuation but the hyphen of a ZIP+4 and the
 * marks inside a name or number.
 */
export const labelAddress = (to: Addressed): readonly string[] =>
  [
    to.recipient,
    to.company ?? "",
    [to.line1, to.line2 ?? ""].filter(Boolean).join(" "),
    `${to.city} ${to.region} ${to.postcode}`,
  ]
    .map((line) =>
      line
        .replace(/[.,;]+/g, " ")
        .replace(/\s+/g, " ")
        .trim()
        .toUpperCase(),
    )
    .filter(Boolean);

/** Private carriers and freight deliver to no post-office box (common practice, no source). */
export const isPostOfficeBox = ({ line1, line2 }: Pick<Addressed, "line1" | "line2">): boolean =>
  [line1, line2 ?? ""].some((line) => /\b(p\.?\s*o\.?|post\s+office)\s*box\b/i.test(line));

/**
 * A shop's own address out of its lines, the last being city, state and ZIP and the one above it the street; null
 * when they are not so.
 */
export function addressFromLines(lines: readonly string[]): {
  readonly line1: string;
  readonly city: string;
  readonly region: string;
  readonly postcode: string;
} | null {
  const last = lines.at(-1)?.match(/^(.+?),?\s+([A-Z]{2})\s+(\d{5}(?:-\d{4})?)$/);
  const line1 = lines.at(-2);
  const [, city, region, postcode] = last ?? [];
  return line1 && city && region && postcode ? { line1, city, region, postcode } : null;
}
