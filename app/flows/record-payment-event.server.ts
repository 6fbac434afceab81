import { transact } from "~/db/client.server";
import { storePaymentEvent } from "~/models/payment-events.server";
import { payments } from "~/services/clients.server";
import { refuse, type Verdict } from "./verdict";

/**
 * Verifies a webhook by its signature and stores it, before anything is done about it. `isNew` is false when the
 * same event came before.
 */
export async function recordPaymentEvent({
  rawBody,
  signature,
}: {
  /** Exactly as received: the signature is over its bytes. */
  rawBody: Uint8Array;
  signature: string | null;
}): Promise<Verdict<{ eventId: string; isNew: boolean }>> {
  const verified = payments.verifyWebhook(rawBody, signature);
  if (!verified.ok) return refuse("invalid", `Webhook refused: ${verified.reason}.`);
  const { id, type, objectId, objectType, paymentId, createdAt } = verified.event;
  const isNew = await transact((tx) =>
    storePaymentEvent(tx, {
      id,
      type,
      objectId,
      payload: { objectType, paymentId: paymentId ?? null, createdAt: createdAt.toISOString() },
    }),
  );
  return { ok: true, eventId: id, isNew };
}
