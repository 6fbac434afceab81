/** The service's objects as far as they are used, in its own field names; amounts in the smallest unit. */
import { randomBytes } from "node:crypto";

export type Metadata = Record<string, string>;

export interface LineItem {
  id: string;
  object: "item";
  description: string;
  quantity: number;
  currency: string;
  amount_subtotal: number;
  amount_total: number;
}

export interface CheckoutSession {
  id: string;
  object: "checkout.session";
  amount_subtotal: number;
  amount_total: number;
  cancel_url: string | null;
  client_reference_id: string | null;
  created: number;
  currency: string;
  customer: null;
  customer_details: { email: string | null; name: string | null } | null;
  customer_email: string | null;
  expires_at: number;
  livemode: false;
  metadata: Metadata;
  mode: "payment";
  payment_intent: string | null;
  payment_method_types: string[];
  payment_status: "paid" | "unpaid";
  status: "complete" | "expired" | "open";
  submit_type: string | null;
  success_url: string;
  url: string | null;
}

/** What the session was made with that is not part of its public shape. */
export interface SessionDetails {
  lineItems: LineItem[];
  intentDescription: string | null;
  intentMetadata: Metadata;
  receiptEmail: string | null;
}

export interface PaymentIntent {
  id: string;
  object: "payment_intent";
  amount: number;
  amount_received: number;
  canceled_at: number | null;
  cancellation_reason: string | null;
  created: number;
  currency: string;
  description: string | null;
  last_payment_error: CardError | null;
  latest_charge: string | null;
  livemode: false;
  metadata: Metadata;
  payment_method_types: string[];
  receipt_email: string | null;
  status: "canceled" | "requires_action" | "requires_payment_method" | "succeeded";
}

export interface CardError {
  type: "card_error";
  code: string;
  decline_code?: string;
  message: string;
  charge?: string;
}

export interface Charge {
  id: string;
  object: "charge";
  amount: number;
  amount_captured: number;
  amount_refunded: number;
  balance_transaction: null;
  billing_details: { email: string | null; name: string | null };
  captured: boolean;
  created: number;
  currency: string;
  description: string | null;
  disputed: false;
  failure_code: string | null;
  failure_message: string | null;
  livemode: false;
  metadata: Metadata;
  paid: boolean;
  payment_intent: string;
  payment_method_details: {
    type: "card";
    card: { brand: string; last4: string; exp_month: number; exp_year: number };
  };
  receipt_email: string | null;
  receipt_url: string | null;
  refunded: boolean;
  status: "failed" | "succeeded";
}

export interface Refund {
  id: string;
  object: "refund";
  amount: number;
  balance_transaction: null;
  charge: string;
  created: number;
  currency: string;
  failure_reason?: string;
  metadata: Metadata;
  payment_intent: string;
  reason: string | null;
  receipt_number: null;
  status: "failed" | "succeeded";
}

export type EventType =
  | "checkout.session.completed"
  | "checkout.session.expired"
  | "payment_intent.succeeded"
  | "payment_intent.payment_failed"
  | "payment_intent.canceled"
  | "charge.refunded"
  | "refund.created"
  | "refund.updated"
  | "refund.failed";

export interface ServiceEvent {
  id: string;
  object: "event";
  api_version: string;
  created: number;
  data: { object: object };
  livemode: false;
  pending_webhooks: number;
  request: { id: string | null; idempotency_key: string | null };
  type: EventType;
}

export interface StoredReply {
  fingerprint: string;
  status: number;
  body: unknown;
  requestId: string;
  /** Seconds since 1970. */
  created: number;
}

export interface StoredEvent {
  event: ServiceEvent;
  delivered: boolean;
  attempts: number;
}

export interface PaymentsState {
  sessions: Record<string, CheckoutSession>;
  sessionDetails: Record<string, SessionDetails>;
  intents: Record<string, PaymentIntent>;
  charges: Record<string, Charge>;
  refunds: Record<string, Refund>;
  events: StoredEvent[];
  replies: Record<string, StoredReply>;
}

export function emptyState(): PaymentsState {
  return { sessions: {}, sessionDetails: {}, intents: {}, charges: {}, refunds: {}, events: [], replies: {} };
}

export function newId(prefix: string): string {
  return `${prefix}_${randomBytes(12).toString("hex")}`;
}
