import type { CarrierReason } from "~/services/carrier.server";
import { type Refusal, type RefusalReason, refuse } from "./verdict";

const REASONS: Readonly<Record<CarrierReason, RefusalReason>> = {
  "over-limit": "invalid",
  "already-scanned": "wrong-stage",
  conflict: "changed",
  "not-found": "not-found",
  refused: "invalid",
  unavailable: "unavailable",
  misconfigured: "unavailable",
};

/** What the carrier said no to, in words for the clerk. */
export function carrierRefusal({ reason, message }: { reason: CarrierReason; message: string }): Refusal {
  if (reason === "unavailable" || reason === "misconfigured")
    return refuse("unavailable", "The carrier does not answer. Nothing was bought or changed; try again.");
  if (reason === "conflict")
    return refuse(
      "changed",
      "The carrier made a label for this parcel before, with another service or size.",
    );
  return refuse(REASONS[reason], `The carrier says: ${message}`);
}
