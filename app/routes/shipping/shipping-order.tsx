import { z } from "zod";
import { requireOrder } from "~/auth/guards.server";
import { ActForm, ActNotice } from "~/components/act-form";
import { Beside } from "~/components/beside";
import { Button } from "~/components/button";
import { ConfirmButton } from "~/components/confirm-button";
import { DateTime } from "~/components/date-time";
import { ErrorPanel } from "~/components/error-panel";
import { Size } from "~/components/measure";
import { Money } from "~/components/money";
import { Notice } from "~/components/notice";
import { HeaderFact, PageHeader } from "~/components/page-header";
import { Rail, RailSection } from "~/components/rail";
import { seenAnew } from "~/components/seen-anew";
import { Sheet } from "~/components/sheet";
import { AddressLines } from "~/components/shop/address-lines";
import { moveSchema } from "~/components/shop/order-acts";
import { ParcelsList } from "~/components/shop/parcels-list";
import { useShownUnit } from "~/components/shown-unit";
import { Cell, HeadCell, RowHead, Table, TableHead, TableRow } from "~/components/table";
import { TextLink } from "~/components/text-link";
import { handOver } from "~/flows/hand-over.server";
import { dispatchAct, formAct } from "../dispatch-act.server";
import type { Route } from "./+types/shipping-order";
import { type ShippingView, shippingView } from "./shipping-view.server";

const shipSchema = moveSchema.extend({ to: z.enum(["carrier", "builder"]) });

export async function loader(args: Route.LoaderArgs) {
  const { person, order } = await requireOrder(args, "shipping.read", args.params.orderId);
  return shippingView(order, person);
}

export async function action(args: Route.ActionArgs) {
  const { person, order } = await requireOrder(args, "shipping.edit", args.params.orderId);
  return dispatchAct(await args.request.formData(), {
    ship: formAct(shipSchema, async ({ to, ...move }) => {
      const verdict = await handOver({ actor: person, orderId: order.id, ...move });
      if (!verdict.ok) return verdict;
      const { parcels } = verdict;
      return {
        ok: true,
        words:
          to === "builder"
            ? "Picked up: the builder has it."
            : `Handed over in ${parcels} ${parcels === 1 ? "parcel" : "parcels"}.`,
      };
    }),
  });
}

export const shouldRevalidate = seenAnew;

export const meta: Route.MetaFunction = () => [{ title: "Pack and ship · Kerfpost" }];

export default function ShippingOrder({ loaderData: order, actionData }: Route.ComponentProps) {
  const isPickUp = order.delivery === "pick-up";
  return (
    <>
      <PageHeader
        eyebrow={
          <>
            <TextLink to="/shipping">Shipping</TextLink> ·{" "}
            <TextLink to={`/shop/orders/${order.id}`}>{order.reference}</TextLink> · {order.builder}
          </>
        }
        title={order.name}
        right={
          <HeaderFact label={order.shippedAt ? "handed over" : "promised"}>
            {order.shippedAt ? (
              <DateTime at={order.shippedAt} show="day-time" />
            ) : (
              order.promisedFor && <DateTime at={order.promisedFor} />
            )}
          </HeaderFact>
        }
      />
      <ActNotice
        reply={actionData}
        meanwhile={
          order.last && (
            <>
              It is {order.stage} now, since <DateTime at={order.last} show="day-time" />.
            </>
          )
        }
      />
      {order.blocks.length > 0 && <Notice title="It cannot leave yet">{order.blocks.join("; ")}.</Notice>}
      <Beside
        main={
          <div className="space-y-5">
            <Parcels order={order} />
            <Counted parts={order.parts} />
          </div>
        }
        rail={
          <Rail label="Hand over">
            <RailSection title={isPickUp ? "Pick-up" : "Goes to"}>
              {isPickUp || !order.shipTo ? (
                <p>{order.builder} picks it up at the shop.</p>
              ) : (
                <AddressLines shipTo={order.shipTo} />
              )}
            </RailSection>
            <RailSection
              title="Paid"
              note={order.owed > 0 ? <span className="text-amber">not in full</span> : "in full"}
            >
              {order.owed > 0 && (
                <p className="text-amber">
                  <Money cents={order.owed} /> is still owed.
                </p>
              )}
            </RailSection>
            <HandOver order={order} isPickUp={isPickUp} />
          </Rail>
        }
      />
    </>
  );
}

function Parcels({ order }: { readonly order: ShippingView }) {
  const { packed, suggested } = order;
  const parcels = packed.length > 0 ? packed : suggested;
  if (parcels.length === 0) return null;
  return (
    <Sheet>
      <h2 className="border-b border-line px-4 py-3 text-small font-semibold sm:px-6">
        {packed.length > 0 ? "Parcels" : "Suggested parcels"}
      </h2>
      <ParcelsList parcels={parcels} />
    </Sheet>
  );
}

function Counted({ parts }: { readonly parts: ShippingView["parts"] }) {
  const unit = useShownUnit();
  return (
    <Sheet padded>
      <Table caption="Counted against expected" captionShown>
        <TableHead>
          <HeadCell>part</HeadCell>
          <HeadCell numeric>size, {unit}</HeadCell>
          <HeadCell numeric>ready</HeadCell>
          <HeadCell numeric>expected</HeadCell>
        </TableHead>
        <tbody>
          {parts.map((part) => (
            <TableRow key={part.label}>
              <RowHead measured>
                {part.label} {part.name}
              </RowHead>
              <Cell numeric>
                <Size width={part.width} height={part.height} bare />
              </Cell>
              <Cell numeric>
                <span className={part.ready < part.expected ? "text-amber" : ""}>{part.ready}</span>
              </Cell>
              <Cell numeric>{part.expected}</Cell>
            </TableRow>
          ))}
        </tbody>
      </Table>
    </Sheet>
  );
}

function HandOver({ order, isPickUp }: { readonly order: ShippingView; readonly isPickUp: boolean }) {
  const { ship, stage } = order;
  if (stage === "shipped")
    return (
      <RailSection title="Done">
        <p className="text-soft">It has left the shop. Only the owner takes a hand-over back.</p>
      </RailSection>
    );
  const label = isPickUp ? "Picked up" : "Hand over to the carrier";
  return (
    <RailSection title="Hand over">
      {ship.may ? (
        <ActForm
          intent="ship"
          fields={{
            version: order.version,
            requestId: order.requestId,
            to: isPickUp ? "builder" : "carrier",
          }}
        >
          {(pending) => (
            <ConfirmButton
              label={label}
              question={`All ${order.parts.reduce((total, { expected }) => total + expected, 0)} pieces, counted. The builder is told at once.`}
              confirm={isPickUp ? "The builder has it" : "The carrier has it"}
              variant="primary"
              size="large"
              pending={pending}
            />
          )}
        </ActForm>
      ) : (
        <>
          <Button type="button" disabled wide>
            {label}
          </Button>
          <p className="mt-1 text-caption text-soft">
            {ship.notMine ? "Packing and handing over is the clerk's." : ship.why}
          </p>
        </>
      )}
    </RailSection>
  );
}

export function ErrorBoundary({ error }: Route.ErrorBoundaryProps) {
  return <ErrorPanel error={error} />;
}
