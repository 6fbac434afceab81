import { formatKilograms, formatMoney } from "~/domain/units";
import type { PackView, ShownParcel } from "~/routes/shipping/pack-view.server";
import { ActForm } from "../act-form";
import { Button } from "../button";
import { ConfirmButton } from "../confirm-button";
import { DateTime } from "../date-time";
import { plainField } from "../field";
import { Notice } from "../notice";
import { RadioField } from "../radio-field";
import { Sheet } from "../sheet";
import { TextField } from "../text-field";
import { PagePreview } from "./page-preview";
import { PrintLink } from "./print-link";

/** Rates of the carrier, a label bought for each parcel, each shown as it prints. */
export function LabelStep({ order }: { readonly order: PackView }) {
  if (!order.isPacked)
    return (
      <Notice title="No label yet">
        {order.ready.why ?? "Close the parcels first: a label carries their sizes and weights."}
      </Notice>
    );
  const bare = order.parcels.filter(({ label }) => label === null);
  const small = bare.filter(({ notes }) => notes.beyond.length === 0);
  const open = order.mayEdit && order.stage !== "shipped";
  return (
    <div className="space-y-5">
      {open && small.length > 0 && <Rates order={order} parcels={small.length} />}
      <Sheet label="Labels" padded>
        <div className="mb-2 flex flex-wrap items-center justify-between gap-3">
          <h2 className="text-small font-semibold">Parcels and their labels</h2>
          <PrintLink to={`/shipping/${order.id}/packing-list.pdf`}>Packing list, PDF</PrintLink>
        </div>
        {order.missingPapers.length > 0 && (
          <p className="mb-2 text-small text-amber">
            The supplier's formaldehyde paper for {order.missingPapers.join(", ")} is not on file: no TSCA
            Title VI statement is printed for boxes with it. The owner adds it to the lot.
          </p>
        )}
        <ol className="divide-y divide-line">
          {order.parcels.map((parcel) => (
            <ParcelLabel key={parcel.id} order={order} parcel={parcel} open={open} />
          ))}
        </ol>
      </Sheet>
    </div>
  );
}

function Rates({ order, parcels }: { readonly order: PackView; readonly parcels: number }) {
  const { rates } = order;
  if (!rates) return null;
  if (rates.words) return <Notice title="No rates">{rates.words}</Notice>;
  if (rates.rates.length === 0)
    return (
      <Notice title="The carrier does not take this">
        {rates.refused.map(({ parcel, why }) => `Parcel ${parcel + 1}: ${why}`).join("; ")}.
      </Notice>
    );
  return (
    <Sheet label="Service" padded>
      <ActForm intent="buy" fields={{}} label="Buy labels">
        {(pending) => (
          <div className="space-y-4">
            <RadioField
              field={plainField("service", { id: "service", value: rates.rates[0]?.service, required: true })}
              label="Service"
              choices={rates.rates.map(({ service, name, amount, currency, days }) => ({
                value: service,
                label: name,
                note: formatMoney(amount, currency),
                hint: `${days} working ${days === 1 ? "day" : "days"}`,
              }))}
            />
            <Button variant="primary" size="large" pending={pending}>
              {`Buy ${parcels} ${parcels === 1 ? "label" : "labels"}`}
            </Button>
          </div>
        )}
      </ActForm>
    </Sheet>
  );
}

interface ParcelLabelProps {
  readonly order: PackView;
  readonly parcel: ShownParcel;
  readonly open: boolean;
}

function ParcelLabel({ order, parcel, open }: ParcelLabelProps) {
  const { label, notes } = parcel;
  return (
    <li className="grid gap-x-6 gap-y-3 py-4 md:grid-cols-[minmax(0,1fr)_20rem]">
      <div className="min-w-0 space-y-2">
        <p className="font-semibold">
          Parcel {parcel.number} of {order.parcels.length}
          {notes.teamLift && <span className="ml-3 text-amber">team lift: two people</span>}
        </p>
        <p className="measure text-small">{formatKilograms(parcel.kilograms)}</p>
        {label ? (
          <>
            <p>
              <span className="measure font-semibold">{label.trackingNumber}</span>
              <span className="block text-small text-soft">
                {label.service.replaceAll("-", " ")}, {label.price > 0 && `${formatMoney(label.price)}, `}
                <DateTime at={label.boughtAt} show="day-time" />
              </span>
            </p>
            <div className="flex flex-wrap items-start gap-3">
              <PrintLink to={`/shipping/${order.id}/parcels/${parcel.id}/label.pdf`}>
                Print the label
              </PrintLink>
              {open && (
                <ActForm intent="void" fields={{ key: label.id, labelId: label.id }}>
                  {(pending) => (
                    <ConfirmButton
                      label="Void"
                      question="The carrier takes it back; the parcel needs another label."
                      confirm="Void this label"
                      variant="plain"
                      pending={pending}
                    />
                  )}
                </ActForm>
              )}
            </div>
          </>
        ) : (
          <NoLabel parcel={parcel} open={open} />
        )}
        {parcel.voided.map(({ trackingNumber, at }) => (
          <p key={trackingNumber} className="text-caption text-soft">
            <span className="measure line-through">{trackingNumber}</span> void
            {at && (
              <>
                {" "}
                since <DateTime at={at} show="day-time" />
              </>
            )}
          </p>
        ))}
      </div>
      {label?.page && (
        <PagePreview page={label.page} label={`Label of parcel ${parcel.number} as it prints`} />
      )}
    </li>
  );
}

function NoLabel({ parcel, open }: { readonly parcel: ShownParcel; readonly open: boolean }) {
  if (parcel.notes.beyond.length === 0) return <p className="text-soft">No label yet.</p>;
  return (
    <>
      <p className="text-amber">No parcel: {parcel.notes.beyond.join(", ")}. It goes by freight.</p>
      {open && (
        <ActForm intent="freight" fields={{ key: parcel.id, parcelId: parcel.id }}>
          {(pending) => (
            <div className="flex flex-wrap items-end gap-3">
              <TextField
                field={plainField("number", { id: `freight-${parcel.id}`, required: true })}
                label="Number on the bill of lading"
                measured
                minLength={3}
                maxLength={40}
              />
              <Button pending={pending}>Write it down</Button>
            </div>
          )}
        </ActForm>
      )}
    </>
  );
}
