import type { FrozenView } from "~/routes/builder/frozen-view.server";
import { DateTime } from "../date-time";
import { Money } from "../money";
import { RailSection } from "../rail";
import { PriceLines } from "./price-lines";

interface ReceiptPanelProps {
  readonly quote: NonNullable<FrozenView["quote"]>;
  readonly money: FrozenView["money"];
}

/** What was paid, for what, and what was given back. */
export function ReceiptPanel({ quote, money }: ReceiptPanelProps) {
  return (
    <RailSection title="Paid">
      <p className="-mt-8 text-right">
        <Money cents={quote.total} currency={quote.currency} show="price" />
      </p>
      <PriceLines lines={quote.lines} currency={quote.currency} />
      <ul className="mt-2 border-t border-line pt-2">
        {money.map(({ id, kind, amount, currency, at }) => (
          <li key={id} className="flex items-baseline justify-between gap-4 py-1">
            <span>
              {kind === "payment" ? "Paid by card" : "Given back"}{" "}
              <span className="text-soft">
                <DateTime at={at} show="full" />
              </span>
            </span>
            <Money cents={kind === "payment" ? amount : -amount} currency={currency} />
          </li>
        ))}
      </ul>
      {quote.approvedAt && (
        <p className="py-1 text-soft">
          You approved the part list and its sizes on <DateTime at={quote.approvedAt} show="full" />.
        </p>
      )}
      <button
        type="button"
        onClick={() => window.print()}
        className="mt-2 text-blue hover:underline pointer-coarse:min-h-11 print:hidden"
      >
        Print the receipt
      </button>
    </RailSection>
  );
}
