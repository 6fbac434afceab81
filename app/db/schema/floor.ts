import { sql } from "drizzle-orm";
import { index, integer, real, sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import { createdAt, id, instant, version } from "./columns";
import { pieces } from "./orders";
import { lots, machines, materials } from "./shop";

export const nests = sqliteTable(
  "nests",
  {
    id: id(),
    number: integer().notNull().unique(),
    materialId: text()
      .notNull()
      .references(() => materials.id),
    lotId: text().references(() => lots.id),
    status: text().$type<"draft" | "locked" | "cutting" | "done" | "dropped">().notNull(),
    /** Millimetres. */
    spacing: real().notNull(),
    margin: real().notNull(),
    seed: integer().notNull(),
    lockedBy: text(),
    lockedAt: instant(),
    version: version(),
    createdBy: text(),
    createdAt: createdAt(),
  },
  (table) => [index("nests_status").on(table.status)],
);

export const nestSheets = sqliteTable(
  "nest_sheets",
  {
    id: id(),
    nestId: text()
      .notNull()
      .references(() => nests.id, { onDelete: "cascade" }),
    number: integer().notNull(),
    /** Millimetres. */
    length: real().notNull(),
    width: real().notNull(),
    yield: real().notNull(),
    estimatedMinutes: real().notNull(),
    status: text().$type<"planned" | "cutting" | "cut" | "rejected">().notNull().default("planned"),
    createdAt: createdAt(),
  },
  (table) => [uniqueIndex("nest_sheets_number").on(table.nestId, table.number)],
);

/** Where a piece lies: its part's own frame turned about the origin, then moved by x, y. */
export const placements = sqliteTable(
  "placements",
  {
    id: id(),
    sheetId: text()
      .notNull()
      .references(() => nestSheets.id, { onDelete: "cascade" }),
    pieceId: text()
      .notNull()
      .references(() => pieces.id),
    x: real().notNull(),
    y: real().notNull(),
    turnDegrees: real().notNull(),
    /** Taken off the sheet (nest dropped, sheet rejected): kept for the record. */
    releasedAt: instant(),
  },
  (table) => [
    index("placements_sheet").on(table.sheetId),
    uniqueIndex("placements_piece").on(table.pieceId).where(sql`${table.releasedAt} is null`),
  ],
);

/** A sheet's turn on a machine. */
export const runs = sqliteTable(
  "runs",
  {
    id: id(),
    sheetId: text()
      .notNull()
      .references(() => nestSheets.id, { onDelete: "cascade" }),
    machineId: text()
      .notNull()
      .references(() => machines.id),
    /** The shop's calendar day, YYYY-MM-DD. */
    day: text().notNull(),
    sequence: integer().notNull(),
    plannedMinutes: real().notNull(),
    startedAt: instant(),
    finishedAt: instant(),
    actualMinutes: real(),
    startedBy: text(),
    version: version(),
    createdAt: createdAt(),
  },
  (table) => [uniqueIndex("runs_sheet").on(table.sheetId), index("runs_day").on(table.machineId, table.day)],
);
