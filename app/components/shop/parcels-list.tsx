import { formatKilograms } from "~/domain/units";
import { Measure, Size } from "../measure";

export interface ShownParcel {
  readonly number: number;
  /** Millimetres and kilograms, packing included. */
  readonly length: number;
  readonly width: number;
  readonly height: number;
  readonly kilograms: number;
  readonly oversize?: boolean;
  /** `A ×2, B ×4` */
  readonly content: string;
}

/** Parcels with their faces drawn to one scale, their sizes, weights and what lies in them. */
export function ParcelsList({ parcels }: { readonly parcels: readonly ShownParcel[] }) {
  const longest = Math.max(...parcels.map(({ length }) => length), 1);
  return (
    <ol className="divide-y divide-line">
      {parcels.map((parcel) => (
        <li key={parcel.number} className="flex flex-wrap items-center gap-x-6 gap-y-3 px-4 py-4 sm:px-6">
          <ParcelFace parcel={parcel} longest={longest} />
          <div className="min-w-0 flex-1 basis-56 text-small">
            <p className="font-semibold">
              Parcel {parcel.number} of {parcels.length}
            </p>
            <p>
              <Size width={parcel.length} height={parcel.width} bare /> ×{" "}
              <Measure length={parcel.height} digits={1} />
            </p>
            <p className="measure">{formatKilograms(parcel.kilograms)}</p>
            <p className="measure break-words text-soft">{parcel.content}</p>
            {parcel.oversize && (
              <p className="text-amber">Larger or heavier than a parcel may be: on a pallet.</p>
            )}
          </div>
        </li>
      ))}
    </ol>
  );
}

const FACE = { width: 168, height: 96 };

function ParcelFace({ parcel, longest }: { readonly parcel: ShownParcel; readonly longest: number }) {
  const scale = Math.min(FACE.width / longest, FACE.height / Math.max(parcel.width, 1));
  const width = parcel.length * scale;
  const height = parcel.width * scale;
  return (
    <svg aria-hidden="true" width={FACE.width + 2} height={height + 2} className="shrink-0">
      <rect x="1" y="1" width={width} height={height} strokeWidth="1.3" className="fill-grain stroke-ink" />
      <path
        d={`M${1 + width / 3} 1v${height}M${1 + (2 * width) / 3} 1v${height}`}
        strokeWidth="0.8"
        strokeDasharray="3 3"
        className="stroke-edge"
      />
    </svg>
  );
}
