import { SHOP_STAGES } from "~/domain/orders";
import type { StaffOrderView } from "~/routes/shop/order-view.server";
import { Sheet } from "../sheet";
import { Cell, HeadCell, RowHead, Table, TableHead, TableRow } from "../table";

type Piece = StaffOrderView["pieces"][number];

const rank = (stage: Piece["stage"]): number => SHOP_STAGES.indexOf(stage);

/** How many pieces of each part have reached each stage, and which were lost on the way. */
export function PiecesTable({ pieces }: { readonly pieces: readonly Piece[] }) {
  if (pieces.length === 0) return null;
  const labels = [...new Set(pieces.map(({ label }) => label))];
  const good = pieces.filter(({ state }) => state === "good");
  const lost = pieces.filter(({ state }) => state === "spoiled" || state === "missing");
  return (
    <Sheet label="Pieces" padded>
      <div className="mb-2 flex flex-wrap items-baseline justify-between gap-3">
        <h2 className="text-small font-semibold">Pieces by stage</h2>
        <p className="measure text-small text-soft">{good.length} good</p>
      </div>
      <Table caption="Pieces by stage">
        <TableHead>
          <HeadCell>part</HeadCell>
          <HeadCell numeric>pieces</HeadCell>
          {SHOP_STAGES.map((stage) => (
            <HeadCell key={stage} numeric>
              {stage}
            </HeadCell>
          ))}
        </TableHead>
        <tbody>
          {labels.map((label) => {
            const mine = good.filter((piece) => piece.label === label);
            return (
              <TableRow key={label}>
                <RowHead measured>{label}</RowHead>
                <Cell numeric>{mine.length}</Cell>
                {SHOP_STAGES.map((stage) => {
                  const reached = mine.filter((piece) => rank(piece.stage) >= rank(stage)).length;
                  return (
                    <Cell key={stage} numeric>
                      <span className={reached === 0 ? "text-soft" : ""}>{reached}</span>
                    </Cell>
                  );
                })}
              </TableRow>
            );
          })}
        </tbody>
      </Table>
      {lost.length > 0 && (
        <ul className="mt-3 space-y-1 border-t border-line pt-3 text-small">
          {lost.map((piece) => (
            <li key={piece.id} className="text-amber">
              <span className="measure">
                {piece.label} {piece.number} of {piece.of}
              </span>{" "}
              {piece.state}
              {remakeWords(pieces, piece)}
            </li>
          ))}
        </ul>
      )}
    </Sheet>
  );
}

function remakeWords(pieces: readonly Piece[], lost: Piece): string {
  const again = pieces.find(
    (piece) => piece.remake && piece.label === lost.label && piece.number === lost.number && piece !== lost,
  );
  return again
    ? `: ${again.cause?.replace(/\.$/, "") ?? "made again"}; the ${again.payer} pays. The remake is ${again.stage}.`
    : "";
}
