import { db } from "~/db/client.server";
import { type LabelPaper, type PartLabel, partLabelPages } from "~/documents/part-labels.server";
import { printPages } from "~/documents/print-pages.server";
import { listPiecesWithSheet, type PieceOnSheet } from "~/models/bench.server";
import { findOrder } from "~/models/orders.server";
import { findQuote } from "~/models/quotes.server";
import { findRevision } from "~/models/revisions.server";
import { listStockGroups } from "~/models/stock-groups.server";
import type { PrintedFile } from "./printed-file";

export interface PartLabelsOptions {
  /** An order's pieces, or all that lie on a sheet, whosever they are. */
  readonly of: { readonly orderId: string } | { readonly sheetId: string };
  /** Only these; every good piece otherwise. */
  readonly pieceIds?: readonly string[] | undefined;
  readonly paper: LabelPaper;
}

/**
 * Labels of pieces. Everything on one comes from what is written down, nothing from the clock: printed again, a lost
 * label is the same to the byte. Undefined when there is nothing to print.
 */
export async function printPartLabels({
  of,
  pieceIds,
  paper,
}: PartLabelsOptions): Promise<PrintedFile | undefined> {
  const pieces = (await listPiecesWithSheet(db, of)).filter((piece) =>
    pieceIds ? pieceIds.includes(piece.id) : piece.state === "good",
  );
  if (pieces.length === 0) return undefined;
  const facts = new Map<string, Awaited<ReturnType<typeof factsOf>>>();
  for (const { orderId } of pieces) if (!facts.has(orderId)) facts.set(orderId, await factsOf(orderId));
  const labels = pieces.map((piece) => partLabel(piece, facts.get(piece.orderId)));
  const frozen = [...facts.values()].map(({ frozenAt }) => frozenAt.getTime());
  const [first] = pieces;
  const name =
    "orderId" in of
      ? (first?.reference ?? "order")
      : `sheet-${first?.sheet?.nestNumber ?? 0}-${first?.sheet?.number ?? 0}`;
  return {
    fileName: `${name}-part-labels.pdf`,
    bytes: await printPages(partLabelPages(labels, paper), {
      title: `Part labels ${name}`,
      at: new Date(Math.max(...frozen)),
    }),
  };
}

async function factsOf(orderId: string) {
  const order = await findOrder(db, orderId, { kind: "staff" });
  if (!order?.revisionId || !order.quoteId) throw new Error("Pieces belong to a frozen order.");
  const revision = await findRevision(db, orderId, order.revisionId);
  const quote = await findQuote(db, orderId, order.quoteId);
  if (!revision || !quote) throw new Error("A frozen order has a revision and a quote.");
  return {
    revision: revision.number,
    frozenAt: revision.frozenAt,
    groups: await listStockGroups(db, orderId, revision.id),
    next: nextOf(quote.facts),
  };
}

/** What is done after the router, in the bench's words. */
function nextOf({ leaveTabs, sanding }: { leaveTabs: boolean; sanding: string }): readonly string[] {
  const edges: Readonly<Record<string, string>> = { arrises: "arrises", "grit-150": "sand 150" };
  const edge = edges[sanding];
  return [leaveTabs ? "tabs stay" : "tabs off", ...(edge ? [edge] : []), "pack"];
}

function partLabel(piece: PieceOnSheet, facts: Awaited<ReturnType<typeof factsOf>> | undefined): PartLabel {
  const group = facts?.groups.find(({ id }) => id === piece.stockGroupId);
  if (!facts || !group) throw new Error(`Piece ${piece.id} names no stock of its order.`);
  const { part, sheet } = piece;
  return {
    reference: piece.reference,
    revision: facts.revision,
    part: part.label,
    partName: part.name === part.letter || part.name === part.label ? null : part.name,
    number: piece.number,
    of: piece.of,
    remake: piece.remakeOf !== null,
    grain: part.grain,
    hasGrain: group.material.hasGrain,
    width: part.width,
    height: part.height,
    material: group.material.code,
    nominalThickness: group.material.nominalThickness,
    lot: group.lot?.code ?? null,
    sheet: sheet && `${sheet.nestNumber} / ${sheet.number}`,
    next: facts.next,
    code: piece.code,
  };
}
