import { data, Form, redirect } from "react-router";
import { requireOrder } from "~/auth/guards.server";
import { Button } from "~/components/button";
import { ButtonLink } from "~/components/button-link";
import { DateTime } from "~/components/date-time";
import { ErrorPanel } from "~/components/error-panel";
import { useLiveOrder } from "~/components/live";
import { Money } from "~/components/money";
import { PriceLines } from "~/components/order/price-lines";
import { RefusalNotice } from "~/components/order/refusal-notice";
import { useLate } from "~/components/order/use-late";
import { PageHeader } from "~/components/page-header";
import { RuleProgress } from "~/components/rule-progress";
import { Sheet } from "~/components/sheet";
import { db } from "~/db/client.server";
import { settleCheckout } from "~/flows/settle-checkout.server";
import { REFUSAL_STATUS } from "~/flows/verdict";
import { findCheckout } from "~/models/checkouts.server";
import { newestEventId } from "~/models/events.server";
import { findQuote, listQuoteLines } from "~/models/quotes.server";
import { currentSettings } from "~/models/settings.server";
import type { Route } from "./+types/checkout";

/** Where the pay page leads back to: what came of it, as the payment service tells it, not as the browser does. */
export async function loader(args: Route.LoaderArgs) {
  const { order } = await requireOrder(args, "order.pay", args.params.orderId);
  const eventId = await newestEventId(db, order.id);
  const checkoutId = new URL(args.request.url).searchParams.get("checkout") ?? "";
  const checkout = await findCheckout(db, order.id, checkoutId);
  if (!checkout) throw redirect(`/orders/${order.id}`);
  const quote = await findQuote(db, order.id, checkout.quoteId);
  const { shop } = await currentSettings(db);
  return {
    orderId: order.id,
    reference: order.reference,
    name: order.name,
    eventId,
    promisedFor: order.promisedFor?.toISOString() ?? null,
    paidAt: order.paidAt?.toISOString() ?? null,
    outcome: outcomeOf(checkout, order.paidAt),
    failure: checkout.lastFailure,
    amount: checkout.amount,
    currency: checkout.currency,
    lines: (quote ? await listQuoteLines(db, quote.id) : []).map(({ id, label, how, amount }) => ({
      id,
      label,
      how,
      amount,
    })),
    shop: { name: shop.name, email: shop.email },
  };
}

type Outcome = "waiting" | "paid" | "paid-late" | "expired" | "cancelled" | "failed";

function outcomeOf(
  { status, lastFailure }: { status: "open" | "paid" | "expired" | "cancelled"; lastFailure: string | null },
  paidAt: Date | null,
): Outcome {
  if (status === "paid") return paidAt === null ? "paid-late" : "paid";
  if (status !== "open") return status;
  return lastFailure === null ? "waiting" : "failed";
}

/** Asks the payment service itself, where its news is late. */
export async function action(args: Route.ActionArgs) {
  const { order } = await requireOrder(args, "order.pay", args.params.orderId);
  const checkoutId = new URL(args.request.url).searchParams.get("checkout") ?? "";
  const checkout = await findCheckout(db, order.id, checkoutId);
  if (!checkout?.sessionId) return { refusal: null };
  const settled = await settleCheckout(checkout.sessionId);
  if (settled.ok) return { refusal: null };
  const { reason, words } = settled;
  return data({ refusal: { reason, words } }, { status: REFUSAL_STATUS[reason] });
}

export default function Checkout({ loaderData, actionData }: Route.ComponentProps) {
  const { orderId, reference, name, eventId, outcome } = loaderData;
  useLiveOrder({ orderId, after: eventId });
  const late = useLate(outcome === "waiting");
  const words = wordsOf(loaderData);
  return (
    <div className="mx-auto max-w-2xl space-y-5">
      <div role="status">
        <PageHeader eyebrow={`${reference} · ${name}`} title={words.title} lead={words.lead} />
      </div>
      <RefusalNotice refusal={actionData?.refusal ?? null} />
      <Sheet padded>
        {outcome === "waiting" ? (
          <div className="space-y-4">
            <RuleProgress label="Waiting for the payment service" share={null} note="a few seconds" />
            {late && (
              <Form method="post" className="flex flex-wrap items-center gap-3 text-small">
                <Button size="small">Ask the payment service</Button>
                <span className="text-soft">
                  It is late. You can leave this page too: the receipt comes by e-mail.
                </span>
              </Form>
            )}
          </div>
        ) : (
          <Receipt facts={loaderData} />
        )}
      </Sheet>
      <div className="flex flex-wrap gap-2">
        <ButtonLink to={`/orders/${orderId}`} variant={outcome === "waiting" ? "plain" : "primary"}>
          {outcome === "paid" ? "Follow the order" : "Back to the order"}
        </ButtonLink>
        <ButtonLink to="/orders">All orders</ButtonLink>
      </div>
    </div>
  );
}

type Facts = Route.ComponentProps["loaderData"];

function Receipt({ facts }: { readonly facts: Facts }) {
  const { outcome, amount, currency, lines, paidAt, promisedFor } = facts;
  const paid = outcome === "paid";
  return (
    <div className="text-small">
      <div className="flex items-baseline justify-between gap-4">
        <h2 className="text-small font-semibold">{paid ? "Receipt" : "Still to pay"}</h2>
        <Money cents={amount} currency={currency} show="price" />
      </div>
      <PriceLines lines={lines} currency={currency} />
      {paid && (
        <dl className="mt-2 grid grid-cols-[auto_1fr] gap-x-4 border-t border-line pt-2">
          {paidAt && (
            <>
              <dt>Paid</dt>
              <dd className="text-right">
                <DateTime at={paidAt} show="full" />
              </dd>
            </>
          )}
          {promisedFor && (
            <>
              <dt>Ships</dt>
              <dd className="text-right">
                <DateTime at={promisedFor} />
              </dd>
            </>
          )}
        </dl>
      )}
    </div>
  );
}

function wordsOf({ outcome, failure, shop }: Facts): { title: string; lead: string } {
  switch (outcome) {
    case "waiting":
      return {
        title: "One moment",
        lead: "You are back from the pay page. As soon as the payment service confirms, the order goes to the shop.",
      };
    case "paid":
      return { title: "Paid", lead: `${shop.name} has your order. The receipt is on its way by e-mail.` };
    case "paid-late":
      return {
        title: "Your payment is in",
        lead: `It came for a quote that no longer counted, so ${shop.name} looks at it: you hear from them, and nothing is lost. Write to ${shop.email} if it is urgent.`,
      };
    case "failed":
      return {
        title: "The card was not charged",
        lead: `${failure ?? "The payment service refused it."} The order waits as it was: go back and try another card.`,
      };
    case "expired":
      return {
        title: "The pay page ran out",
        lead: "Nothing was charged. The quote still stands: go back and open a new pay page.",
      };
    case "cancelled":
      return {
        title: "Not paid",
        lead: "The pay page was closed. Nothing was charged, and the order waits as it was.",
      };
  }
}

export const meta: Route.MetaFunction = ({ loaderData }) => [
  { title: loaderData ? `${loaderData.reference} payment · Kerfpost` : "Payment · Kerfpost" },
];

export function ErrorBoundary({ error }: Route.ErrorBoundaryProps) {
  return <ErrorPanel error={error} />;
}
