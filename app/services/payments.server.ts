/**
 * Payments by hosted checkout through the `stripe` SDK. The host is a setting, so the same build speaks to the
 * real service or to a local one.
 */
import Stripe from "stripe";
import { z } from "zod";

export interface PaymentsConfig {
  secretKey: string;
  webhookSecret: string;
  /** Base address of another host than the service's own, e.g. `http://127.0.0.1:4702`. */
  apiUrl?: string | undefined;
}

export interface CheckoutLine {
  name: string;
  description?: string | undefined;
  /** Cents each. */
  amount: number;
  quantity: number;
}

export interface CheckoutWanted {
  /** Same key and same content: the same checkout again. Same key and other content: refused as a conflict. */
  idempotencyKey: string;
  /** Lower-case ISO 4217 code. */
  currency: string;
  lines: CheckoutLine[];
  description: string;
  customerEmail: string;
  /** `{CHECKOUT_SESSION_ID}` in it is replaced by the service. */
  successUrl: string;
  cancelUrl: string;
  /** Kept on the checkout and on the payment. */
  metadata: Record<string, string>;
  /** Between 30 minutes and 24 hours from now; 24 hours unless told. */
  expiresAt?: Date | undefined;
}

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

export interface RefundWanted {
  idempotencyKey: string;
  paymentId: string;
  /** Cents. */
  amount: number;
  reason: "duplicate" | "fraudulent" | "requested_by_customer";
  metadata: Record<string, string>;
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

/**
 * `conflict`: the idempotency key was used for something else. `not-found`, `refused`: asking again will not
 * help. `unavailable`: it may, with the same key. `misconfigured`: the shop's key is wrong.
 */
export type PaymentsReason = "conflict" | "not-found" | "refused" | "unavailable" | "misconfigured";
export type PaymentsFailure = { ok: false; reason: PaymentsReason; message: string };
export type PaymentsResult<Value> = { ok: true; value: Value } | PaymentsFailure;

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

export type VerifiedEvent =
  | { ok: true; event: PaymentEvent }
  | { ok: false; reason: "bad-signature" | "not-an-event" };

export interface Payments {
  createCheckout(wanted: CheckoutWanted): Promise<PaymentsResult<Checkout>>;
  /** Refused when the checkout is complete or expired already. */
  expireCheckout(id: string): Promise<PaymentsResult<Checkout>>;
  getCheckout(id: string): Promise<PaymentsResult<Checkout>>;
  getPayment(id: string): Promise<PaymentsResult<Payment>>;
  /** The checkout a payment was made on; undefined when it was made otherwise. */
  findCheckoutOfPayment(paymentId: string): Promise<PaymentsResult<Checkout | undefined>>;
  /** Refused past what is left of the payment. */
  refund(wanted: RefundWanted): Promise<PaymentsResult<Refund>>;
  getRefund(id: string): Promise<PaymentsResult<Refund>>;
  /** `rawBody` exactly as received, `signature` the `Stripe-Signature` header. */
  verifyWebhook(rawBody: string | Uint8Array, signature: string | null): VerifiedEvent;
}

const checkoutExpand = ["payment_intent.latest_charge"];

/** A client for one account. */
export function createPayments(config: PaymentsConfig): Payments {
  const stripe = new Stripe(config.secretKey, {
    ...hostOf(config.apiUrl),
    telemetry: false,
    maxNetworkRetries: 2,
    timeout: 20_000,
  });
  return {
    createCheckout: (wanted) =>
      attempt(async () => {
        const session = await stripe.checkout.sessions.create(
          {
            mode: "payment",
            line_items: wanted.lines.map(({ name, description, amount, quantity }) => ({
              quantity,
              price_data: {
                currency: wanted.currency,
                unit_amount: amount,
                product_data: { name, ...(description ? { description } : {}) },
              },
            })),
            customer_email: wanted.customerEmail,
            success_url: wanted.successUrl,
            cancel_url: wanted.cancelUrl,
            metadata: wanted.metadata,
            payment_intent_data: { description: wanted.description, metadata: wanted.metadata },
            ...(wanted.expiresAt ? { expires_at: Math.floor(wanted.expiresAt.getTime() / 1000) } : {}),
          },
          { idempotencyKey: wanted.idempotencyKey },
        );
        return checkoutOf(session);
      }),
    expireCheckout: (id) =>
      attempt(async () => checkoutOf(await stripe.checkout.sessions.expire(id, { expand: checkoutExpand }))),
    getCheckout: (id) =>
      attempt(async () =>
        checkoutOf(await stripe.checkout.sessions.retrieve(id, { expand: checkoutExpand })),
      ),
    getPayment: (id) =>
      attempt(async () => paymentOf(await stripe.paymentIntents.retrieve(id, { expand: ["latest_charge"] }))),
    findCheckoutOfPayment: (paymentId) =>
      attempt(async () => {
        const found = await stripe.checkout.sessions.list({
          payment_intent: paymentId,
          limit: 1,
          expand: checkoutExpand.map((path) => `data.${path}`),
        });
        const [session] = found.data;
        return session && checkoutOf(session);
      }),
    refund: (wanted) =>
      attempt(async () => {
        const refund = await stripe.refunds.create(
          {
            payment_intent: wanted.paymentId,
            amount: wanted.amount,
            reason: wanted.reason,
            metadata: wanted.metadata,
          },
          { idempotencyKey: wanted.idempotencyKey },
        );
        return refundOf(refund);
      }),
    getRefund: (id) => attempt(async () => refundOf(await stripe.refunds.retrieve(id))),
    verifyWebhook(rawBody, signature) {
      let event: unknown;
      try {
        const body = typeof rawBody === "string" ? rawBody : Buffer.from(rawBody);
        event = stripe.webhooks.constructEvent(body, signature ?? "", config.webhookSecret);
      } catch (error) {
        if (error instanceof Stripe.errors.StripeSignatureVerificationError)
          return { ok: false, reason: "bad-signature" };
        if (error instanceof SyntaxError) return { ok: false, reason: "not-an-event" };
        throw error;
      }
      const parsed = eventShape.safeParse(event);
      if (!parsed.success) return { ok: false, reason: "not-an-event" };
      const { id, type, created, data } = parsed.data;
      return {
        ok: true,
        event: {
          id,
          type,
          createdAt: new Date(created * 1000),
          objectType: data.object.object,
          objectId: data.object.id,
          paymentId:
            data.object.object === "payment_intent"
              ? data.object.id
              : (data.object.payment_intent ?? undefined),
        },
      };
    },
  };
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

function hostOf(
  apiUrl: string | undefined,
): { host: string; port: string; protocol: "http" | "https" } | undefined {
  if (!apiUrl) return undefined;
  const { hostname, port, protocol } = new URL(apiUrl);
  const scheme = protocol === "http:" ? "http" : "https";
  return { host: hostname, port: port || (scheme === "http" ? "80" : "443"), protocol: scheme };
}

async function attempt<Value>(act: () => Promise<Value>): Promise<PaymentsResult<Value>> {
  try {
    return { ok: true, value: await act() };
  } catch (error) {
    if (!(error instanceof Stripe.errors.StripeError)) throw error;
    return { ok: false, reason: reasonOf(error), message: error.message };
  }
}

function reasonOf(error: InstanceType<typeof Stripe.errors.StripeError>): PaymentsReason {
  const { errors } = Stripe;
  if (error instanceof errors.StripeIdempotencyError) return "conflict";
  if (error instanceof errors.StripeAuthenticationError || error instanceof errors.StripePermissionError)
    return "misconfigured";
  if (error instanceof errors.StripeConnectionError || error instanceof errors.StripeRateLimitError)
    return "unavailable";
  if (error.code === "resource_missing") return "not-found";
  return error.statusCode !== undefined && error.statusCode >= 500 && error.statusCode !== 501
    ? "unavailable"
    : "refused";
}

const checkoutStatus = z.enum(["open", "complete", "expired"]);

function checkoutOf(session: Stripe.Checkout.Session): Checkout {
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

function paymentOf(intent: Stripe.PaymentIntent): Payment {
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

function refundOf(refund: Stripe.Refund): Refund {
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
