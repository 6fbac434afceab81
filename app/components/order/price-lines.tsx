import { Money } from "../money";

interface PriceLinesProps {
  readonly lines: readonly {
    readonly id: string;
    readonly label: string;
    readonly how: string;
    readonly amount: number;
  }[];
  readonly currency: string;
}

/** What a price is made of; each line tells how it came about when it is opened. */
export function PriceLines({ lines, currency }: PriceLinesProps) {
  return (
    <ul className="mt-2">
      {lines.map(({ id, label, how, amount }) => (
        <li key={id}>
          <details className="group">
            <summary className="flex items-baseline justify-between gap-4 py-1.5 hover:bg-grain/55">
              <span className="min-w-0">
                <span aria-hidden="true" className="mr-1.5 inline-block w-2.5 text-soft group-open:hidden">
                  +
                </span>
                <span aria-hidden="true" className="mr-1.5 hidden w-2.5 text-soft group-open:inline-block">
                  −
                </span>
                {label}
              </span>
              <Money cents={amount} currency={currency} show="line" />
            </summary>
            <p className="pb-2 pl-4 text-caption text-soft">{how}</p>
          </details>
        </li>
      ))}
    </ul>
  );
}
