import type { TrackedParcel } from "~/flows/find-tracking.server";
import { DateTime } from "../date-time";

/** Where the carrier says each parcel is. */
export function TrackingList({ tracked }: { readonly tracked: readonly TrackedParcel[] }) {
  if (tracked.length === 0) return null;
  return (
    <ol className="mt-3 divide-y divide-line">
      {tracked.map(({ number, trackingNumber, service, tracking }) => {
        const last = tracking?.events.at(-1);
        return (
          <li key={trackingNumber} className="py-2 text-small">
            <p className="flex flex-wrap justify-between gap-x-4">
              <span>
                Parcel {number}, {service.replaceAll("-", " ")}
              </span>
              <span className="measure break-all">{trackingNumber}</span>
            </p>
            <p className="text-soft">
              {tracking ? tracking.status.replaceAll("-", " ") : "the carrier does not say now"}
              {last && (
                <>
                  , {last.place}, <DateTime at={last.at} show="day-time" />
                </>
              )}
            </p>
          </li>
        );
      })}
    </ol>
  );
}
