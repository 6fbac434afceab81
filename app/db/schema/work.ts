import { index, integer, real, sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import { createdAt, id, instant } from "./columns";

/** What live pages read, in order. */
export const events = sqliteTable(
  "events",
  {
    id: integer().primaryKey({ autoIncrement: true }),
    orderId: text().notNull(),
    kind: text()
      .$type<"stage" | "pieces" | "payment" | "reading" | "quote" | "message" | "nest" | "run" | "shipping">()
      .notNull(),
    audience: text().$type<"both" | "staff">().notNull().default("both"),
    data: text({ mode: "json" }).$type<Record<string, unknown>>().notNull().default({}),
    createdAt: createdAt(),
  },
  (table) => [index("events_order").on(table.orderId, table.id)],
);

export interface MailPayload {
  readonly subject: string;
  readonly text: string;
  readonly html: string;
  /** Where the recipient turns this kind of mail off; absent for the necessary ones. */
  readonly unsubscribeUrl?: string;
}

/** Mails (and later webhooks) written in the transaction that causes them and sent from here with retries. */
export const outbox = sqliteTable(
  "outbox",
  {
    id: id(),
    kind: text().$type<"mail">().notNull(),
    recipient: text().notNull(),
    template: text().notNull(),
    payload: text({ mode: "json" }).$type<MailPayload>().notNull(),
    orderId: text(),
    status: text().$type<"pending" | "sent" | "failed" | "bounced">().notNull().default("pending"),
    attempts: integer().notNull().default(0),
    nextAttemptAt: createdAt(),
    leasedUntil: instant(),
    lastError: text(),
    /** The same cause writes one mail. */
    dedupeKey: text().unique(),
    /** The mail that this one says again, by the owner's hand. */
    resendOf: text(),
    sentAt: instant(),
    createdAt: createdAt(),
  },
  (table) => [
    index("outbox_due").on(table.status, table.nextAttemptAt),
    index("outbox_order").on(table.orderId, table.createdAt),
    index("outbox_time").on(table.createdAt),
    index("outbox_resend").on(table.resendOf),
  ],
);

/** Long work, leased with a fence: only the runner that holds the newest fence may finish a job. */
export const jobs = sqliteTable(
  "jobs",
  {
    id: id(),
    kind: text().$type<"read-drawing">().notNull(),
    payload: text({ mode: "json" }).$type<Record<string, unknown>>().notNull(),
    orderId: text(),
    status: text()
      .$type<"queued" | "running" | "done" | "failed" | "cancelled">()
      .notNull()
      .default("queued"),
    attempts: integer().notNull().default(0),
    maxAttempts: integer().notNull().default(3),
    fence: integer().notNull().default(0),
    leasedUntil: instant(),
    runAfter: createdAt(),
    /** 0 to 1, and what is being done. */
    progress: real().notNull().default(0),
    step: text(),
    result: text({ mode: "json" }).$type<Record<string, unknown>>(),
    error: text(),
    /** One live job per cause. */
    dedupeKey: text(),
    createdAt: createdAt(),
    finishedAt: instant(),
  },
  (table) => [
    index("jobs_due").on(table.status, table.runAfter),
    uniqueIndex("jobs_dedupe").on(table.dedupeKey),
    index("jobs_order").on(table.orderId),
  ],
);
