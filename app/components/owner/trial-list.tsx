import type { Repriced } from "~/domain/pricing";
import { EmptyState } from "../empty-state";
import { Money } from "../money";
import { Sheet } from "../sheet";
import { Cell, HeadCell, RowHead, Table, TableHead, TableRow } from "../table";
import { TextLink } from "../text-link";

interface Tried {
  readonly id: string;
  readonly orderId: string;
  readonly reference: string;
  readonly orderName: string;
  /** Of the quote, and of the price book it was made on. */
  readonly number: number;
  readonly bookNumber: number;
  readonly repriced: Repriced;
}

/** With a sign where it is more. */
function Difference({ cents }: { readonly cents: number }) {
  return (
    <span className={cents === 0 ? "text-soft" : "font-semibold"}>
      {cents > 0 && <span className="measure">+</span>}
      <Money cents={cents} />
    </span>
  );
}

/** What a draft does to the last orders: each quote's total as it was and as it would be, and the lines that differ. */
export function TrialList({ tried }: { readonly tried: readonly Tried[] }) {
  const priced = tried.flatMap(({ repriced }) => (repriced.ok ? [repriced] : []));
  const was = priced.reduce((sum, one) => sum + one.was, 0);
  const now = priced.reduce((sum, one) => sum + one.now, 0);
  return (
    <Sheet label="What it would do">
      <div className="flex flex-wrap items-baseline justify-between gap-x-6 gap-y-1 border-b border-line px-4 py-3">
        <h2 className="text-body font-semibold">
          {tried.length === 1
            ? "What it would do to the last order"
            : `What it would do to the last ${tried.length} orders`}
        </h2>
        <p className="text-small text-soft">
          together <Money cents={was} /> → <Money cents={now} />, <Difference cents={now - was} />
        </p>
      </div>
      {tried.length === 0 ? (
        <EmptyState>Nothing has been quoted yet.</EmptyState>
      ) : (
        <ul className="divide-y divide-line">
          {tried.map((one) => (
            <TriedQuote key={one.id} tried={one} />
          ))}
        </ul>
      )}
    </Sheet>
  );
}

function TriedQuote({ tried }: { readonly tried: Tried }) {
  const { repriced } = tried;
  return (
    <li className="px-4 py-3">
      <div className="flex flex-wrap items-baseline justify-between gap-x-6 gap-y-1 text-small">
        <p className="min-w-0">
          <TextLink to={`/shop/orders/${tried.orderId}`}>
            <span className="measure">{tried.reference}</span> {tried.orderName}
          </TextLink>{" "}
          <span className="text-caption text-soft">
            quote {tried.number}, on version {tried.bookNumber}
          </span>
        </p>
        {repriced.ok && (
          <p>
            <Money cents={repriced.was} /> → <Money cents={repriced.now} />,{" "}
            <Difference cents={repriced.now - repriced.was} />
          </p>
        )}
      </div>
      {!repriced.ok && <p className="text-small text-amber">It could not be priced: {repriced.reason}</p>}
      {repriced.ok && repriced.differences.length > 0 && (
        <details className="mt-1 text-small">
          <summary className="text-blue pointer-coarse:min-h-11">
            {repriced.differences.length === 1
              ? "one line differs"
              : `${repriced.differences.length} lines differ`}
          </summary>
          <Table caption={`Lines of ${tried.reference} that differ`}>
            <TableHead>
              <HeadCell>line</HeadCell>
              <HeadCell numeric>was</HeadCell>
              <HeadCell numeric>would be</HeadCell>
              <HeadCell numeric>difference</HeadCell>
            </TableHead>
            <tbody>
              {repriced.differences.map(({ kind, was, now, difference }, place) => (
                <TableRow key={`${kind}-${place.toString()}`}>
                  <RowHead>
                    {(now ?? was)?.label}
                    <span className="block text-caption text-soft">
                      {now?.how ?? "No such line any more."}
                    </span>
                  </RowHead>
                  <Cell numeric>{was ? <Money cents={was.amount} /> : "—"}</Cell>
                  <Cell numeric>{now ? <Money cents={now.amount} /> : "—"}</Cell>
                  <Cell numeric>
                    <Difference cents={difference} />
                  </Cell>
                </TableRow>
              ))}
            </tbody>
          </Table>
        </details>
      )}
    </li>
  );
}
