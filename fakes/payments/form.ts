/** Form bodies with nested names, as the service's SDKs send them: `a[b][0][c]=v`. */
export type FormValue = string | FormValue[] | { [name: string]: FormValue };
export interface FormFields {
  [name: string]: FormValue;
}

/** Decodes a form body or query. `a[0]`, `a[1]` and `a[]` become lists; everything else stays text. */
export function decodeForm(text: string): FormFields {
  const root: FormFields = Object.create(null);
  for (const [name, value] of new URLSearchParams(text)) {
    const path = name.split("[").map((step, index) => (index === 0 ? step : step.replace(/\]$/, "")));
    place(root, path, value);
  }
  return asObject(listsFromIndices(root));
}

function place(root: FormFields, path: string[], value: string) {
  let at = root;
  path.forEach((step, index) => {
    const name = step === "" ? String(Object.keys(at).length) : step;
    if (index === path.length - 1) {
      at[name] = value;
      return;
    }
    const next = at[name];
    const child: FormFields =
      next !== undefined && typeof next !== "string" && !Array.isArray(next) ? next : Object.create(null);
    at[name] = child;
    at = child;
  });
}

function listsFromIndices(value: FormValue): FormValue {
  if (typeof value === "string" || Array.isArray(value)) return value;
  const entries = Object.entries(value).map(([name, inner]) => [name, listsFromIndices(inner)] as const);
  const isList = entries.length > 0 && entries.every(([name]) => /^\d+$/.test(name));
  return isList ? entries.map(([, inner]) => inner) : Object.fromEntries(entries);
}

function asObject(value: FormValue): FormFields {
  return typeof value === "string" || Array.isArray(value) ? {} : value;
}
