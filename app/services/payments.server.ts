/**
 * Payments by hosted checkout through the `stripe` SDK. The host is a setting, so the same build speaks to the
 * real service or to a local one.
 */
import Stripe from "stripe";
import {
  type Checkout,
  checkoutOf,
  type Payment,
  type PaymentEvent,
  paymentEventOf,
  paymentOf,
  type Refund,
  refundOf,
} from "./payment-answers.server";

export type { Checkout, Payment, PaymentEvent, Refund } from "./payment-answers.server";

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

export interface RefundWanted {
  idempotencyKey: string;
  paymentId: string;
  /** Cents. */
  amount: number;
  reason: "duplicate" | "fraudulent" | "requested_by_customer";
  metadata: Record<string, string>;
}

/**
 * `conflict`: the idempotency key was used for something else. `not-found`, `refused`: asking again will not
 * help. `unavailable`: it may, with the same key. `misconfigured`: the shop's key is wrong.
 */
export type PaymentsReason = "conflict" | "not-found" | "refused" | "unavailable" | "misconfigured";
export type PaymentsFailure = { ok: false; reason: PaymentsReason; message: string };
export type PaymentsResult<Value> = { ok: true; value: Value } | PaymentsFailure;

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
      const read = paymentEventOf(event);
      return read ? { ok: true, event: read } : { ok: false, reason: "not-an-event" };
    },
  };
}

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
