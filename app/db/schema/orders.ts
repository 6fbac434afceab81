import { index, integer, real, sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import type { PieceStage, Role, ShipTo, Stage } from "~/domain/orders";
import { newId } from "../new-id";
import { createdAt, flag, id, instant, version } from "./columns";
import { users } from "./people";
import { lots, materials } from "./shop";

export const orders = sqliteTable(
  "orders",
  {
    id: id(),
    /** What people say on the telephone: KP-2047. */
    reference: text().notNull().unique(),
    builderId: text()
      .notNull()
      .references(() => users.id),
    name: text().notNull(),
    stage: text().$type<Stage>().notNull(),
    /** The stage to go back to when a hold ends. */
    heldFrom: text().$type<Stage>(),
    holdReason: text(),
    delivery: text().$type<"ship" | "pick-up">(),
    /** Copied from the address book when chosen, so that a later change there changes no order. */
    shipTo: text({ mode: "json" }).$type<ShipTo>(),
    /** The builder asked for a person to look before paying. */
    reviewAsked: flag().notNull().default(false),
    reviewedAt: instant(),
    reviewedBy: text(),
    trial: flag().notNull().default(false),
    /** A remake or a repeat names the order it comes from. */
    parentOrderId: text(),
    /** The current frozen revision and the current quote. */
    revisionId: text(),
    quoteId: text(),
    promisedFor: instant(),
    paidAt: instant(),
    shippedAt: instant(),
    cancelledAt: instant(),
    version: version(),
    createdAt: createdAt(),
    updatedAt: createdAt(),
  },
  (table) => [
    index("orders_builder").on(table.builderId, table.createdAt),
    index("orders_stage").on(table.stage, table.promisedFor),
    index("orders_parent").on(table.parentOrderId),
  ],
);

/** The number after KP-; taken and raised in one transaction. */
export const orderNumbers = sqliteTable("order_numbers", {
  id: text().primaryKey().default("orders"),
  next: integer().notNull(),
});

/** Append-only: every change of stage, undo included. */
export const stageMoves = sqliteTable(
  "stage_moves",
  {
    id: id(),
    orderId: text()
      .notNull()
      .references(() => orders.id, { onDelete: "cascade" }),
    /** Null when the move is of the order as a whole. */
    pieceIds: text({ mode: "json" }).$type<string[]>(),
    from: text().$type<Stage>().notNull(),
    to: text().$type<Stage>().notNull(),
    act: text().notNull(),
    actorId: text(),
    actorRole: text().$type<Role | "system">().notNull(),
    reason: text(),
    /** The move that this one takes back. */
    undoes: text(),
    /** Given by the client: the same act sent twice moves once. */
    requestId: text(),
    createdAt: createdAt(),
  },
  (table) => [
    index("stage_moves_order").on(table.orderId, table.createdAt),
    uniqueIndex("stage_moves_request").on(table.orderId, table.requestId),
  ],
);

/** One per stock of a revision: material, thickness, lot. */
export const stockGroups = sqliteTable(
  "stock_groups",
  {
    id: id(),
    orderId: text()
      .notNull()
      .references(() => orders.id, { onDelete: "cascade" }),
    revisionId: text().notNull(),
    materialId: text()
      .notNull()
      .references(() => materials.id),
    lotId: text().references(() => lots.id),
    /** Sheets as priced. */
    sheets: real().notNull(),
    reservedAt: instant(),
    createdAt: createdAt(),
  },
  (table) => [index("stock_groups_order").on(table.orderId), index("stock_groups_lot").on(table.lotId)],
);

/** One physical copy of one part: n of N. */
export const pieces = sqliteTable(
  "pieces",
  {
    id: text().primaryKey().$defaultFn(newId),
    orderId: text()
      .notNull()
      .references(() => orders.id, { onDelete: "cascade" }),
    partId: text().notNull(),
    stockGroupId: text()
      .notNull()
      .references(() => stockGroups.id),
    number: integer().notNull(),
    of: integer().notNull(),
    stage: text().$type<PieceStage>().notNull(),
    state: text().$type<"good" | "spoiled" | "missing" | "cancelled">().notNull().default("good"),
    /** A remake names the piece it replaces, why, and who pays. */
    remakeOf: text(),
    cause: text(),
    payer: text().$type<"shop" | "builder" | "carrier" | "supplier">(),
    /** Opaque, printed as the label's QR. */
    code: text().notNull().unique().$defaultFn(newId),
    parcelId: text(),
    /** When the clerk counted it into the pile, and who. */
    countedAt: instant(),
    countedBy: text(),
    version: version(),
    createdAt: createdAt(),
    updatedAt: createdAt(),
  },
  (table) => [
    index("pieces_order").on(table.orderId),
    index("pieces_stage").on(table.stage),
    index("pieces_part").on(table.partId),
    index("pieces_group").on(table.stockGroupId),
  ],
);
