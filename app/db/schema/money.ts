import { sql } from "drizzle-orm";
import { index, integer, real, sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import type { LineKind, QuoteFacts } from "~/domain/pricing";
import { centsColumn, createdAt, flag, id, instant } from "./columns";
import { revisions } from "./drawings";
import { orders } from "./orders";
import { priceBookVersions } from "./shop";

/** An immutable snapshot; only its status moves. */
export const quotes = sqliteTable(
  "quotes",
  {
    id: id(),
    orderId: text()
      .notNull()
      .references(() => orders.id, { onDelete: "cascade" }),
    number: integer().notNull(),
    revisionId: text()
      .notNull()
      .references(() => revisions.id),
    priceBookVersionId: text()
      .notNull()
      .references(() => priceBookVersions.id),
    /** Everything the price was made from, lot measurements included. */
    facts: text({ mode: "json" }).$type<QuoteFacts>().notNull(),
    currency: text().notNull(),
    net: centsColumn().notNull(),
    tax: centsColumn().notNull(),
    total: centsColumn().notNull(),
    machineMinutes: real().notNull(),
    promisedFor: instant().notNull(),
    status: text().$type<"open" | "accepted" | "superseded" | "expired">().notNull(),
    expiresAt: instant().notNull(),
    /** The builder's approval of part list and sizes: the release. */
    acceptedAt: instant(),
    acceptedBy: text(),
    createdAt: createdAt(),
  },
  (table) => [uniqueIndex("quotes_order_number").on(table.orderId, table.number)],
);

export const quoteLines = sqliteTable(
  "quote_lines",
  {
    id: id(),
    quoteId: text()
      .notNull()
      .references(() => quotes.id, { onDelete: "cascade" }),
    position: integer().notNull(),
    kind: text().$type<LineKind>().notNull(),
    label: text().notNull(),
    /** How the amount came about, in a sentence with its numbers. */
    how: text().notNull(),
    amount: centsColumn().notNull(),
    taxable: flag().notNull(),
  },
  (table) => [index("quote_lines_quote").on(table.quoteId)],
);

/** One try at paying a debt; its id is the idempotency key. One open at most per order. */
export const checkouts = sqliteTable(
  "checkouts",
  {
    id: id(),
    orderId: text()
      .notNull()
      .references(() => orders.id, { onDelete: "cascade" }),
    quoteId: text()
      .notNull()
      .references(() => quotes.id),
    purpose: text().$type<"full" | "deposit" | "balance">().notNull(),
    amount: centsColumn().notNull(),
    currency: text().notNull(),
    status: text().$type<"open" | "paid" | "expired" | "cancelled">().notNull(),
    /** The payment service's session and intent. */
    sessionId: text(),
    paymentIntent: text(),
    url: text(),
    lastFailure: text(),
    expiresAt: instant(),
    createdAt: createdAt(),
    updatedAt: createdAt(),
  },
  (table) => [
    uniqueIndex("checkouts_one_open").on(table.orderId).where(sql`${table.status} = 'open'`),
    uniqueIndex("checkouts_session").on(table.sessionId),
    index("checkouts_intent").on(table.paymentIntent),
  ],
);

/** Append-only. Debts positive, payments negative, refunds positive: the sum is what is still owed. */
export const ledgerEntries = sqliteTable(
  "ledger_entries",
  {
    id: id(),
    orderId: text()
      .notNull()
      .references(() => orders.id, { onDelete: "cascade" }),
    kind: text().$type<"debt" | "payment" | "refund" | "debt-released" | "dispute">().notNull(),
    amount: centsColumn().notNull(),
    currency: text().notNull(),
    quoteId: text(),
    checkoutId: text(),
    /** The payment service's id of what happened; the same thing is entered once. */
    externalId: text(),
    note: text(),
    actorId: text(),
    createdAt: createdAt(),
  },
  (table) => [
    index("ledger_entries_order").on(table.orderId),
    uniqueIndex("ledger_entries_external").on(table.kind, table.externalId),
  ],
);

/** A refund asked of the payment service; its id is the idempotency key. */
export const refunds = sqliteTable(
  "refunds",
  {
    id: id(),
    orderId: text()
      .notNull()
      .references(() => orders.id, { onDelete: "cascade" }),
    checkoutId: text()
      .notNull()
      .references(() => checkouts.id),
    amount: centsColumn().notNull(),
    reason: text().notNull(),
    status: text().$type<"asked" | "done" | "failed">().notNull(),
    externalId: text(),
    askedBy: text().notNull(),
    createdAt: createdAt(),
  },
  (table) => [index("refunds_order").on(table.orderId)],
);

/** Webhooks as they came, stored before anything is done about them. */
export const paymentEvents = sqliteTable("payment_events", {
  /** The payment service's event id. */
  id: text().primaryKey(),
  type: text().notNull(),
  objectId: text().notNull(),
  payload: text({ mode: "json" }).$type<Record<string, unknown>>().notNull(),
  receivedAt: createdAt(),
  appliedAt: instant(),
  outcome: text(),
  attempts: integer().notNull().default(0),
});
