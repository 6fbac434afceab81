import type { LabelledParcel } from "~/models/parcels.server";
import { standingLabel } from "~/models/parcels.server";
import type { CarrierTracking } from "~/services/carrier.server";
import { carrier } from "~/services/clients.server";
import { FREIGHT } from "./note-freight.server";

export interface TrackedParcel {
  readonly number: number;
  readonly trackingNumber: string;
  readonly service: string;
  /** Null when the carrier does not say now, or is not the parcel carrier. */
  readonly tracking: CarrierTracking | null;
}

/** A page does not wait longer than this for the carrier; it then shows the numbers alone. Milliseconds. */
const PATIENCE = 2_000;

/** Where the carrier says an order's parcels are. */
export async function findTracking(parcels: readonly LabelledParcel[]): Promise<readonly TrackedParcel[]> {
  const labelled = parcels.flatMap((parcel) => {
    const label = standingLabel(parcel);
    return label ? [{ number: parcel.number, label }] : [];
  });
  return Promise.all(
    labelled.map(async ({ number, label }) => ({
      number,
      trackingNumber: label.trackingNumber,
      service: label.service,
      tracking: label.service === FREIGHT ? null : await askCarrier(label.trackingNumber),
    })),
  );
}

async function askCarrier(trackingNumber: string): Promise<CarrierTracking | null> {
  let timer: NodeJS.Timeout | undefined;
  const tooLong = new Promise<null>((resolve) => {
    timer = setTimeout(() => resolve(null), PATIENCE);
  });
  const asked = carrier.track(trackingNumber).then((answer) => (answer.ok ? answer.value : null));
  const first = await Promise.race([asked, tooLong]);
  clearTimeout(timer);
  return first;
}
