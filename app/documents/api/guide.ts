import type { ApiDocument, JsonSchema } from "./document";
import { API_OPERATIONS } from "./operations";

export interface GuideField {
  /** With the names above it: `quote.lines[].amount`. */
  readonly name: string;
  readonly type: string;
  readonly words: string;
}

export interface GuideEntry {
  readonly id: string;
  readonly path: string;
  readonly summary: string;
  readonly description: string;
  readonly parameters: readonly (GuideField & { readonly place: "path" | "query" | "header" })[];
  readonly fields: readonly GuideField[];
  /** What to type in a terminal. */
  readonly curl: string;
}

/** The API's document as a person reads it: every address with its parameters and the members of its answer. */
export function apiGuide(document: ApiDocument, site: string): GuideEntry[] {
  const { schemas } = document.components;
  return API_OPERATIONS.flatMap(({ path, answer, example }) => {
    const operation = document.paths[path]?.get;
    if (!operation) return [];
    const { operationId: id, summary, description, parameters } = operation;
    const streams = answer.kind === "other" && answer.mediaType === "text/event-stream";
    return {
      id,
      path,
      summary,
      description,
      parameters: parameters.map(({ name, in: place, description: words, schema }) => ({
        name,
        place,
        type: typeWords(schema),
        words,
      })),
      fields: answer.kind === "json" ? fieldsOf(schemas[answer.name], "", schemas) : [],
      curl: `curl ${streams ? "-N " : ""}-H "Authorization: Bearer $KERFPOST_KEY" "${site}${example}"`,
    };
  });
}

type Schemas = ApiDocument["components"]["schemas"];

function fieldsOf(schema: JsonSchema | undefined, above: string, schemas: Schemas): GuideField[] {
  return Object.entries(schema?.properties ?? {}).flatMap(([name, property]) => {
    if (typeof property !== "object") return [];
    const told = `${above}${name}`;
    const { inner, list } = contentOf(property, schemas);
    return [
      { name: told, type: typeWords(property), words: property.description ?? inner.description ?? "" },
      ...fieldsOf(inner, list ? `${told}[].` : `${told}.`, schemas),
    ];
  });
}

/** What lies in a property: itself, the one that is not null, the items of a list, whatever a reference leads to. */
function contentOf(schema: JsonSchema, schemas: Schemas): { inner: JsonSchema; list: boolean } {
  const real = schema.anyOf?.find((one) => one.type !== "null") ?? schema;
  if (real.$ref) return { inner: schemas[real.$ref.split("/").at(-1) ?? ""] ?? {}, list: false };
  const { items } = real;
  if (items && typeof items === "object" && !Array.isArray(items))
    return { inner: contentOf(items, schemas).inner, list: true };
  return { inner: real, list: false };
}

/** "integer, 1 to 100", "list of one of draft, quoted", "date-time or null". */
function typeWords(schema: JsonSchema): string {
  if (schema.anyOf) return schema.anyOf.map(typeWords).join(" or ");
  if (schema.$ref) return "object";
  if (schema.enum) return `one of ${schema.enum.join(", ")}`;
  if (schema.type === "array") {
    const { items } = schema;
    return items && typeof items === "object" && !Array.isArray(items)
      ? `list of ${typeWords(items)}`
      : "list";
  }
  const { minimum, maximum } = schema;
  const bounds =
    minimum !== undefined && maximum !== undefined
      ? `, ${minimum} to ${maximum}`
      : minimum !== undefined
        ? `, at least ${minimum}`
        : "";
  return `${schema.format ?? schema.type ?? "anything"}${bounds}`;
}
