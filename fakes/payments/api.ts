/** The REST side under /v1: key, idempotency, parameters, answers and errors in the service's shapes. */
import type { IncomingMessage, ServerResponse } from "node:http";
import { readBody, type Unexpected } from "../local-server";
import type { Desk } from "./desk";
import { invalidRequest, missingResource, PaymentsFailure } from "./errors";
import { expanded, expandedList } from "./expand";
import { decodeForm, type FormFields } from "./form";
import { newId, type PaymentsState } from "./objects";
import type { Refunds } from "./refunds";
import {
  changedIntent,
  lineItemsOf,
  listSessions,
  newRefund,
  newSession,
  onlyExpand,
  parseParameters,
} from "./requests";

/** Replies to a key are kept for a day, as documented by the service. */
const REPLY_LIFETIME = 24 * 60 * 60;

/** A failure asked for by a test: before anything is done, or after it with the answer lost on its way. */
export interface PlannedFailure {
  when: "before" | "after";
  /** Status of a failure `before`; 500 unless told. */
  status?: number;
}

export interface ApiParts {
  state: PaymentsState;
  desk: Desk;
  refunds: Refunds;
  secretKey: string;
  unexpected: Unexpected[];
  planned: PlannedFailure[];
  now(): number;
  /** Marks events as caused by this request. */
  duringRequest(requestId: string, key: string | null): void;
  changed(): void;
}

interface Route {
  method: "GET" | "POST";
  pattern: RegExp;
  act(id: string, fields: FormFields, parts: ApiParts): object;
}

const routes: Route[] = [
  {
    method: "POST",
    pattern: /^\/v1\/checkout\/sessions$/,
    act: (_id, fields, parts) => createSession(fields, parts),
  },
  {
    method: "GET",
    pattern: /^\/v1\/checkout\/sessions$/,
    act: (_id, fields, parts) => findSessions(fields, parts),
  },
  {
    method: "GET",
    pattern: /^\/v1\/checkout\/sessions\/(\w+)$/,
    act: (id, fields, { desk }) => withExpand(desk.session(id), fields, desk),
  },
  {
    method: "POST",
    pattern: /^\/v1\/checkout\/sessions\/(\w+)\/expire$/,
    act: (id, fields, { desk }) => withExpand(desk.expireSession(id), fields, desk),
  },
  {
    method: "GET",
    pattern: /^\/v1\/payment_intents\/(\w+)$/,
    act: (id, fields, { desk }) => withExpand(desk.intent(id), fields, desk),
  },
  { method: "POST", pattern: /^\/v1\/payment_intents\/(\w+)$/, act: changeIntent },
  { method: "POST", pattern: /^\/v1\/refunds$/, act: (_id, fields, parts) => createRefund(fields, parts) },
  {
    method: "GET",
    pattern: /^\/v1\/refunds\/(\w+)$/,
    act: (id, fields, { desk, refunds }) => withExpand(refunds.find(id), fields, desk),
  },
  {
    method: "GET",
    pattern: /^\/v1\/charges\/(\w+)$/,
    act: (id, fields, { desk }) => withExpand(desk.charge(id), fields, desk),
  },
  { method: "GET", pattern: /^\/v1\/events\/(\w+)$/, act: findEvent },
];

function withExpand(object: object, fields: FormFields, desk: Desk): object {
  return expanded(object, parseParameters(onlyExpand, fields).expand, desk);
}

function createSession(fields: FormFields, { desk }: ApiParts): object {
  const wanted = parseParameters(newSession, fields);
  const lineItems = lineItemsOf(wanted.line_items);
  const session = desk.createSession({
    successUrl: wanted.success_url,
    cancelUrl: wanted.cancel_url ?? null,
    clientReferenceId: wanted.client_reference_id ?? null,
    customerEmail: wanted.customer_email ?? null,
    currency: lineItems[0]?.currency ?? "usd",
    expiresAt: wanted.expires_at,
    metadata: wanted.metadata ?? {},
    submitType: wanted.submit_type ?? null,
    details: {
      lineItems,
      intentDescription: wanted.payment_intent_data?.description ?? null,
      intentMetadata: wanted.payment_intent_data?.metadata ?? {},
      receiptEmail: wanted.payment_intent_data?.receipt_email ?? null,
    },
  });
  return expanded(session, wanted.expand, desk);
}

function findSessions(fields: FormFields, { desk, state }: ApiParts): object {
  const wanted = parseParameters(listSessions, fields);
  const limit = wanted.limit ?? 10;
  if (limit < 1 || limit > 100) throw invalidRequest("Limit must be between 1 and 100.", { param: "limit" });
  const found = Object.values(state.sessions)
    .filter(({ payment_intent }) => !wanted.payment_intent || payment_intent === wanted.payment_intent)
    .filter(({ status }) => !wanted.status || status === wanted.status)
    .reverse();
  return expandedList(
    found.slice(0, limit),
    "/v1/checkout/sessions",
    wanted.expand,
    desk,
    found.length > limit,
  );
}

function changeIntent(id: string, fields: FormFields, { desk }: ApiParts): object {
  const intent = desk.intent(id);
  const wanted = parseParameters(changedIntent, fields);
  if (wanted.description !== undefined) intent.description = wanted.description || null;
  if (wanted.receipt_email !== undefined) intent.receipt_email = wanted.receipt_email;
  for (const [name, value] of Object.entries(wanted.metadata ?? {})) {
    if (value === "") delete intent.metadata[name];
    else intent.metadata[name] = value;
  }
  return expanded(intent, wanted.expand, desk);
}

function createRefund(fields: FormFields, { desk, refunds }: ApiParts): object {
  const wanted = parseParameters(newRefund, fields);
  const refund = refunds.create({
    paymentIntent: wanted.payment_intent,
    charge: wanted.charge,
    amount: wanted.amount,
    reason: wanted.reason ?? null,
    metadata: wanted.metadata ?? {},
  });
  return expanded(refund, wanted.expand, desk);
}

function findEvent(id: string, _fields: FormFields, { state }: ApiParts): object {
  const stored = state.events.find(({ event }) => event.id === id);
  if (!stored) throw missingResource("event", id);
  return stored.event;
}

/** Answers one request under /v1. */
export async function answerApi(
  request: IncomingMessage,
  response: ServerResponse,
  address: URL,
  parts: ApiParts,
) {
  const text = await readBody(request);
  const requestId = newId("req");
  const key = request.method === "POST" ? (request.headers["idempotency-key"]?.toString() ?? null) : null;
  const answer = (status: number, body: unknown, replayOf?: string) => {
    response.writeHead(status, {
      "Content-Type": "application/json",
      "Request-Id": requestId,
      ...(key ? { "Idempotency-Key": key } : {}),
      ...(replayOf ? { "Idempotent-Replayed": "true", "Original-Request": replayOf } : {}),
    });
    response.end(JSON.stringify(body));
  };
  const planned = parts.planned.shift();
  if (planned?.when === "before")
    return answer(planned.status ?? 500, {
      error: { type: "api_error", message: "A failure asked for by a test." },
    });
  try {
    checkKey(request.headers.authorization, parts.secretKey);
    const route = routeOf(request.method ?? "GET", address.pathname, parts.unexpected);
    const fields = decodeForm(request.method === "POST" ? text : address.search.slice(1));
    const fingerprint = JSON.stringify([request.method, address.pathname, sorted(fields)]);
    const earlier = key ? replyTo(key, fingerprint, parts) : undefined;
    if (earlier) return answer(earlier.status, earlier.body, earlier.requestId);
    parts.duringRequest(requestId, key);
    const body = structuredClone(route.act(address.pathname.match(route.pattern)?.[1] ?? "", fields, parts));
    if (key) parts.state.replies[key] = { fingerprint, status: 200, body, requestId, created: parts.now() };
    parts.changed();
    if (planned) {
      response.destroy();
      return;
    }
    answer(200, body);
  } catch (error) {
    if (!(error instanceof PaymentsFailure)) throw error;
    if (error.body.code === "parameter_unknown")
      parts.unexpected.push({ method: request.method ?? "GET", path: address.pathname, why: error.message });
    answer(error.status, { error: error.body });
  }
}

function checkKey(authorization: string | undefined, secretKey: string) {
  if (authorization === `Bearer ${secretKey}`) return;
  throw new PaymentsFailure(401, {
    type: "invalid_request_error",
    message: authorization
      ? "Invalid API Key provided."
      : "You did not provide an API key. You need to provide your API key in the Authorization header, using Bearer auth.",
  });
}

function routeOf(method: string, path: string, unexpected: Unexpected[]): Route {
  const route = routes.find((candidate) => candidate.method === method && candidate.pattern.test(path));
  if (route) return route;
  unexpected.push({ method, path, why: "the payments stand-in has no such request" });
  throw new PaymentsFailure(501, {
    type: "api_error",
    message: `The local payments stand-in does not know ${method} ${path}.`,
  });
}

function replyTo(key: string, fingerprint: string, parts: ApiParts) {
  const earlier = parts.state.replies[key];
  if (!earlier || earlier.created + REPLY_LIFETIME < parts.now()) return undefined;
  if (earlier.fingerprint === fingerprint) return earlier;
  throw new PaymentsFailure(400, {
    type: "idempotency_error",
    message: `Keys for idempotent requests can only be used with the same parameters they were first used with. Try using a key other than '${key}' if you meant to execute a different request.`,
  });
}

/** The same fields in the same order, whatever order they were sent in. */
function sorted(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(sorted);
  if (typeof value !== "object" || value === null) return value;
  const entries = Object.entries(value).sort(([a], [b]) => (a < b ? -1 : 1));
  return Object.fromEntries(entries.map(([name, inner]) => [name, sorted(inner)]));
}
