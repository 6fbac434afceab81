/** The parcel carrier's JSON REST service. Every answer is checked before it is believed. */
import { z } from "zod";

export interface CarrierConfig {
  /** Base address, e.g. `http://127.0.0.1:4705`. */
  apiUrl: string;
  key: string;
}

export interface CarrierAddress {
  name: string;
  company?: string | undefined;
  line1: string;
  line2?: string | undefined;
  city: string;
  region: string;
  /** US ZIP or ZIP+4. */
  postalCode: string;
  country: "US";
  phone?: string | undefined;
}

export interface CarrierParcel {
  weightKg: number;
  lengthMm: number;
  widthMm: number;
  heightMm: number;
}

const status = z.enum(["label-made", "collected", "in-transit", "out-for-delivery", "delivered", "void"]);

const ratesAnswer = z.object({
  rates: z.array(
    z.object({
      service: z.string(),
      name: z.string(),
      amount: z.int().nonnegative(),
      currency: z.string(),
      days: z.int().positive(),
    }),
  ),
  refused: z.array(z.object({ parcel: z.int().nonnegative(), why: z.string() })),
});

const labelAnswer = z.object({
  id: z.string().min(1),
  trackingNumber: z.string().min(1),
  service: z.string(),
  amount: z.int().nonnegative(),
  currency: z.string(),
  days: z.int().positive(),
  status,
  reference: z.string().nullable(),
});

const trackingAnswer = z.object({
  trackingNumber: z.string(),
  status,
  events: z.array(z.object({ at: z.iso.datetime(), status, place: z.string() })),
});

const errorAnswer = z.object({ error: z.object({ code: z.string(), message: z.string() }) });

/** Rates in cents with working days; `refused` names parcels over a limit, and then there are no rates. */
export type CarrierRates = z.output<typeof ratesAnswer>;
export type CarrierLabel = z.output<typeof labelAnswer>;
export type CarrierTracking = z.output<typeof trackingAnswer>;

/**
 * `over-limit`: the parcel is too long or heavy. `already-scanned`: too late to void. `conflict`: the idempotency
 * key was used for another label. `refused`: anything else that asking again will not help. `unavailable`: it may.
 */
export type CarrierReason =
  | "over-limit"
  | "already-scanned"
  | "conflict"
  | "not-found"
  | "refused"
  | "unavailable"
  | "misconfigured";
export type CarrierResult<Value> =
  | { ok: true; value: Value }
  | { ok: false; reason: CarrierReason; message: string };

export interface LabelWanted {
  /** Same key and same content: the same label again, never a second one. */
  idempotencyKey: string;
  from: CarrierAddress;
  to: CarrierAddress;
  parcel: CarrierParcel;
  service: string;
  reference?: string | undefined;
}

export interface Carrier {
  rates(wanted: {
    from: CarrierAddress;
    to: CarrierAddress;
    parcels: CarrierParcel[];
  }): Promise<CarrierResult<CarrierRates>>;
  buyLabel(wanted: LabelWanted): Promise<CarrierResult<CarrierLabel>>;
  track(trackingNumber: string): Promise<CarrierResult<CarrierTracking>>;
  voidLabel(labelId: string): Promise<CarrierResult<CarrierLabel>>;
}

const ANSWER_TIMEOUT = 15_000;

const REASONS: Record<string, CarrierReason> = {
  "over-limit": "over-limit",
  "already-scanned": "already-scanned",
  "key-reused": "conflict",
  "not-found": "not-found",
  unauthorized: "misconfigured",
  unavailable: "unavailable",
};

/** A client for one carrier account. */
export function createCarrier(config: CarrierConfig): Carrier {
  async function call<Value>(
    method: "GET" | "POST",
    path: string,
    schema: z.ZodType<Value>,
    body?: object,
    idempotencyKey?: string,
  ): Promise<CarrierResult<Value>> {
    let response: Response;
    let answer: unknown;
    try {
      response = await fetch(new URL(path, config.apiUrl), {
        method,
        headers: {
          Authorization: `Bearer ${config.key}`,
          ...(body ? { "Content-Type": "application/json" } : {}),
          ...(idempotencyKey ? { "Idempotency-Key": idempotencyKey } : {}),
        },
        body: body ? JSON.stringify(body) : null,
        redirect: "error",
        signal: AbortSignal.timeout(ANSWER_TIMEOUT),
      });
      answer = await response.json();
    } catch (error) {
      return {
        ok: false,
        reason: "unavailable",
        message: error instanceof Error ? error.message : String(error),
      };
    }
    if (!response.ok) return failureOf(response.status, answer);
    const checked = schema.safeParse(answer);
    if (checked.success) return { ok: true, value: checked.data };
    return {
      ok: false,
      reason: "unavailable",
      message: `The carrier's answer is not as agreed: ${z.prettifyError(checked.error)}`,
    };
  }

  return {
    rates: (wanted) => call("POST", "/v1/rates", ratesAnswer, wanted),
    buyLabel: ({ idempotencyKey, ...body }) => call("POST", "/v1/labels", labelAnswer, body, idempotencyKey),
    track: (trackingNumber) =>
      call("GET", `/v1/tracking/${encodeURIComponent(trackingNumber)}`, trackingAnswer),
    voidLabel: (labelId) => call("POST", `/v1/labels/${encodeURIComponent(labelId)}/void`, labelAnswer),
  };
}

function failureOf(
  httpStatus: number,
  answer: unknown,
): { ok: false; reason: CarrierReason; message: string } {
  const parsed = errorAnswer.safeParse(answer);
  if (!parsed.success)
    return {
      ok: false,
      reason: httpStatus >= 500 ? "unavailable" : "refused",
      message: `The carrier answered ${httpStatus}.`,
    };
  const { code, message } = parsed.data.error;
  return { ok: false, reason: REASONS[code] ?? (httpStatus > 501 ? "unavailable" : "refused"), message };
}
