/**
 * Carrier: the invented "Towpath Parcel", a small JSON REST service. No real carrier is imitated.
 *
 * POST /v1/rates               {from, to, parcels} -> {rates: [{service, name, amount, currency, days}], refused}
 * POST /v1/labels              {from, to, parcel, service, reference?} with an Idempotency-Key -> a label
 * GET  /v1/tracking/:number    -> {trackingNumber, status, events}
 * POST /v1/labels/:id/void     -> the label, void; refused once the parcel has been scanned
 * Every request carries `Authorization: Bearer key`. Errors: {error: {code, message}}.
 *
 * What a real carrier would do and this one does not: check addresses, bill, schedule pick-ups, or move a
 * parcel by itself. Tests and the demo move it with `advance`, or POST /_fake/advance/:number.
 */
import { randomInt, randomUUID } from "node:crypto";
import type { IncomingMessage, ServerResponse } from "node:http";
import { join } from "node:path";
import type { z } from "zod";
import { jsonFile } from "../json-file";
import {
  type ListenOptions,
  listen,
  type RunningFake,
  readBody,
  sendJson,
  type Unexpected,
} from "../local-server";
import { labelBody, ratesBody } from "./requests";
import { measure, rate, refusalOf, SERVICES, zoneBetween } from "./tariff";

export const CARRIER_KEY = "towpath_local_key";

export type ParcelStatus =
  | "label-made"
  | "collected"
  | "in-transit"
  | "out-for-delivery"
  | "delivered"
  | "void";

export interface TrackingEvent {
  /** ISO instant. */
  at: string;
  status: ParcelStatus;
  place: string;
}

export interface Label {
  id: string;
  trackingNumber: string;
  service: string;
  /** Cents. */
  amount: number;
  currency: "usd";
  days: number;
  status: ParcelStatus;
  reference: string | null;
}

interface KeptLabel {
  label: Label;
  from: string;
  to: string;
  events: TrackingEvent[];
}

interface CarrierState {
  labels: KeptLabel[];
  replies: Record<string, { fingerprint: string; labelId: string }>;
}

export interface CarrierFakeOptions extends ListenOptions {
  /** State is kept in `carrier.json` there; without it in memory. */
  dataDirectory?: string | undefined;
  key?: string | undefined;
}

export interface CarrierFake extends RunningFake {
  key: string;
  labels(): Label[];
  /** The parcel is scanned at its next station; answers the new status. */
  advance(trackingNumber: string): ParcelStatus;
  /** The next `count` requests are answered 503. */
  failNext(count: number): void;
}

class CarrierFailure extends Error {
  readonly status: number;
  readonly code: string;

  constructor(status: number, code: string, message: string) {
    super(message);
    this.status = status;
    this.code = code;
  }
}

const STATIONS: ParcelStatus[] = ["label-made", "collected", "in-transit", "out-for-delivery", "delivered"];

/** Starts the carrier fake. */
export async function startCarrier(options: CarrierFakeOptions): Promise<CarrierFake> {
  const key = options.key ?? CARRIER_KEY;
  const file = jsonFile<CarrierState>(options.dataDirectory && join(options.dataDirectory, "carrier.json"));
  const state: CarrierState = file.read() ?? { labels: [], replies: {} };
  const unexpected: Unexpected[] = [];
  let failures = 0;

  async function answer(request: IncomingMessage, response: ServerResponse) {
    const path = new URL(request.url ?? "/", "http://carrier").pathname;
    const method = request.method ?? "GET";
    if (path === "/_fake/unexpected") return sendJson(response, 200, unexpected);
    const moving = /^\/_fake\/advance\/(\w+)$/.exec(path);
    if (moving && method === "POST") return sendJson(response, 200, { status: advance(moving[1] ?? "") });
    const body = await readBody(request);
    try {
      if (failures > 0) {
        failures -= 1;
        throw new CarrierFailure(503, "unavailable", "Towpath Parcel is out of order for the moment.");
      }
      if (request.headers.authorization !== `Bearer ${key}`)
        throw new CarrierFailure(401, "unauthorized", "A valid key is required.");
      if (method === "POST" && path === "/v1/rates")
        return sendJson(response, 200, ratesFor(parse(ratesBody, body)));
      if (method === "POST" && path === "/v1/labels") {
        const label = buy(parse(labelBody, body), request.headers["idempotency-key"]?.toString(), body);
        return sendJson(response, 201, label);
      }
      const tracking = /^\/v1\/tracking\/(\w+)$/.exec(path);
      if (method === "GET" && tracking) return sendJson(response, 200, track(tracking[1] ?? ""));
      const voiding = /^\/v1\/labels\/([\w-]+)\/void$/.exec(path);
      if (method === "POST" && voiding) return sendJson(response, 200, voidLabel(voiding[1] ?? ""));
      unexpected.push({ method, path, why: "the carrier stand-in has no such request" });
      throw new CarrierFailure(
        501,
        "unknown-request",
        `The local carrier stand-in does not know ${method} ${path}.`,
      );
    } catch (error) {
      if (!(error instanceof CarrierFailure)) throw error;
      sendJson(response, error.status, { error: { code: error.code, message: error.message } });
    }
  }

  function parse<Output>(schema: z.ZodType<Output>, body: string): Output {
    let value: unknown;
    try {
      value = JSON.parse(body);
    } catch {
      throw new CarrierFailure(400, "bad-request", "The body is not JSON.");
    }
    const parsed = schema.safeParse(value);
    if (parsed.success) return parsed.data;
    const [issue] = parsed.error.issues;
    throw new CarrierFailure(
      400,
      "bad-request",
      `${issue?.path.join(".") || "body"}: ${issue?.message ?? "wrong"}`,
    );
  }

  function buy(wanted: z.output<typeof labelBody>, idempotencyKey: string | undefined, body: string): Label {
    if (!idempotencyKey) throw new CarrierFailure(400, "bad-request", "A label needs an Idempotency-Key.");
    const earlier = state.replies[idempotencyKey];
    if (earlier && earlier.fingerprint !== body)
      throw new CarrierFailure(409, "key-reused", "This Idempotency-Key was used for another label.");
    if (earlier) return labelById(earlier.labelId).label;
    const measured = measure(wanted.parcel);
    const refused = refusalOf(measured);
    if (refused)
      throw new CarrierFailure(422, "over-limit", `Towpath Parcel does not take this parcel: ${refused}.`);
    const service = SERVICES.find(({ code }) => code === wanted.service);
    if (!service) throw new CarrierFailure(400, "bad-request", "No such service.");
    const { amount, days } = rate(
      service,
      [measured],
      zoneBetween(wanted.from.postalCode, wanted.to.postalCode),
    );
    const label: Label = {
      id: randomUUID(),
      trackingNumber: newTrackingNumber(),
      service: service.code,
      amount,
      currency: "usd",
      days,
      status: "label-made",
      reference: wanted.reference ?? null,
    };
    const kept = { label, from: wanted.from.city, to: wanted.to.city, events: [] };
    state.labels.push(kept);
    state.replies[idempotencyKey] = { fingerprint: body, labelId: label.id };
    record(kept, "label-made");
    return label;
  }

  function record(kept: KeptLabel, status: ParcelStatus) {
    kept.label.status = status;
    const arrived = status === "out-for-delivery" || status === "delivered";
    kept.events.push({ at: new Date().toISOString(), status, place: arrived ? kept.to : kept.from });
    file.write(state);
  }

  function labelById(id: string): KeptLabel {
    const kept = state.labels.find(({ label }) => label.id === id);
    if (!kept) throw new CarrierFailure(404, "not-found", "No such label.");
    return kept;
  }

  function byNumber(number: string): KeptLabel {
    const kept = state.labels.find(({ label }) => label.trackingNumber === number);
    if (!kept) throw new CarrierFailure(404, "not-found", "No such tracking number.");
    return kept;
  }

  function track(number: string) {
    const { label, events } = byNumber(number);
    return { trackingNumber: number, status: label.status, events };
  }

  function voidLabel(id: string): Label {
    const kept = labelById(id);
    if (kept.label.status === "void") return kept.label;
    if (kept.label.status !== "label-made")
      throw new CarrierFailure(409, "already-scanned", "The parcel has been collected; its label stands.");
    record(kept, "void");
    return kept.label;
  }

  function advance(trackingNumber: string): ParcelStatus {
    const kept = byNumber(trackingNumber);
    const next = STATIONS[STATIONS.indexOf(kept.label.status) + 1];
    if (kept.label.status === "void" || !next)
      throw new Error(`This parcel goes nowhere: ${kept.label.status}.`);
    record(kept, next);
    return next;
  }

  const server = await listen(answer, options);
  return {
    ...server,
    key,
    unexpected,
    labels: () => state.labels.map(({ label }) => label),
    advance,
    failNext(count) {
      failures = count;
    },
  };
}

function ratesFor(wanted: z.output<typeof ratesBody>) {
  const parcels = wanted.parcels.map(measure);
  const refused = parcels.flatMap((measured, index) => {
    const why = refusalOf(measured);
    return why ? [{ parcel: index, why }] : [];
  });
  const zone = zoneBetween(wanted.from.postalCode, wanted.to.postalCode);
  const rates = SERVICES.map((service) => ({
    service: service.code,
    name: service.name,
    currency: "usd",
    ...rate(service, parcels, zone),
  }));
  return { rates: refused.length > 0 ? [] : rates, refused };
}

function newTrackingNumber(): string {
  return `TP${String(randomInt(10 ** 11)).padStart(11, "0")}`;
}
