/** `expand[]`: ids in an answer replaced by the objects they name. */
import type { Desk } from "./desk";
import { invalidRequest } from "./errors";

/** A copy of `object` with the named fields expanded, e.g. `payment_intent.latest_charge`. */
export function expanded(object: object, paths: string[] | undefined, desk: Desk): object {
  const copy: Record<string, unknown> = structuredClone({ ...object });
  for (const path of paths ?? []) expandOne(copy, path.split("."), path, desk);
  return copy;
}

/** A list answer; paths start with `data.`. */
export function expandedList(
  objects: object[],
  url: string,
  paths: string[] | undefined,
  desk: Desk,
  more: boolean,
) {
  const inner = paths?.map((path) => {
    if (!path.startsWith("data.")) throw notExpandable(path);
    return path.slice("data.".length);
  });
  return {
    object: "list",
    url,
    has_more: more,
    data: objects.map((object) => expanded(object, inner, desk)),
  };
}

function expandOne(at: Record<string, unknown>, steps: string[], path: string, desk: Desk) {
  const [field, ...rest] = steps;
  if (field === undefined) return;
  if (field === "line_items" && at.object === "checkout.session") {
    const data = desk.sessionDetails(String(at.id)).lineItems;
    at.line_items = {
      object: "list",
      data,
      has_more: false,
      url: `/v1/checkout/sessions/${String(at.id)}/line_items`,
    };
    return;
  }
  const find = finders[field];
  if (!find || !(field in at)) throw notExpandable(path);
  const value = at[field];
  if (typeof value === "string") at[field] = structuredClone({ ...find(desk, value) });
  const child = at[field];
  if (typeof child === "object" && child !== null)
    expandOne(child as Record<string, unknown>, rest, path, desk);
}

const finders: Record<string, (desk: Desk, id: string) => object> = {
  payment_intent: (desk, id) => desk.intent(id),
  latest_charge: (desk, id) => desk.charge(id),
  charge: (desk, id) => desk.charge(id),
};

function notExpandable(path: string) {
  return invalidRequest(`This property cannot be expanded (${path}).`, { param: "expand" });
}
