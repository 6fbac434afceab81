/** A value as the record shows it: short, on one line. */
function inWords(value: unknown): string {
  if (value === null || value === undefined) return "nothing";
  if (typeof value === "object") return JSON.stringify(value);
  return String(value);
}

const LONGEST = 120;
const cut = (words: string): string => (words.length > LONGEST ? `${words.slice(0, LONGEST - 1)}…` : words);

interface Change {
  readonly before: unknown;
  readonly after: unknown;
}
const isChange = (value: unknown): value is Change =>
  typeof value === "object" && value !== null && "before" in value && "after" in value;

/** What was done, a phrase a fact: `setUp: 3500 → 4000`, `from quoted`, `number 2`. */
export function detailInWords(detail: Readonly<Record<string, unknown>>): string[] {
  const { changes, ...facts } = detail;
  const plain = Object.entries(facts)
    .filter(([, value]) => value !== null && value !== undefined && value !== 0)
    .map(([name, value]) => cut(`${name} ${inWords(value)}`));
  if (typeof changes !== "object" || changes === null) return plain;
  const changed = Object.entries(changes).map(([name, value]) =>
    isChange(value)
      ? `${name}: ${cut(inWords(value.before))} → ${cut(inWords(value.after))}`
      : cut(`${name} ${inWords(value)}`),
  );
  return [...plain, ...changed];
}
