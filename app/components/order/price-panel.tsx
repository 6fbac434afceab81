import type { ReactNode } from "react";
import { DateTime } from "../date-time";
import { Money } from "../money";
import { RailSection } from "../rail";
import { PriceLines } from "./price-lines";
import type { ShownPrice } from "./use-price";

interface PricePanelProps {
  readonly price: ShownPrice;
  /** An earlier figure, while the next is worked out. */
  readonly stale: boolean;
  /** What the price supposes of the delivery while nothing is said of it. */
  readonly supposing: string | null;
  readonly children: ReactNode;
}

/** The price as it stands: total, promise, lines; the act at its foot. */
export function PricePanel({ price, stale, supposing, children }: PricePanelProps) {
  return (
    <RailSection title="Price">
      <div aria-live="polite" aria-busy={stale} className={stale ? "opacity-55" : undefined}>
        {price.ok ? (
          <>
            <p className="-mt-8 text-right">
              <Money cents={price.quote.total} currency={price.currency} show="price" />
            </p>
            {supposing && <p className="mt-1 text-right text-caption text-soft">{supposing}</p>}
            <PriceLines
              lines={price.quote.lines.map((line, index) => ({ ...line, id: `${line.kind} ${index}` }))}
              currency={price.currency}
            />
            <details className="mt-2 border-t border-line pt-2">
              <summary className="flex items-baseline justify-between gap-4">
                <span>
                  Ships, if paid now <span className="text-caption text-blue">why then</span>
                </span>
                <DateTime at={price.promisedFor} />
              </summary>
              <p className="mt-1 text-caption text-soft">{price.promiseHow}</p>
            </details>
          </>
        ) : (
          <p className="text-soft">{price.words}</p>
        )}
      </div>
      {children}
    </RailSection>
  );
}
