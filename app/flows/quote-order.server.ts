import { db, type Executor, transact } from "~/db/client.server";
import type { ShopSettings } from "~/domain/orders";
import { priceOrder as priceFacts } from "~/domain/pricing";
import { insertFindings } from "~/models/findings.server";
import { findNewestInterpretation, setGeometryKey } from "~/models/interpretations.server";
import { findOrder, type Order } from "~/models/orders.server";
import { addParts } from "~/models/parts.server";
import { findAddressee } from "~/models/people.server";
import { findPublishedPriceBook } from "~/models/price-books.server";
import type { Quote } from "~/models/quotes.server";
import { freezeRevision } from "~/models/revisions.server";
import { currentSettings } from "~/models/settings.server";
import { insertStockGroup } from "~/models/stock-groups.server";
import { scopeOfActor } from "./actor";
import { changeStage } from "./change-stage.server";
import { checkOrderFit, type FileFinding } from "./check-order-fit";
import { findOrderParts } from "./find-order-parts.server";
import { listOrderParts } from "./listed-parts";
import { answerMove, type Moved, type MoveOptions, takeMove } from "./move.server";
import { mailQuote } from "./order-mails.server";
import { deliveryOf, reportsOf } from "./price-order.server";
import { promiseOrder } from "./promise-order.server";
import { collectFacts, type StockPlan } from "./quote-facts.server";
import { sendToReview } from "./send-to-review.server";
import { answering, CHANGED, NO_ORDER, orRollBack, Refused, refuse, type Verdict } from "./verdict";
import { personReasons, type QuoteContent, questionReasons, writeQuote } from "./write-quote.server";

export interface QuoteOptions extends MoveOptions {
  readonly now?: Date;
}

/**
 * A firm price: drawings, readings and interpretation are frozen into the next revision with its parts, stock
 * groups and findings, and quoted on today's price book and lots, all in one transaction.
 */
export async function quoteOrder(
  options: QuoteOptions,
): Promise<Verdict<Moved & { quote: Quote; review: readonly string[] }>> {
  const now = options.now ?? new Date();
  const prepared = await prepare(options, now);
  if (!prepared.ok) return prepared;
  return answering(() => transact((tx) => freeze(tx, { options, prepared, now })));
}

interface Prepared {
  readonly interpretationId: string;
  readonly geometryKey: string;
  readonly files: { sha256: string; fileName: string; readingId: string }[];
  readonly stocks: readonly (StockPlan & { readonly lot: NonNullable<StockPlan["lot"]> })[];
  readonly findings: readonly FileFinding[];
  readonly content: QuoteContent;
  readonly settings: ShopSettings;
}

/** Reads the drawings and computes the quote before the transaction, which then only checks and writes. */
async function prepare({ actor, orderId }: QuoteOptions, now: Date): Promise<Verdict<Prepared>> {
  const order = await findOrder(db, orderId, scopeOfActor(actor));
  if (!order) return NO_ORDER;
  if (order.stage !== "draft") return refuse("wrong-stage", "This order is quoted already.");
  const delivery = deliveryOf(order);
  if (!delivery) return refuse("incomplete", "Say where it goes, or that you pick it up.");
  const found = await findOrderParts({ order });
  const { interpretation, geometryKey } = found;
  const readable = reportsOf(found);
  if (!readable.ok) return readable;
  const unconfirmed = found.files.find((file) => file.state === "read" && !file.geometry.confirmed);
  if (unconfirmed)
    return refuse("incomplete", `Confirm the size of ${unconfirmed.fileName}: what are its numbers in?`);
  if (interpretation.id === null || geometryKey === null)
    return refuse("incomplete", "Confirm the unit and choose the stock first.");

  const settings = await currentSettings(db);
  const book = await findPublishedPriceBook(db);
  const builder = await findAddressee(db, order.builderId);
  if (!book || !builder) return refuse("unavailable", "The shop has not published its prices yet.");
  const collected = await collectFacts(db, {
    parts: listOrderParts(readable.files, interpretation.content),
    choices: interpretation.content,
    delivery,
    taxExempt: builder.taxExempt,
    settings,
    book: book.content,
    now,
  });
  if (!collected.ok) return collected;
  const { facts } = collected;
  const stocks = withLots(collected.stocks);
  if (!stocks.ok) return stocks;
  const findings = checkOrderFit(
    readable.files,
    collected.stocks.map(({ parts }, index) => ({ parts, ...fitStock(facts.stocks[index]) })),
    settings,
  );
  const stops = findings.filter((finding) => finding.severity === "stop").length;
  if (stops > 0)
    return refuse(
      "open-findings",
      `Settle ${stops} ${stops === 1 ? "finding" : "findings"} first: ${findings.find((one) => one.severity === "stop")?.words}`,
    );
  const priced = priceFacts(facts, book.content);
  if (!priced.ok) return refuse("incomplete", priced.reason);
  const promised = await promiseOrder(db, {
    settings,
    machineMinutes: priced.quote.machineMinutes,
    paidAt: now,
  });
  if (!promised.ok) return promised;
  return {
    ok: true,
    interpretationId: interpretation.id,
    geometryKey,
    files: found.files.flatMap((file) =>
      file.state === "read"
        ? [{ sha256: file.sha256, fileName: file.fileName, readingId: file.readingId }]
        : [],
    ),
    stocks: stocks.stocks,
    findings,
    content: { facts, priced: priced.quote, book, promisedFor: promised.promisedFor },
    settings,
  };
}

function withLots(plans: readonly StockPlan[]): Verdict<Pick<Prepared, "stocks">> {
  const stocks: Prepared["stocks"][number][] = [];
  for (const plan of plans) {
    const { lot, material, sheets } = plan;
    if (lot === null)
      return refuse(
        "out-of-stock",
        `The shop has no lot of ${material.name} with ${sheets} free ${sheets === 1 ? "sheet" : "sheets"} now. Choose another stock, or ask the shop.`,
      );
    stocks.push({ ...plan, lot });
  }
  return { ok: true, stocks };
}

function fitStock(stock: QuoteContent["facts"]["stocks"][number] | undefined) {
  if (!stock) throw new Error("A stock has no facts.");
  return { thickness: stock.thickness, sheet: stock.sheet };
}

async function freeze(
  tx: Executor,
  { options, prepared, now }: { options: QuoteOptions; prepared: Prepared; now: Date },
): Promise<Verdict<Moved & { quote: Quote; review: readonly string[] }>> {
  const taken = orRollBack(await takeMove(tx, "quote", options));
  if (taken.repeated) throw new Refused(refuse("wrong-stage", "This order is quoted already."));
  const { order, to, role } = taken;
  const newest = await findNewestInterpretation(tx, order.id);
  if (newest?.id !== prepared.interpretationId) throw new Refused(CHANGED);
  await setGeometryKey(tx, prepared.interpretationId, prepared.geometryKey);
  const revision = await freezeRevision(tx, {
    orderId: order.id,
    interpretationId: prepared.interpretationId,
    files: prepared.files,
    geometryKey: prepared.geometryKey,
    frozenBy: options.actor.id,
  });
  await writeParts(tx, { order, revisionId: revision.id, stocks: prepared.stocks });
  await insertFindings(tx, revision.id, prepared.findings);
  const quote = await writeQuote(tx, {
    orderId: order.id,
    revisionId: revision.id,
    content: prepared.content,
    settings: prepared.settings,
    now,
  });
  const { order: quoted } = orRollBack(
    await changeStage(tx, {
      order,
      to,
      act: "quote",
      by: { id: options.actor.id, role },
      requestId: options.requestId,
      change: {
        revisionId: revision.id,
        quoteId: quote.id,
        promisedFor: quote.promisedFor,
        reviewedAt: null,
        reviewedBy: null,
      },
    }),
  );
  const questions = prepared.findings.filter((finding) => finding.severity === "ask").length;
  const person = personReasons({
    total: quote.total,
    settings: prepared.settings,
    reviewAsked: quoted.reviewAsked,
  });
  const review = [...person, ...questionReasons(questions)];
  const last = review.length > 0 ? await sendToReview(tx, quoted, review) : quoted;
  await mailQuote(tx, { order: last, quote, review: person, questions });
  return { ...answerMove(last), quote, review };
}

async function writeParts(
  tx: Executor,
  { order, revisionId, stocks }: { order: Order; revisionId: string; stocks: Prepared["stocks"] },
): Promise<void> {
  const rows: Parameters<typeof addParts>[1][number][] = [];
  for (const { material, lot, sheets, parts } of stocks) {
    const group = await insertStockGroup(tx, {
      orderId: order.id,
      revisionId,
      materialId: material.id,
      lotId: lot.id,
      sheets,
    });
    for (const { materialId: _, wantedLotId: __, ...part } of parts)
      rows.push({ ...part, revisionId, stockGroupId: group.id, position: rows.length });
  }
  await addParts(tx, rows);
}
