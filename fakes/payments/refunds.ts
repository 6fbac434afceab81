/** Refunds of charges, whole or in part, and refunds that a bank sends back. */
import type { Desk, Emit } from "./desk";
import { invalidRequest, missingResource } from "./errors";
import { type Charge, type Metadata, newId, type PaymentsState, type Refund } from "./objects";

export interface NewRefund {
  paymentIntent: string | undefined;
  charge: string | undefined;
  amount: number | undefined;
  reason: string | null;
  metadata: Metadata;
}

export class Refunds {
  private readonly parts: { state: PaymentsState; desk: Desk; now(): number; emit: Emit };

  constructor(parts: Refunds["parts"]) {
    this.parts = parts;
  }

  find(id: string): Refund {
    const refund = this.parts.state.refunds[id];
    if (!refund) throw missingResource("refund", id);
    return refund;
  }

  create(wanted: NewRefund): Refund {
    const charge = this.chargeToRefund(wanted);
    const left = charge.amount_captured - charge.amount_refunded;
    if (left === 0)
      throw invalidRequest(`Charge ${charge.id} has already been refunded.`, {
        code: "charge_already_refunded",
      });
    const amount = wanted.amount ?? left;
    if (amount < 1)
      throw invalidRequest("This value must be greater than or equal to 1.", {
        code: "parameter_invalid_integer",
        param: "amount",
      });
    if (amount > left)
      throw invalidRequest(
        `Refund amount (${inDollars(amount)}) is greater than unrefunded amount on charge (${inDollars(left)})`,
        { param: "amount" },
      );
    const refund: Refund = {
      id: newId("re"),
      object: "refund",
      amount,
      balance_transaction: null,
      charge: charge.id,
      created: this.parts.now(),
      currency: charge.currency,
      metadata: wanted.metadata,
      payment_intent: charge.payment_intent,
      reason: wanted.reason,
      receipt_number: null,
      status: "succeeded",
    };
    this.parts.state.refunds[refund.id] = refund;
    charge.amount_refunded += amount;
    charge.refunded = charge.amount_refunded === charge.amount_captured;
    this.parts.emit("refund.created", refund);
    this.parts.emit("charge.refunded", charge);
    this.parts.emit("refund.updated", refund);
    return refund;
  }

  /** A bank sends a refund back days later: the money is the shop's again. */
  fail(id: string): Refund {
    const refund = this.find(id);
    if (refund.status === "failed") return refund;
    const charge = this.parts.desk.charge(refund.charge);
    refund.status = "failed";
    refund.failure_reason = "expired_or_canceled_card";
    charge.amount_refunded -= refund.amount;
    charge.refunded = false;
    this.parts.emit("refund.failed", refund);
    this.parts.emit("refund.updated", refund);
    return refund;
  }

  private chargeToRefund(wanted: NewRefund): Charge {
    if (wanted.charge) return this.parts.desk.charge(wanted.charge);
    if (!wanted.paymentIntent)
      throw invalidRequest(
        "One of the following params should be provided for this request: payment_intent or charge.",
      );
    const intent = this.parts.desk.intent(wanted.paymentIntent);
    const charge = intent.latest_charge ? this.parts.desk.charge(intent.latest_charge) : undefined;
    if (charge?.status !== "succeeded")
      throw invalidRequest(`This PaymentIntent (${intent.id}) does not have a successful charge to refund.`);
    return charge;
  }
}

function inDollars(amount: number): string {
  return `$${(amount / 100).toFixed(2)}`;
}
