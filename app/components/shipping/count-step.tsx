import { useFetcher } from "react-router";
import type { PackView, ShownPiece } from "~/routes/shipping/pack-view.server";
import { ActForm } from "../act-form";
import { Button } from "../button";
import { Rail, RailSection } from "../rail";
import { RuleProgress } from "../rule-progress";
import { Sheet } from "../sheet";
import { matchScan } from "./match-scan";
import { ScanField } from "./scan-field";

const name = ({ label, number, of }: ShownPiece): string => `${label} ${number} of ${of}`;
const isReady = ({ stage, state }: ShownPiece): boolean => state === "good" && stage === "tabs-removed";

/** The clerk counts pieces into the pile, by scanner or by a tap on each. */
export function CountStep({ order }: { readonly order: PackView }) {
  const fetcher = useFetcher();
  const good = order.pieces.filter(({ state }) => state === "good");
  const counted = good.filter((piece) => piece.counted);
  const missing = good.filter((piece) => !piece.counted);
  const open = order.mayEdit && order.stage !== "shipped";
  const count = (piece: ShownPiece, isCounted: boolean) =>
    fetcher.submit(
      { intent: "count", piece: piece.id, counted: isCounted ? "yes" : "no" },
      { method: "post" },
    );
  const scan = (typed: string): string => {
    const piece = matchScan(order.pieces, typed, (one) => isReady(one) && !one.counted);
    if (!piece) return `${typed}: no piece of this order.`;
    if (!isReady(piece)) return `${name(piece)} is ${piece.state === "good" ? piece.stage : piece.state}.`;
    if (piece.counted) return `${name(piece)} is counted already.`;
    count(piece, true);
    return `${name(piece)} is in the pile.`;
  };
  const labels = [...new Set(good.map(({ label }) => label))];
  return (
    <div className="grid gap-5 lg:grid-cols-[minmax(0,1fr)_22rem]">
      <Sheet label="The pile" padded>
        <h2 className="mb-3 text-small font-semibold">Counted against expected</h2>
        <ul className="divide-y divide-line">
          {labels.map((label) => {
            const mine = good.filter((piece) => piece.label === label);
            return (
              <li key={label} className="grid gap-2 py-3 sm:grid-cols-[9rem_minmax(0,1fr)]">
                <p>
                  <span className="measure font-semibold">{label}</span> {mine[0]?.name}
                  <span className="measure block text-small text-soft">
                    {mine.filter((piece) => piece.counted).length} of {mine.length}
                  </span>
                </p>
                <div className="flex flex-wrap gap-2">
                  {mine.map((piece) => (
                    <Button
                      key={piece.id}
                      type="button"
                      variant={piece.counted ? "chosen" : "plain"}
                      size="large"
                      aria-pressed={piece.counted}
                      aria-label={`${name(piece)}${isReady(piece) ? "" : `, ${piece.stage}`}`}
                      disabled={!open || !isReady(piece)}
                      onClick={() => count(piece, !piece.counted)}
                    >
                      <span className="measure">{piece.number}</span>
                      {!isReady(piece) && <span className="text-caption">{piece.stage}</span>}
                    </Button>
                  ))}
                </div>
              </li>
            );
          })}
        </ul>
      </Sheet>
      <Rail label="Count">
        <RailSection title="Pile" note={`${counted.length} of ${good.length}`} measured>
          <RuleProgress
            label="counted"
            share={good.length > 0 ? counted.length / good.length : 0}
            note={`${missing.length} to count`}
          />
          {open && (
            <div className="mt-3 space-y-3">
              <ScanField
                label="Scan or type a piece"
                hint="Its code, or what its label says: A 2"
                onScan={scan}
              />
              <ActForm intent="count-all" fields={{ counted: missing.length > 0 ? "yes" : "no" }}>
                {(pending) => (
                  <Button wide pending={pending}>
                    {missing.length > 0 ? "All that are ready are here" : "Count again from nothing"}
                  </Button>
                )}
              </ActForm>
            </div>
          )}
        </RailSection>
        {missing.length > 0 && (
          <RailSection title="Not in the pile yet">
            <ul className="space-y-1">
              {missing.slice(0, 40).map((piece) => (
                <li key={piece.id} className={isReady(piece) ? "" : "text-amber"}>
                  <span className="measure">{name(piece)}</span>: {whereIs(piece)}
                </li>
              ))}
            </ul>
          </RailSection>
        )}
      </Rail>
    </div>
  );
}

function whereIs({ stage, remake, sheet, cause }: ShownPiece): string {
  const place = stage === "tabs-removed" ? "at the bench" : stage === "received" ? "waits for a nest" : stage;
  return [place, sheet, remake ? `remake${cause ? ` (${cause.replace(/\.$/, "")})` : ""}` : null]
    .filter(Boolean)
    .join(", ");
}
