import { z } from "zod";
import { API_SCOPE_WORDS, API_SCOPES } from "~/domain/orders";
import { orderSummarySchema, waitingSchema } from "./answers";
import {
  API_OPERATIONS,
  type ApiOperation,
  COMMON_PROBLEMS,
  PATH_PARAMETERS,
  pathParametersOf,
} from "./operations";
import { PROBLEM_KINDS, PROBLEM_MEDIA_TYPE, problemSchema } from "./problem";

type Json = Readonly<Record<string, unknown>>;
export type JsonSchema = z.core.JSONSchema.BaseSchema;

export interface ApiParameter {
  readonly name: string;
  readonly in: "path" | "query" | "header";
  readonly required?: boolean;
  readonly description: string;
  /** A list is one parameter, parted by commas. */
  readonly style?: "form";
  readonly explode?: boolean;
  readonly schema: JsonSchema;
}

export interface DocumentedOperation {
  readonly operationId: string;
  readonly summary: string;
  readonly description: string;
  readonly tags: readonly string[];
  readonly parameters: readonly ApiParameter[];
  readonly responses: Readonly<Record<string, Json>>;
}

export interface ApiDocument {
  readonly openapi: string;
  readonly info: Json;
  readonly servers: readonly Json[];
  readonly security: readonly Json[];
  readonly paths: Readonly<Record<string, { readonly get: DocumentedOperation }>>;
  readonly components: {
    readonly schemas: Readonly<Record<string, JsonSchema>>;
    readonly responses: Json;
    readonly headers: Json;
    readonly securitySchemes: Json;
  };
}

const SCHEMAS = "#/components/schemas/";
/** Of the API's shapes: raised in its first number when something that was answered is answered no more. */
const API_VERSION = "1.0.0";

/** The API as an OpenAPI 3.1 document, its schemas made from those the routes answer with. `site` has no slash at its end. */
export function apiDocument(site: string): ApiDocument {
  return {
    openapi: "3.1.1",
    info: {
      title: "Kerfpost",
      version: API_VERSION,
      summary: "Orders of CNC-cut parts, and where they stand.",
      description: `Everything here reads. Send a key as "Authorization: Bearer kp_..."; keys are made and revoked on the account page. Lengths are millimetres, weights kilograms, money integer cents, instants UTC. Refusals are problem documents (RFC 9457). Read more at ${site}/api-guide.`,
    },
    servers: [{ url: site }],
    security: [{ key: [] }, { session: [] }],
    paths: Object.fromEntries(
      API_OPERATIONS.map((operation) => [operation.path, { get: documented(operation) }]),
    ),
    components: {
      schemas: componentSchemas(),
      responses: Object.fromEntries(
        Object.entries(PROBLEM_KINDS).map(([status, { title, detail }]) => [
          `Problem${status}`,
          {
            description: `${title}. ${detail}`,
            ...(status === "429"
              ? { headers: { "Retry-After": { $ref: "#/components/headers/RetryAfter" } } }
              : {}),
            content: { [PROBLEM_MEDIA_TYPE]: { schema: { $ref: `${SCHEMAS}Problem` } } },
          },
        ]),
      ),
      headers: HEADERS,
      securitySchemes: {
        key: {
          type: "http",
          scheme: "bearer",
          description: `A key made on the account page for one or more of: ${API_SCOPES.map((scope) => `${scope} (${API_SCOPE_WORDS[scope].label.toLowerCase()})`).join(", ")}.`,
        },
        session: {
          type: "apiKey",
          in: "cookie",
          name: "kerfpost.session_token",
          description: "Of a person signed in on this site.",
        },
      },
    },
  };
}

const whole = { type: "integer", minimum: 0 };
const HEADERS = {
  RateLimitLimit: { description: "Requests in a window.", schema: whole },
  RateLimitRemaining: { description: "Requests left in this window.", schema: whole },
  RateLimitReset: { description: "Seconds until the window ends.", schema: whole },
  RateLimitPolicy: {
    description: "The limit and its window in seconds: 120;w=60.",
    schema: { type: "string" },
  },
  RetryAfter: { description: "Seconds to wait.", schema: whole },
};
const RATE_HEADERS = {
  "RateLimit-Limit": { $ref: "#/components/headers/RateLimitLimit" },
  "RateLimit-Remaining": { $ref: "#/components/headers/RateLimitRemaining" },
  "RateLimit-Reset": { $ref: "#/components/headers/RateLimitReset" },
  "RateLimit-Policy": { $ref: "#/components/headers/RateLimitPolicy" },
};

function documented(operation: ApiOperation): DocumentedOperation {
  const { id, summary, description, scope, answer, headers = [] } = operation;
  const statuses = [...operation.problems, ...COMMON_PROBLEMS].toSorted((one, other) => one - other);
  return {
    operationId: id,
    summary,
    description: `${description} A key needs ${scope}.`,
    tags: ["orders"],
    parameters: [
      ...pathParametersOf(operation).map((name) => ({
        name,
        in: "path" as const,
        required: true,
        description: PATH_PARAMETERS[name] ?? "",
        schema: { type: "string" as const },
      })),
      ...queryParametersOf(operation),
      ...headers.map((header) => ({ ...header, in: "header" as const, schema: { type: "string" as const } })),
    ],
    responses: {
      "200": {
        description: answer.words,
        headers: RATE_HEADERS,
        content:
          answer.kind === "json"
            ? { "application/json": { schema: { $ref: `${SCHEMAS}${answer.name}` } } }
            : { [answer.mediaType]: { schema: { type: "string" } } },
      },
      ...Object.fromEntries(
        statuses.map((status) => [String(status), { $ref: `#/components/responses/Problem${status}` }]),
      ),
    },
  };
}

/** The query parameters of an operation, from the schema that the route reads them with. */
function queryParametersOf({ query }: ApiOperation): ApiParameter[] {
  if (!query) return [];
  const { properties = {}, required = [] } = z.toJSONSchema(query, { io: "input", override: plain });
  return Object.entries(properties).map(([name, property]) => {
    const { description = "", ...schema } = typeof property === "object" ? property : {};
    const isList = schema.type === "array";
    return {
      name,
      in: "query",
      required: required.includes(name),
      description,
      ...(isList ? { style: "form" as const, explode: false } : {}),
      schema,
    };
  });
}

function componentSchemas(): Record<string, JsonSchema> {
  const registry = z.registry<{ id: string }>();
  registry.add(waitingSchema, { id: "Waiting" });
  registry.add(orderSummarySchema, { id: "OrderSummary" });
  registry.add(problemSchema, { id: "Problem" });
  for (const { answer } of API_OPERATIONS)
    if (answer.kind === "json") registry.add(answer.schema, { id: answer.name });
  const { schemas } = z.toJSONSchema(registry, { uri: (id) => `${SCHEMAS}${id}`, override: plain });
  return Object.fromEntries(
    Object.entries(schemas).map(([id, { $id: _id, $schema: _dialect, ...schema }]) => [id, schema]),
  );
}

/** Leaves out what zod adds for itself: the pattern beside a format, and the bounds of a JavaScript integer. */
function plain({ jsonSchema }: { readonly jsonSchema: JsonSchema }): void {
  if (jsonSchema.format === "date-time") delete jsonSchema.pattern;
  if (jsonSchema.maximum === Number.MAX_SAFE_INTEGER) delete jsonSchema.maximum;
  if (jsonSchema.minimum === Number.MIN_SAFE_INTEGER) delete jsonSchema.minimum;
}
