/**
 * The check digit of a GS1 key: weights 3, 1, 3 from the right, what is missing to the next ten (GS1 General
 * Specifications, standard check digit calculation). Digits only, the check digit left out.
 */
export function gs1CheckDigit(digits: string): number {
  const sum = [...digits].reduce(
    (total, digit, index) => total + Number(digit) * ((digits.length - index) % 2 === 1 ? 3 : 1),
    0,
  );
  return (10 - (sum % 10)) % 10;
}

export interface SsccParts {
  /** 0 to 9, the shop's own use. */
  readonly extension: number;
  /** The company prefix that GS1 gave, 7 to 10 digits. */
  readonly prefix: string;
  /** Counts up from 0; what fits into the digits left is used. */
  readonly serial: number;
}

/** A serial shipping container code of 18 digits. Throws where the serial needs more digits than are left. */
export function sscc({ extension, prefix, serial }: SsccParts): string {
  const room = 16 - prefix.length;
  const counted = String(serial).padStart(room, "0");
  if (counted.length > room) throw new RangeError(`A serial of ${serial} does not fit behind ${prefix}.`);
  const digits = `${extension}${prefix}${counted}`;
  return `${digits}${gs1CheckDigit(digits)}`;
}
