import type { PackView } from "~/routes/shipping/pack-view.server";
import { ActForm } from "../act-form";
import { Button } from "../button";
import { ConfirmButton } from "../confirm-button";
import { DateTime } from "../date-time";
import { plainField } from "../field";
import { Sheet } from "../sheet";
import { AddressLines } from "../shop/address-lines";
import { TextField } from "../text-field";
import { PrintLink } from "./print-link";
import { SignaturePad } from "./signature-pad";
import { TrackingList } from "./tracking-list";

/** The order leaves: to the carrier, or to the builder who signs for it. */
export function LeaveStep({ order }: { readonly order: PackView }) {
  if (order.stage === "shipped") return <Gone order={order} />;
  return order.isPickUp ? <PickUp order={order} /> : <Carrier order={order} />;
}

function Gone({ order }: { readonly order: PackView }) {
  return (
    <Sheet label="Left the shop" padded>
      <h2 className="mb-2 text-small font-semibold">
        {order.isPickUp ? "Picked up" : "With the carrier"}
        {order.shippedAt && (
          <>
            {" "}
            since <DateTime at={order.shippedAt} show="day-time" />
          </>
        )}
      </h2>
      {order.collection && (
        <figure className="space-y-1">
          <img
            src={`/shipping/${order.id}/signature.svg`}
            alt={`Signature of ${order.collection.name}`}
            className="w-full max-w-96 rounded-sheet border border-line bg-white"
          />
          <figcaption className="text-small">
            {order.collection.name}, <DateTime at={order.collection.at} show="day-time" />
          </figcaption>
        </figure>
      )}
      <TrackingList tracked={order.tracking} />
      <p className="mt-3 text-small text-soft">Only the owner takes a hand-over back.</p>
    </Sheet>
  );
}

function Carrier({ order }: { readonly order: PackView }) {
  const bare = order.parcels.filter(({ label }) => label === null).length;
  const may = order.mayEdit && order.ready.may && order.isPacked && bare === 0;
  const why =
    order.ready.why ??
    (order.isPacked
      ? bare > 0
        ? `${bare} ${bare === 1 ? "parcel has" : "parcels have"} no label yet.`
        : null
      : "The parcels are not closed yet.");
  const count = order.parcels.length;
  return (
    <Sheet label="Hand over" padded>
      <div className="grid gap-6 md:grid-cols-2">
        <div>
          <h2 className="mb-1 text-small font-semibold">Goes to</h2>
          {order.shipTo ? <AddressLines shipTo={order.shipTo} /> : <p>No address.</p>}
        </div>
        <div className="space-y-3">
          {may ? (
            <ActForm intent="hand-over" fields={{ version: order.version, requestId: order.requestId }}>
              {(pending) => (
                <ConfirmButton
                  label="Hand over to the carrier"
                  question={`${count} ${count === 1 ? "parcel" : "parcels"} with ${order.pieces.filter(({ state }) => state === "good").length} pieces leave the shop. The builder is told at once, with tracking.`}
                  confirm="The carrier has it"
                  variant="primary"
                  size="large"
                  pending={pending}
                />
              )}
            </ActForm>
          ) : (
            <>
              <Button type="button" disabled size="large">
                Hand over to the carrier
              </Button>
              <p className="text-caption text-soft">
                {order.mayEdit ? why : "Packing and handing over is the clerk's."}
              </p>
            </>
          )}
          {order.isPacked && (
            <PrintLink to={`/shipping/${order.id}/packing-list.pdf`}>Packing list, PDF</PrintLink>
          )}
        </div>
      </div>
    </Sheet>
  );
}

function PickUp({ order }: { readonly order: PackView }) {
  const may = order.mayEdit && order.ready.may && order.isCounted;
  if (!may)
    return (
      <Sheet label="Pick-up" padded>
        <p className="text-soft">
          {order.mayEdit
            ? (order.ready.why ?? "The pile is not counted yet.")
            : "Counting and handing over is the clerk's."}
        </p>
      </Sheet>
    );
  return (
    <div className="space-y-5">
      <Sheet label="Ready notice" padded>
        <div className="flex flex-wrap items-center gap-4">
          <ActForm intent="ready" fields={{ requestId: order.requestId }}>
            {(pending) => (
              <Button variant={order.toldReadyAt ? "plain" : "primary"} size="large" pending={pending}>
                {order.toldReadyAt ? "Tell the builder again" : "Tell the builder it is ready"}
              </Button>
            )}
          </ActForm>
          {order.toldReadyAt && (
            <p className="text-small text-soft">
              Told <DateTime at={order.toldReadyAt} show="day-time" />.
            </p>
          )}
          <PrintLink to={`/shipping/${order.id}/packing-list.pdf`}>Pick-up list, PDF</PrintLink>
        </div>
      </Sheet>
      <Sheet label="Signature" padded>
        <ActForm
          intent="collect"
          fields={{ version: order.version, requestId: order.requestId }}
          label="Sign for the pile"
        >
          {(pending) => (
            <div className="space-y-4">
              <h2 className="text-small font-semibold">{order.builder} picks it up</h2>
              <TextField
                field={plainField("name", { id: "taker", required: true })}
                label="Name of who takes it"
                minLength={2}
                maxLength={80}
                autoComplete="off"
              />
              <SignaturePad name="strokes" />
              <Button variant={order.toldReadyAt ? "primary" : "plain"} size="large" pending={pending}>
                Picked up and signed for
              </Button>
            </div>
          )}
        </ActForm>
      </Sheet>
    </div>
  );
}
