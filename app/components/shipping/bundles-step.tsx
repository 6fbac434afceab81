import { useMemo, useState } from "react";
import { bySize, parcelNotes, stackPieces } from "~/domain/shipping";
import { formatKilograms, formatLength } from "~/domain/units";
import type { PackView } from "~/routes/shipping/pack-view.server";
import { ActForm } from "../act-form";
import { Button } from "../button";
import { plainField } from "../field";
import { Measure, Size } from "../measure";
import { SelectField } from "../select-field";
import { Sheet } from "../sheet";
import { useShownUnit } from "../shown-unit";
import { ParcelDrawing } from "./parcel-drawing";

type Bundle = readonly string[];

/** Which piece goes into which parcel: as suggested, or moved by hand; sizes and weights follow at once. */
export function BundlesStep({ order }: { readonly order: PackView }) {
  const unit = useShownUnit();
  const [bundles, setBundles] = useState<readonly Bundle[]>(order.bundles);
  const flat = useMemo(() => new Map(order.flat.map((piece) => [piece.id, piece])), [order.flat]);
  const names = useMemo(
    () => new Map(order.pieces.map(({ id, label, number, of }) => [id, `${label} ${number} of ${of}`])),
    [order.pieces],
  );
  const filled = bundles.filter((bundle) => bundle.length > 0);
  const closed = filled.map((bundle) => {
    const inside = bundle.flatMap((id) => flat.get(id) ?? []).toSorted(bySize);
    const size = stackPieces(inside, order.limits);
    return { bundle, inside, size, notes: parcelNotes(size, size.kilograms, order.limits) };
  });
  const labelled = order.parcels.some(({ label }) => label !== null);
  const open = order.mayEdit && order.stage !== "shipped" && !labelled;
  const move = (id: string, to: number) =>
    setBundles(
      [...filled, []].map((bundle, index) => {
        const rest = bundle.filter((one) => one !== id);
        return index === to ? [...rest, id] : rest;
      }),
    );
  const longest = Math.max(...closed.map(({ size }) => size.length), 1);
  return (
    <Sheet label="Parcels" padded>
      <div className="mb-3 flex flex-wrap items-baseline justify-between gap-3">
        <h2 className="text-small font-semibold">
          {order.isPacked ? "Parcels as closed" : "Parcels as suggested"}
        </h2>
        <p className="text-caption text-soft">
          A parcel takes <span className="measure">{formatKilograms(order.limits.maxKilograms)}</span>,{" "}
          <span className="measure">{formatLength(order.limits.maxLength, unit)}</span> long,{" "}
          <span className="measure">{formatLength(order.limits.maxLengthPlusGirth, unit)}</span> length and
          girth together.
        </p>
      </div>
      <ol className="divide-y divide-line">
        {closed.map(({ bundle, inside, size, notes }, index) => (
          <li key={bundle.join()} className="grid gap-x-6 gap-y-3 py-4 lg:grid-cols-[20rem_minmax(0,1fr)]">
            <ParcelDrawing size={size} pieces={inside} longest={longest} />
            <div className="min-w-0 text-small">
              <p className="font-semibold">
                Parcel {index + 1} of {closed.length}
                {notes.teamLift && <span className="ml-3 text-amber">team lift: two people</span>}
              </p>
              <p>
                <Size width={size.length} height={size.width} bare /> × <Measure length={size.height} /> ·{" "}
                <span className="measure">{formatKilograms(size.kilograms)}</span> · billed{" "}
                <span className="measure">{notes.billedPounds} lb</span>
              </p>
              <p className="text-caption text-soft">
                Length and girth <Measure length={notes.lengthPlusGirth} digits={0} />; packing is in size and
                weight.
              </p>
              {notes.beyond.map((words) => (
                <p key={words} className="text-amber">
                  No parcel: {words}. It goes by freight.
                </p>
              ))}
              <ul className="mt-2 grid gap-x-6 gap-y-1 sm:grid-cols-2">
                {inside.map(({ id }) => (
                  <li key={id} className="flex items-center gap-4">
                    <span className="measure w-28 shrink-0">{names.get(id)}</span>
                    {open && (
                      <span className="w-36">
                        <SelectField
                          field={plainField(`to-${id}`, { id: `to-${id}`, value: String(index) })}
                          label={`Parcel of ${names.get(id)}`}
                          labelHidden
                          choices={[
                            ...closed.map((_, at) => ({ value: String(at), label: `parcel ${at + 1}` })),
                            { value: String(closed.length), label: "a new one" },
                          ]}
                          onChange={(event) => move(id, Number(event.currentTarget.value))}
                        />
                      </span>
                    )}
                  </li>
                ))}
              </ul>
            </div>
          </li>
        ))}
      </ol>
      {labelled && (
        <p className="mt-3 text-small text-soft">
          Labels are bought: they carry these sizes and weights. Void them to pack otherwise.
        </p>
      )}
      {open && (
        <div className="mt-4 border-t border-line pt-4">
          <ActForm intent="pack" fields={{ bundles: JSON.stringify(closed.map(({ bundle }) => bundle)) }}>
            {(pending) => (
              <Button
                variant={order.isPacked ? "plain" : "primary"}
                size="large"
                pending={pending}
                disabled={!order.isCounted || !order.ready.may}
              >
                {`Close ${closed.length} ${closed.length === 1 ? "parcel" : "parcels"} so`}
              </Button>
            )}
          </ActForm>
          {!(order.isCounted && order.ready.may) && (
            <p className="mt-1 text-caption text-soft">{order.ready.why ?? "The pile is not counted yet."}</p>
          )}
        </div>
      )}
    </Sheet>
  );
}
