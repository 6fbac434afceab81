import { db } from "~/db/client.server";
import type { Interpretation } from "~/domain/orders";
import { type PricedQuote, priceOrder as priceFacts, type QuoteFacts } from "~/domain/pricing";
import { findOrder } from "~/models/orders.server";
import { findAddressee } from "~/models/people.server";
import { findPublishedPriceBook } from "~/models/price-books.server";
import { currentSettings } from "~/models/settings.server";
import { type Actor, scopeOfActor } from "./actor";
import { findOrderParts, type OrderParts } from "./find-order-parts.server";
import { type FileReport, listOrderParts } from "./listed-parts";
import { promiseOrder } from "./promise-order.server";
import { collectFacts, type Delivery } from "./quote-facts.server";
import { NO_ORDER, type Refusal, refuse, type Verdict } from "./verdict";

export interface PriceOrderOptions {
  readonly actor: Actor;
  readonly orderId: string;
  /** Other choices than those saved, to look at before saving. */
  readonly content?: Interpretation | undefined;
  readonly delivery?: Delivery | undefined;
  readonly now?: Date;
}

export interface PriceShown {
  readonly quote: PricedQuote;
  readonly facts: QuoteFacts;
  readonly currency: string;
  readonly promisedFor: Date;
  readonly promiseHow: string;
  /** The shop's day until which a quote made now would hold. */
  readonly wouldExpireAt: Date;
}

/** What the order would cost as it is, or under other choices. Saves nothing. */
export async function priceOrder(options: PriceOrderOptions): Promise<Verdict<PriceShown>> {
  const { actor, orderId, now = new Date() } = options;
  const order = await findOrder(db, orderId, scopeOfActor(actor));
  if (!order) return NO_ORDER;
  const delivery = options.delivery ?? deliveryOf(order);
  if (!delivery)
    return refuse("incomplete", "Say where it goes, or that you pick it up: freight and tax need it.");
  const found = await findOrderParts({ order, ...(options.content ? { content: options.content } : {}) });
  const readable = reportsOf(found);
  if (!readable.ok) return readable;
  const settings = await currentSettings(db);
  const book = await findPublishedPriceBook(db);
  const builder = await findAddressee(db, order.builderId);
  if (!book || !builder) return refuse("unavailable", "The shop has not published its prices yet.");
  const collected = await collectFacts(db, {
    parts: listOrderParts(readable.files, found.interpretation.content),
    choices: found.interpretation.content,
    delivery,
    taxExempt: builder.taxExempt,
    settings,
    book: book.content,
    now,
  });
  if (!collected.ok) return collected;
  const priced = priceFacts(collected.facts, book.content);
  if (!priced.ok) return refuse("incomplete", priced.reason);
  const promised = await promiseOrder(db, {
    settings,
    machineMinutes: priced.quote.machineMinutes,
    paidAt: now,
  });
  if (!promised.ok) return promised;
  return {
    ok: true,
    quote: priced.quote,
    facts: collected.facts,
    currency: book.content.currency,
    promisedFor: promised.promisedFor,
    promiseHow: promised.how,
    wouldExpireAt: new Date(now.getTime() + settings.quote.validDays * 86_400_000),
  };
}

/** As chosen on the order; null until it is chosen. */
export function deliveryOf(order: {
  delivery: "ship" | "pick-up" | null;
  shipTo: { region: string } | null;
}): Delivery | null {
  if (order.delivery === "pick-up") return { delivery: "pick-up", region: null };
  if (order.delivery === "ship" && order.shipTo) return { delivery: "ship", region: order.shipTo.region };
  return null;
}

/** The reports of every file, or what is in the way: a file unread, without parts, or without a stock. */
export function reportsOf(found: OrderParts): { readonly ok: true; readonly files: FileReport[] } | Refusal {
  const files: FileReport[] = [];
  if (found.files.length === 0) return refuse("incomplete", "There is no drawing yet.");
  for (const file of found.files) {
    if (file.state === "queued") return refuse("incomplete", `${file.fileName} is still being read.`);
    if (file.state === "failed")
      return refuse("incomplete", `${file.fileName} cannot be read: ${file.words} Replace or remove it.`);
    const chosen = found.interpretation.content.files.find(({ sha256 }) => sha256 === file.sha256);
    if (file.geometry.report.parts.length === 0)
      return refuse("incomplete", `No part was found in ${file.fileName}. Replace or remove it.`);
    if (!chosen?.materialId) return refuse("incomplete", `Choose the stock of ${file.fileName}.`);
    files.push({ sha256: file.sha256, report: file.geometry.report });
  }
  return { ok: true, files };
}
