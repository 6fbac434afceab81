import { db, transact } from "~/db/client.server";
import { closeCheckout, findOpenCheckout } from "~/models/checkouts.server";
import { recordEvent } from "~/models/events.server";
import { payments } from "~/services/clients.server";
import { settleCheckout } from "./settle-checkout.server";
import { refuse, type Verdict } from "./verdict";

/**
 * Closes an order's open checkout, at the payment service first: a page that was paid in the meantime is settled
 * as paid, and the caller is refused. Does nothing when none is open.
 */
export async function closeOpenCheckout({
  orderId,
  as,
}: {
  orderId: string;
  as: "cancelled" | "expired";
}): Promise<Verdict> {
  const open = await findOpenCheckout(db, orderId);
  if (!open) return { ok: true };
  if (open.sessionId !== null) {
    const answer = await payments.expireCheckout(open.sessionId);
    if (!answer.ok && answer.reason === "refused") {
      const settled = await settleCheckout(open.sessionId);
      if (!settled.ok) return settled;
      if (settled.outcome === "paid") return refuse("already-paid", "The payment has just come in.");
    } else if (!answer.ok && answer.reason !== "not-found") {
      return refuse("unavailable", "The payment service does not answer. Try again in a minute.");
    }
  }
  await transact(async (tx) => {
    if (await closeCheckout(tx, open.id, as))
      await recordEvent(tx, { orderId, kind: "payment", data: { checkout: as } });
  });
  return { ok: true };
}
