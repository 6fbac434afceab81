/** What the payment service answers, in the product's own words. Amounts in cents. */
import type Stripe from "stripe";
import { z } from "zod";

export interface Payment {
  id: string;
  status: string;
  /** Cents. */
  amount: number;
  amountReceived: number;
  amountRefunded: number;
  currency: string;
  chargeId: string | undefined;
  receiptUrl: string | undefined;
  /** The service's words to the payer after a failed attempt. */
  failure: string | undefined;
  metadata: Record<string, string>;
}

export interface Checkout {
  id: string;
  status: "open" | "complete" | "expired";
  paid: boolean;
  /** Where to send the payer; gone once complete or expired. */
  url: string | undefined;
  /** Cents. */
  amount: number;
  currency: string;
  expiresAt: Date;
  metadata: Record<string, string>;
  /** There from the first attempt on. */
  payment: Payment | undefined;
}

export interface Refund {
  id: string;
  paymentId: string;
  /** Cents. */
  amount: number;
  currency: string;
  status: string;
  metadata: Record<string, string>;
}

/** What a verified webhook says; the object itself is fetched anew, since events come in any order. */
export interface PaymentEvent {
  id: string;
  type: string;
  createdAt: Date;
  /** `checkout.session`, `payment_intent`, `charge`, `refund`, ... */
  objectType: string;
  objectId: string;
  /** The payment the object belongs to, when it names one. */
  paymentId: string | undefined;
}

const eventShape = z.object({
  id: z.string(),
  type: z.string(),
  created: z.number(),
  data: z.object({
    object: z.object({
      id: z.string(),
      object: z.string(),
      payment_intent: z.string().nullish(),
    }),
  }),
});

/** The event as far as it is used; undefined for anything else. */
export function paymentEventOf(event: unknown): PaymentEvent | undefined {
  const parsed = eventShape.safeParse(event);
  if (!parsed.success) return undefined;
  const { id, type, created, data } = parsed.data;
  const { object } = data;
  return {
    id,
    type,
    createdAt: new Date(created * 1000),
    objectType: object.object,
    objectId: object.id,
    paymentId: object.object === "payment_intent" ? object.id : (object.payment_intent ?? undefined),
  };
}

const checkoutStatus = z.enum(["open", "complete", "expired"]);

/** Throws on an answer that a checkout made here cannot have. */
export function checkoutOf(session: Stripe.Checkout.Session): Checkout {
  if (session.amount_total === null || session.currency === null)
    throw new Error("The payment service answered a checkout without an amount.");
  return {
    id: session.id,
    status: checkoutStatus.parse(session.status),
    paid: session.payment_status === "paid",
    url: session.url ?? undefined,
    amount: session.amount_total,
    currency: session.currency,
    expiresAt: new Date(session.expires_at * 1000),
    metadata: session.metadata ?? {},
    payment: isObject(session.payment_intent) ? paymentOf(session.payment_intent) : undefined,
  };
}

/** The charge is known where `latest_charge` was expanded. */
export function paymentOf(intent: Stripe.PaymentIntent): Payment {
  const charge = isObject(intent.latest_charge) ? intent.latest_charge : undefined;
  return {
    id: intent.id,
    status: intent.status,
    amount: intent.amount,
    amountReceived: intent.amount_received,
    amountRefunded: charge?.amount_refunded ?? 0,
    currency: intent.currency,
    chargeId: charge?.id,
    receiptUrl: charge?.receipt_url ?? undefined,
    failure: intent.last_payment_error?.message,
    metadata: intent.metadata,
  };
}

/** Throws on a refund of anything but a payment. */
export function refundOf(refund: Stripe.Refund): Refund {
  const paymentId = isObject(refund.payment_intent) ? refund.payment_intent.id : refund.payment_intent;
  if (!paymentId) throw new Error("The payment service answered a refund that names no payment.");
  return {
    id: refund.id,
    paymentId,
    amount: refund.amount,
    currency: refund.currency,
    status: refund.status ?? "unknown",
    metadata: refund.metadata ?? {},
  };
}

function isObject<Value extends object>(value: string | Value | null): value is Value {
  return typeof value === "object" && value !== null;
}
