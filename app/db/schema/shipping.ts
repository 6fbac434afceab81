import { index, integer, real, sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import { centsColumn, createdAt, id, instant } from "./columns";
import { orders } from "./orders";

export const parcels = sqliteTable(
  "parcels",
  {
    id: id(),
    orderId: text()
      .notNull()
      .references(() => orders.id, { onDelete: "cascade" }),
    number: integer().notNull(),
    /** Millimetres and kilograms, packing included. */
    length: real().notNull(),
    width: real().notNull(),
    height: real().notNull(),
    weight: real().notNull(),
    packedBy: text(),
    packedAt: instant(),
    handedOverAt: instant(),
    createdAt: createdAt(),
  },
  (table) => [uniqueIndex("parcels_number").on(table.orderId, table.number)],
);

export const labels = sqliteTable(
  "labels",
  {
    id: id(),
    parcelId: text()
      .notNull()
      .references(() => parcels.id, { onDelete: "cascade" }),
    carrierLabelId: text().notNull().unique(),
    service: text().notNull(),
    trackingNumber: text().notNull(),
    price: centsColumn().notNull(),
    status: text().$type<"bought" | "void">().notNull(),
    boughtBy: text(),
    createdAt: createdAt(),
    voidedAt: instant(),
  },
  (table) => [index("labels_parcel").on(table.parcelId)],
);

/** A pick-up: who signed for the pile, and where the drawn signature is kept. */
export const collections = sqliteTable(
  "collections",
  {
    id: id(),
    orderId: text()
      .notNull()
      .references(() => orders.id, { onDelete: "cascade" }),
    /** As typed by who took it. */
    name: text().notNull(),
    /** In object storage: an SVG of the strokes. */
    signatureKey: text().notNull(),
    handedBy: text().notNull(),
    createdAt: createdAt(),
  },
  (table) => [index("collections_order").on(table.orderId)],
);
