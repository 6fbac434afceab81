import { index, integer, primaryKey, real, sqliteTable, text } from "drizzle-orm/sqlite-core";
import { createdAt, id, instant } from "./columns";
import { orders } from "./orders";
import { users } from "./people";

export const messages = sqliteTable(
  "messages",
  {
    id: id(),
    orderId: text()
      .notNull()
      .references(() => orders.id, { onDelete: "cascade" }),
    authorId: text()
      .notNull()
      .references(() => users.id),
    side: text().$type<"builder" | "shop">().notNull(),
    /** A staff note is never shown or mailed to the builder. */
    audience: text().$type<"both" | "staff">().notNull(),
    body: text().notNull(),
    /** What the message points at: a part, and a spot in drawing millimetres. */
    partLabel: text(),
    spotX: real(),
    spotY: real(),
    createdAt: createdAt(),
  },
  (table) => [index("messages_order").on(table.orderId, table.createdAt)],
);

export const attachments = sqliteTable(
  "attachments",
  {
    id: id(),
    messageId: text()
      .notNull()
      .references(() => messages.id, { onDelete: "cascade" }),
    fileName: text().notNull(),
    contentType: text().notNull(),
    size: integer().notNull(),
    sha256: text().notNull(),
    createdAt: createdAt(),
  },
  (table) => [index("attachments_message").on(table.messageId)],
);

export const threadReads = sqliteTable(
  "thread_reads",
  {
    orderId: text()
      .notNull()
      .references(() => orders.id, { onDelete: "cascade" }),
    userId: text()
      .notNull()
      .references(() => users.id, { onDelete: "cascade" }),
    readAt: instant().notNull(),
  },
  (table) => [primaryKey({ columns: [table.orderId, table.userId] })],
);
