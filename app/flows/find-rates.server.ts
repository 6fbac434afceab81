import { db } from "~/db/client.server";
import type { CarrierRates } from "~/services/carrier.server";
import { carrier } from "~/services/clients.server";
import type { Actor } from "./actor";
import { carrierRefusal } from "./carrier-refusal";
import { carrierParcel, readyToLabel } from "./ready-to-label.server";
import type { Verdict } from "./verdict";

/** What the carrier asks for an order's parcels together, each service; `refused` names parcels it does not take. */
export async function findRates(options: {
  readonly actor: Actor;
  readonly orderId: string;
}): Promise<Verdict<CarrierRates>> {
  const ready = await readyToLabel(db, options);
  if (!ready.ok) return ready;
  const { from, to, parcels } = ready;
  const answer = await carrier.rates({ from, to, parcels: parcels.map(carrierParcel) });
  return answer.ok ? { ok: true, ...answer.value } : carrierRefusal(answer);
}
