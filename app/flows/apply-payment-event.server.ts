import { z } from "zod";
import { db, transact } from "~/db/client.server";
import {
  findPaymentEvent,
  markEventApplied,
  markEventFailed,
  type PaymentEvent,
} from "~/models/payment-events.server";
import { payments } from "~/services/clients.server";
import { settleCheckout } from "./settle-checkout.server";
import { settleToldRefund } from "./settle-refund.server";
import { refuse, type Verdict } from "./verdict";

const payloadSchema = z.object({ objectType: z.string() });

/**
 * Applies a stored event: the object is fetched anew, since events come in any order and twice. What cannot be
 * applied stays stored with its attempts, and the sweep tries again.
 */
export async function applyPaymentEvent(eventId: string): Promise<Verdict<{ outcome: string }>> {
  const event = await findPaymentEvent(db, eventId);
  if (!event) return refuse("not-found", "There is no such event.");
  if (event.appliedAt) return { ok: true, outcome: event.outcome ?? "applied" };
  let applied: Verdict<{ outcome: string }>;
  try {
    applied = await apply(event);
  } catch (error) {
    await transact((tx) =>
      markEventFailed(tx, event.id, error instanceof Error ? error.message : String(error)),
    );
    throw error;
  }
  await transact((tx) =>
    applied.ok
      ? markEventApplied(tx, event.id, applied.outcome)
      : markEventFailed(tx, event.id, applied.words),
  );
  return applied;
}

async function apply(event: PaymentEvent): Promise<Verdict<{ outcome: string }>> {
  const { objectType } = payloadSchema.parse(event.payload);
  if (objectType === "checkout.session") return settleCheckout(event.objectId);
  if (objectType === "payment_intent") {
    const found = await payments.findCheckoutOfPayment(event.objectId);
    if (!found.ok) return refuse("unavailable", found.message);
    if (!found.value) return { ok: true, outcome: "not of a checkout" };
    return settleCheckout(found.value.id);
  }
  if (objectType === "refund") return settleToldRefund(event.objectId);
  return { ok: true, outcome: "nothing to apply" };
}
