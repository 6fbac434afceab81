import { formatMoney } from "~/domain/units";
import type { FrozenView } from "~/routes/builder/frozen-view.server";
import type { OrderView } from "~/routes/builder/order-view.server";
import { Button } from "../button";
import { CheckboxField } from "../checkbox-field";
import { DateTime } from "../date-time";
import { plainField } from "../field";
import { Money } from "../money";
import { Notice } from "../notice";
import { RailSection } from "../rail";
import { PriceLines } from "./price-lines";
import { RefusalNotice } from "./refusal-notice";
import { useAct } from "./use-act";

type Quote = NonNullable<FrozenView["quote"]>;

interface PayPanelProps {
  readonly order: OrderView;
  readonly quote: Quote;
  readonly checkout: FrozenView["checkout"];
  /** Kinds of part and pieces in the list that is approved. */
  readonly counts: { readonly kinds: number; readonly pieces: number };
}

/** The quote with its lines; at its foot the release and the payment, or a new price once its time is over. */
export function PayPanel({ order, quote, checkout, counts }: PayPanelProps) {
  return (
    <RailSection title={`Quote ${quote.number}`}>
      <p className="-mt-8 text-right">
        <Money cents={quote.total} currency={quote.currency} show="price" />
      </p>
      <p className={`mt-1 text-right text-caption ${quote.expired ? "text-amber" : "text-soft"}`}>
        {quote.expired ? "its time was over on " : "holds until "}
        <DateTime at={quote.expiresAt} show="day-time" />
      </p>
      <PriceLines lines={quote.lines} currency={quote.currency} />
      {quote.changed.length > 0 && <Changed quote={quote} />}
      {order.stage === "quoted" &&
        (quote.expired ? (
          <PriceAgain order={order} />
        ) : (
          <ReleaseAndPay order={order} quote={quote} checkout={checkout} counts={counts} />
        ))}
      {(order.stage === "quoted" || order.stage === "needs-review") && <ChangeDrawing order={order} />}
    </RailSection>
  );
}

/** What a price made anew differs in. */
function Changed({ quote }: { readonly quote: Quote }) {
  return (
    <div className="mt-2 border-l-4 border-edge px-3 py-1">
      <p className="font-semibold">Changed since the quote before</p>
      <ul>
        {quote.changed.map(({ id, label, difference }) => (
          <li key={id} className="flex justify-between gap-4">
            {label}
            <span className="measure">
              {difference > 0 ? "+" : ""}
              <Money cents={difference} currency={quote.currency} show="line" />
            </span>
          </li>
        ))}
      </ul>
    </div>
  );
}

function ReleaseAndPay({ order, quote, checkout, counts }: PayPanelProps) {
  const act = useAct("pay");
  const fault = act.result?.error?.approved;
  const approved = quote.approvedAt !== null;
  return (
    <act.Form method="post" className="mt-4 space-y-3 print:hidden">
      {checkout && <LastTry checkout={checkout} />}
      <RefusalNotice refusal={act.refusal} />
      <input type="hidden" name="intent" value="pay" />
      <input type="hidden" name="version" value={order.version} />
      <input type="hidden" name="quoteId" value={quote.id} />
      <input type="hidden" name="listHash" value={quote.listHash} />
      {approved ? (
        <>
          <input type="hidden" name="approved" value="yes" />
          <p className="text-soft">
            You approved the part list on <DateTime at={quote.approvedAt ?? ""} show="day-time" />.
          </p>
        </>
      ) : (
        <CheckboxField
          field={plainField("approved", {
            id: "approved",
            required: true,
            ...(fault ? { errors: fault } : {}),
          })}
          value="yes"
          label={`I have checked the part list: ${counts.pieces} ${counts.pieces === 1 ? "piece" : "pieces"} of ${counts.kinds} ${counts.kinds === 1 ? "kind" : "kinds"}, their sizes and stock. Cut them so.`}
          hint="The design, its strength and its safety are yours to answer for; the shop checks only whether it can be cut. Parts made to a drawing cannot be returned."
        />
      )}
      <Button variant="primary" size="large" wide pending={act.pending}>
        Pay {formatMoney(quote.total, quote.currency)}
      </Button>
      <p className="text-caption text-soft">
        The card is taken on the payment service's own page. The date counts from the payment.
      </p>
    </act.Form>
  );
}

/** What came of the newest try at paying; the order can be paid all the same. */
function LastTry({ checkout }: { readonly checkout: NonNullable<FrozenView["checkout"]> }) {
  const { status, failure } = checkout;
  if (status === "expired")
    return <Notice title="The pay page ran out">Nothing was charged. Press Pay to open a new one.</Notice>;
  if (failure)
    return (
      <Notice title="The card was not charged">
        {failure} {status === "open" ? "Press Pay to try another card." : "Press Pay to try again."}
      </Notice>
    );
  if (status === "cancelled")
    return (
      <Notice tone="note" title="Not paid yet">
        The pay page was left. Nothing was charged.
      </Notice>
    );
  return null;
}

function PriceAgain({ order }: { readonly order: OrderView }) {
  const { Form, pending, refusal } = useAct("requote");
  return (
    <Form method="post" className="mt-4 space-y-3 print:hidden">
      <RefusalNotice refusal={refusal} />
      <input type="hidden" name="intent" value="requote" />
      <input type="hidden" name="version" value={order.version} />
      <input type="hidden" name="requestId" value={order.requestId} />
      <Button variant="primary" size="large" wide pending={pending}>
        Price it again
      </Button>
      <p className="text-caption text-soft">
        The same drawings at today's prices and dates. What differs is shown before you pay.
      </p>
    </Form>
  );
}

function ChangeDrawing({ order }: { readonly order: OrderView }) {
  const { Form, pending, refusal } = useAct("revise");
  return (
    <Form method="post" className="mt-3 print:hidden">
      <RefusalNotice refusal={refusal} />
      <input type="hidden" name="intent" value="revise" />
      <input type="hidden" name="version" value={order.version} />
      <input type="hidden" name="requestId" value={order.requestId} />
      <Button size="small" pending={pending}>
        Change the drawing
      </Button>
      <p className="mt-1 text-caption text-soft">
        Back to draft with all your choices; this quote then ends.
      </p>
    </Form>
  );
}
