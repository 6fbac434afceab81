import type { ShownPart } from "~/components/order/order-view";
import { db } from "~/db/client.server";
import { checkMove, progressOf, SHOP_STAGES } from "~/domain/orders";
import { compareQuotes } from "~/domain/pricing";
import { findTracking } from "~/flows/find-tracking.server";
import { loadGeometry } from "~/flows/geometry-store.server";
import { factsOfOrder } from "~/flows/order-facts.server";
import { partListHash } from "~/flows/part-list-hash.server";
import { listCheckouts } from "~/models/checkouts.server";
import { listFindings } from "~/models/findings.server";
import { listLedger } from "~/models/ledger.server";
import type { Order } from "~/models/orders.server";
import { listParcels } from "~/models/parcels.server";
import { listParts, type PartRow } from "~/models/parts.server";
import { listPieces } from "~/models/pieces.server";
import { findQuote, listQuoteLines, listQuotes, type Quote } from "~/models/quotes.server";
import { findRevision, type Revision } from "~/models/revisions.server";
import { listStockGroups } from "~/models/stock-groups.server";
import { shownDrawings, shownFindings } from "./drawings-shown.server";

/** Everything the page shows of an order that is quoted or further: its frozen revision and what came of it. */
export async function frozenView(order: Order, roles: Parameters<typeof checkMove>[2], now: Date) {
  const { revisionId, quoteId } = order;
  const revision = revisionId === null ? undefined : await findRevision(db, order.id, revisionId);
  if (!revision) return null;
  const parts = await listParts(db, revision.id);
  const quote = quoteId === null ? undefined : await findQuote(db, order.id, quoteId);
  const geometry = await loadGeometry(revision.geometryKey);
  const shas = revision.files.map(({ sha256 }) => sha256);
  const facts = await factsOfOrder(db, order, now);
  return {
    kind: "frozen" as const,
    revision: revision.number,
    geometryKey: revision.geometryKey,
    drawings: shownDrawings(
      revision.files.flatMap(({ sha256, fileName }) => {
        const file = geometry?.files.find((one) => one.sha256 === sha256);
        return file ? [{ fileName, geometry: file }] : [];
      }),
    ),
    parts: parts.map((part) => shownPart(part)),
    stocks: await shownStocks(order, revision, parts),
    findings: shownFindings(
      (await listFindings(db, revision.id)).map(({ id, content, answer }) => ({
        id,
        finding: content,
        answer: answer && { kind: answer.answer, note: answer.note },
      })),
      shas,
    ),
    quote: quote ? await shownQuote(order, quote, parts, now) : null,
    checkout: await shownCheckout(order),
    /** Somebody in the shop has to look, whatever the builder answers. */
    reviewOpen: facts.reviewOpen,
    unanswered: facts.unansweredAsks,
    mayCancel: checkMove("cancel", facts, roles).ok,
    mayAskReview: checkMove("ask-review", facts, roles).ok && order.reviewedAt === null,
    pieces: await shownPieces(order),
    money: await shownMoney(order),
    parcels: await shownParcels(order),
  };
}
export type FrozenView = NonNullable<Awaited<ReturnType<typeof frozenView>>>;

const shownPart = (part: PartRow): ShownPart => ({
  label: part.label,
  fileSha: part.fileSha,
  letter: part.letter,
  name: part.name,
  width: part.width,
  height: part.height,
  cutLength: part.outerLength + part.innerLength,
  quantity: part.quantity,
  mirrorOf: part.mirrorOf,
  grain: part.grain,
});

async function shownStocks(order: Order, revision: Revision, parts: readonly PartRow[]) {
  const groups = await listStockGroups(db, order.id, revision.id);
  return groups.map(({ id, material, lot, sheets }) => ({
    id,
    material: material.name,
    lot: lot?.code ?? null,
    thickness: lot ? { min: lot.thicknessMin, mean: lot.thicknessMean, max: lot.thicknessMax } : null,
    sheets,
    labels: parts.filter((part) => part.stockGroupId === id).map((part) => part.label),
  }));
}

async function shownQuote(order: Order, quote: Quote, parts: readonly PartRow[], now: Date) {
  const lines = await listQuoteLines(db, quote.id);
  const expired = quote.status === "expired" || (order.paidAt === null && quote.expiresAt <= now);
  return {
    id: quote.id,
    number: quote.number,
    lines: lines.map(({ id, label, how, amount }) => ({ id, label, how, amount })),
    total: quote.total,
    currency: quote.currency,
    machineMinutes: quote.machineMinutes,
    promisedFor: quote.promisedFor.toISOString(),
    expiresAt: quote.expiresAt.toISOString(),
    approvedAt: quote.acceptedAt?.toISOString() ?? null,
    expired,
    listHash: partListHash(quote.id, parts),
    changed: await sinceQuoteBefore(order, quote, lines),
  };
}

/** What a quote of the same revision made anew differs in from the one before it; empty for a first quote. */
async function sinceQuoteBefore(
  order: Order,
  quote: Quote,
  lines: Awaited<ReturnType<typeof listQuoteLines>>,
) {
  const before = (await listQuotes(db, order.id)).find(
    (one) => one.number < quote.number && one.revisionId === quote.revisionId,
  );
  if (!before) return [];
  return compareQuotes({ lines: await listQuoteLines(db, before.id) }, { lines }).map(
    ({ kind, was, now, difference }, index) => ({
      id: `${kind} ${index}`,
      label: (now ?? was)?.label ?? kind,
      difference,
    }),
  );
}

/** The newest try at paying, while it is not paid: what came of it. */
async function shownCheckout(order: Order) {
  if (order.paidAt !== null) return null;
  const [newest] = await listCheckouts(db, order.id);
  if (!newest || newest.quoteId !== order.quoteId) return null;
  return { id: newest.id, status: newest.status, failure: newest.lastFailure };
}

async function shownPieces(order: Order) {
  const pieces = await listPieces(db, order.id);
  if (pieces.length === 0) return null;
  return {
    progress: progressOf(pieces),
    remakes: pieces
      .filter((piece) => piece.state === "spoiled" || piece.state === "missing")
      .map(({ part, number, of, state, cause }) => ({ part: part.label, number, of, state, cause })),
    parts: [...new Set(pieces.map(({ part }) => part.label))].map((label) => {
      const good = pieces.filter((piece) => piece.part.label === label && piece.state === "good");
      return {
        label,
        of: good.length,
        reached: SHOP_STAGES.map(
          (stage) =>
            good.filter((piece) => SHOP_STAGES.indexOf(piece.stage) >= SHOP_STAGES.indexOf(stage)).length,
        ),
      };
    }),
  };
}

/** Payments and refunds, for the receipt. */
async function shownMoney(order: Order) {
  const entries = await listLedger(db, order.id);
  return entries
    .filter(({ kind }) => kind === "payment" || kind === "refund")
    .map(({ id, kind, amount, currency, createdAt }) => ({
      id,
      kind,
      amount: Math.abs(amount),
      currency,
      at: createdAt.toISOString(),
    }));
}

async function shownParcels(order: Order) {
  const parcels = await listParcels(db, order.id);
  const tracked = order.stage === "shipped" ? await findTracking(parcels) : [];
  return parcels.map(({ number, weight, handedOverAt, labels }) => ({
    number,
    weight,
    handedOverAt: handedOverAt?.toISOString() ?? null,
    tracking: labels.filter(({ status }) => status === "bought").map((label) => label.trackingNumber),
    /** As the carrier says it now; null when it does not. */
    status: tracked.find((one) => one.number === number)?.tracking?.status ?? null,
  }));
}
