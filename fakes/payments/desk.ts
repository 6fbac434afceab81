/** The acts of the payment service on its own objects: sessions, payments, refunds, and the events they cause. */
import { brandOf, type Card } from "./cards";
import { invalidRequest, missingResource } from "./errors";
import {
  type CardError,
  type Charge,
  type CheckoutSession,
  type EventType,
  type Metadata,
  newId,
  type PaymentIntent,
  type PaymentsState,
  type SessionDetails,
} from "./objects";

/** Smallest charge in US dollars; other currencies have their own smallest amounts, about the same worth. */
const SMALLEST_AMOUNT = 50;
const LARGEST_AMOUNT = 99_999_999;
const SHORTEST_SESSION = 30 * 60;
const LONGEST_SESSION = 24 * 60 * 60;

export interface NewSession {
  successUrl: string;
  cancelUrl: string | null;
  clientReferenceId: string | null;
  customerEmail: string | null;
  currency: string;
  expiresAt: number | undefined;
  metadata: Metadata;
  submitType: string | null;
  details: SessionDetails;
}

export type PayResult =
  | { kind: "paid"; session: CheckoutSession }
  | { kind: "confirm"; session: CheckoutSession }
  | { kind: "declined"; message: string }
  | { kind: "closed"; session: CheckoutSession };

export type Emit = (type: EventType, object: object) => void;

/** Where the desk finds its state, its clock (seconds since 1970), its own address and its event outlet. */
export interface DeskParts {
  state: PaymentsState;
  now(): number;
  baseUrl(): string;
  emit: Emit;
}

export class Desk {
  private readonly parts: DeskParts;

  constructor(parts: DeskParts) {
    this.parts = parts;
  }

  createSession(wanted: NewSession): CheckoutSession {
    const { state, now } = this.parts;
    const total = wanted.details.lineItems.reduce((sum, item) => sum + item.amount_total, 0);
    if (total < SMALLEST_AMOUNT)
      throw invalidRequest("The Checkout Session's total amount due must add up to at least $0.50 usd", {
        code: "amount_too_small",
      });
    if (total > LARGEST_AMOUNT)
      throw invalidRequest("The Checkout Session's total amount must be no more than $999,999.99", {
        code: "amount_too_large",
      });
    const created = now();
    const expiresAt = wanted.expiresAt ?? created + LONGEST_SESSION;
    if (expiresAt < created + SHORTEST_SESSION - 5)
      throw invalidRequest(
        "The `expires_at` timestamp must be at least 30 minutes from Checkout Session creation.",
        {
          param: "expires_at",
        },
      );
    if (expiresAt > created + LONGEST_SESSION + 5)
      throw invalidRequest(
        "The `expires_at` timestamp must be less than 24 hours from Checkout Session creation.",
        {
          param: "expires_at",
        },
      );
    const id = newId("cs_test");
    const session: CheckoutSession = {
      id,
      object: "checkout.session",
      amount_subtotal: total,
      amount_total: total,
      cancel_url: wanted.cancelUrl,
      client_reference_id: wanted.clientReferenceId,
      created,
      currency: wanted.currency,
      customer: null,
      customer_details: wanted.customerEmail ? { email: wanted.customerEmail, name: null } : null,
      customer_email: wanted.customerEmail,
      expires_at: expiresAt,
      livemode: false,
      metadata: wanted.metadata,
      mode: "payment",
      payment_intent: null,
      payment_method_types: ["card"],
      payment_status: "unpaid",
      status: "open",
      submit_type: wanted.submitType,
      success_url: wanted.successUrl,
      url: `${this.parts.baseUrl()}/pay/${id}`,
    };
    state.sessions[id] = session;
    state.sessionDetails[id] = wanted.details;
    return session;
  }

  session(id: string): CheckoutSession {
    const session = this.parts.state.sessions[id];
    if (!session) throw missingResource("checkout.session", id);
    return session;
  }

  sessionDetails(id: string): SessionDetails {
    const details = this.parts.state.sessionDetails[id];
    if (!details) throw missingResource("checkout.session", id);
    return details;
  }

  expireSession(id: string): CheckoutSession {
    const session = this.session(id);
    if (session.status !== "open")
      throw invalidRequest(
        `Only Checkout Sessions with a status in ["open"] can be expired. This Checkout Session has a status of ${session.status}.`,
      );
    this.close(session);
    return session;
  }

  /** Expires what is past its time. */
  sweep() {
    for (const session of Object.values(this.parts.state.sessions))
      if (session.status === "open" && session.expires_at <= this.parts.now()) this.close(session);
  }

  private close(session: CheckoutSession) {
    session.status = "expired";
    session.url = null;
    const intent = session.payment_intent ? this.intent(session.payment_intent) : undefined;
    if (intent && intent.status !== "succeeded") {
      intent.status = "canceled";
      intent.canceled_at = this.parts.now();
      intent.cancellation_reason = "expired";
      this.parts.emit("payment_intent.canceled", intent);
    }
    this.parts.emit("checkout.session.expired", session);
  }

  /** One attempt on the pay page of a session that is still open. The payment intent comes into being with the first attempt. */
  pay(id: string, card: Card, email: string): PayResult {
    const session = this.session(id);
    const intent = this.intentOf(session);
    const { outcome } = card;
    if (outcome.kind === "asks-confirmation") {
      intent.status = "requires_action";
      return { kind: "confirm", session };
    }
    if (outcome.kind === "declined") {
      const error: CardError = { type: "card_error", code: outcome.code, message: outcome.message };
      if (outcome.declineCode) error.decline_code = outcome.declineCode;
      this.decline(intent, card, email, error);
      return { kind: "declined", message: outcome.message };
    }
    return this.complete(session, intent, card, email);
  }

  /** The answer to the confirm step of a card that asks for one. */
  confirm(id: string, card: Card, email: string, confirmed: boolean): PayResult {
    const session = this.session(id);
    const intent = session.payment_intent ? this.intent(session.payment_intent) : undefined;
    if (session.status !== "open" || intent?.status !== "requires_action") return { kind: "closed", session };
    if (confirmed) return this.complete(session, intent, card, email);
    const message =
      "We are unable to authenticate your payment method. Please choose a different payment method and try again.";
    this.decline(intent, card, email, {
      type: "card_error",
      code: "payment_intent_authentication_failure",
      message,
    });
    return { kind: "declined", message };
  }

  private complete(session: CheckoutSession, intent: PaymentIntent, card: Card, email: string): PayResult {
    const charge = this.newCharge(intent, card, email);
    intent.status = "succeeded";
    intent.amount_received = intent.amount;
    intent.last_payment_error = null;
    intent.latest_charge = charge.id;
    session.status = "complete";
    session.payment_status = "paid";
    session.url = null;
    session.customer_details = { email, name: null };
    this.parts.emit("payment_intent.succeeded", intent);
    this.parts.emit("checkout.session.completed", session);
    return { kind: "paid", session };
  }

  private decline(intent: PaymentIntent, card: Card, email: string, error: CardError) {
    const charge = this.newCharge(intent, card, email, error);
    intent.status = "requires_payment_method";
    intent.latest_charge = charge.id;
    intent.last_payment_error = { ...error, charge: charge.id };
    this.parts.emit("payment_intent.payment_failed", intent);
  }

  private intentOf(session: CheckoutSession): PaymentIntent {
    if (session.payment_intent) return this.intent(session.payment_intent);
    const details = this.sessionDetails(session.id);
    const intent: PaymentIntent = {
      id: newId("pi"),
      object: "payment_intent",
      amount: session.amount_total,
      amount_received: 0,
      canceled_at: null,
      cancellation_reason: null,
      created: this.parts.now(),
      currency: session.currency,
      description: details.intentDescription,
      last_payment_error: null,
      latest_charge: null,
      livemode: false,
      metadata: { ...details.intentMetadata },
      payment_method_types: ["card"],
      receipt_email: details.receiptEmail,
      status: "requires_payment_method",
    };
    this.parts.state.intents[intent.id] = intent;
    session.payment_intent = intent.id;
    return intent;
  }

  private newCharge(intent: PaymentIntent, card: Card, email: string, error?: CardError): Charge {
    const id = newId("ch");
    const charge: Charge = {
      id,
      object: "charge",
      amount: intent.amount,
      amount_captured: error ? 0 : intent.amount,
      amount_refunded: 0,
      balance_transaction: null,
      billing_details: { email, name: null },
      captured: !error,
      created: this.parts.now(),
      currency: intent.currency,
      description: intent.description,
      disputed: false,
      failure_code: error?.code ?? null,
      failure_message: error?.message ?? null,
      livemode: false,
      metadata: { ...intent.metadata },
      paid: !error,
      payment_intent: intent.id,
      payment_method_details: {
        type: "card",
        card: {
          brand: brandOf(card.number),
          last4: card.number.slice(-4),
          exp_month: card.expMonth,
          exp_year: card.expYear,
        },
      },
      receipt_email: intent.receipt_email,
      receipt_url: error ? null : `${this.parts.baseUrl()}/receipts/${id}`,
      refunded: false,
      status: error ? "failed" : "succeeded",
    };
    this.parts.state.charges[id] = charge;
    return charge;
  }

  intent(id: string): PaymentIntent {
    const intent = this.parts.state.intents[id];
    if (!intent) throw missingResource("payment_intent", id);
    return intent;
  }

  charge(id: string): Charge {
    const charge = this.parts.state.charges[id];
    if (!charge) throw missingResource("charge", id);
    return charge;
  }
}
