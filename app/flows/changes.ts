export type Changes = Readonly<Record<string, { readonly before: unknown; readonly after: unknown }>>;

/** A record's values under dotted names, lists whole. */
function flatten(value: unknown, name: string, into: Map<string, unknown>): Map<string, unknown> {
  if (value !== null && typeof value === "object" && !Array.isArray(value) && !(value instanceof Date))
    for (const [key, inner] of Object.entries(value)) flatten(inner, name ? `${name}.${key}` : key, into);
  else into.set(name, value instanceof Date ? value.toISOString() : value);
  return into;
}

/** What differs between a record and what it becomes, by dotted name; names that the second does not have are left. */
export function changesOf(before: object, after: object): Changes {
  const was = flatten(before, "", new Map());
  const now = flatten(after, "", new Map());
  return Object.fromEntries(
    [...now]
      .filter(([name, value]) => JSON.stringify(value) !== JSON.stringify(was.get(name)))
      .map(([name, value]) => [name, { before: was.get(name) ?? null, after: value }]),
  );
}
