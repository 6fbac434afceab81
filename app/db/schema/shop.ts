import { index, integer, real, sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import type { ShopSettings } from "~/domain/orders";
import type { PriceBook } from "~/domain/pricing";
import type { WeekCalendar } from "~/domain/scheduling";
import { centsColumn, createdAt, flag, id, instant, version } from "./columns";
import { users } from "./people";

/** One row: everything the owner sets that is not a price. */
export const settings = sqliteTable("settings", {
  id: text().primaryKey().default("shop"),
  content: text({ mode: "json" }).$type<ShopSettings>().notNull(),
  version: version(),
  updatedAt: createdAt(),
  updatedBy: text(),
});

export const materials = sqliteTable("materials", {
  id: id(),
  /** Short code on labels and cut sheets: BB-18. */
  code: text().notNull().unique(),
  name: text().notNull(),
  kind: text()
    .$type<
      "birch-plywood" | "hardwood-plywood" | "softwood-plywood" | "mdf" | "acrylic" | "hdpe" | "composite"
    >()
    .notNull(),
  /** Millimetres. */
  nominalThickness: real().notNull(),
  /** Millimetres; the length runs along the grain. */
  sheetLength: real().notNull(),
  sheetWidth: real().notNull(),
  hasGrain: flag().notNull().default(true),
  /** kg/m3. */
  density: real().notNull(),
  sheetPrice: centsColumn().notNull(),
  active: flag().notNull().default(true),
  version: version(),
  createdAt: createdAt(),
});

export const lots = sqliteTable(
  "lots",
  {
    id: id(),
    materialId: text()
      .notNull()
      .references(() => materials.id),
    code: text().notNull().unique(),
    supplierLot: text(),
    /** Where the supplier's paper for the formaldehyde label rule is kept. */
    supplierDocument: text(),
    sheetsOnHand: integer().notNull(),
    sheetsReserved: integer().notNull().default(0),
    /** Millimetres, from the readings. */
    thicknessMin: real().notNull(),
    thicknessMean: real().notNull(),
    thicknessMax: real().notNull(),
    measuredAt: instant().notNull(),
    active: flag().notNull().default(true),
    version: version(),
    createdAt: createdAt(),
  },
  (table) => [index("lots_material").on(table.materialId)],
);

export const lotReadings = sqliteTable(
  "lot_readings",
  {
    id: id(),
    lotId: text()
      .notNull()
      .references(() => lots.id, { onDelete: "cascade" }),
    sheet: integer().notNull(),
    position: text().notNull(),
    /** Millimetres. */
    thickness: real().notNull(),
    measuredBy: text().references(() => users.id),
    measuredAt: createdAt(),
  },
  (table) => [index("lot_readings_lot").on(table.lotId)],
);

export const tools = sqliteTable("tools", {
  id: id(),
  number: integer().notNull().unique(),
  name: text().notNull(),
  kind: text().$type<"compression" | "up-cut" | "down-cut" | "drill" | "boring" | "engraver">().notNull(),
  /** Millimetres. */
  nominalDiameter: real().notNull(),
  measuredDiameter: real().notNull(),
  measuredAt: instant().notNull(),
  flutes: integer().notNull(),
  /** Millimetres per minute. */
  feed: real().notNull(),
  plunge: real().notNull(),
  rpm: integer().notNull(),
  /** Millimetres per pass. */
  maxPassDepth: real().notNull(),
  active: flag().notNull().default(true),
  version: version(),
});

export const machines = sqliteTable("machines", {
  id: id(),
  name: text().notNull().unique(),
  /** Millimetres. */
  bedLength: real().notNull(),
  bedWidth: real().notNull(),
  /** mm/min and mm/s2. */
  rapid: real().notNull(),
  acceleration: real().notNull(),
  toolChangeMinutes: real().notNull(),
  sheetHandlingMinutes: real().notNull(),
  /** Actual over estimated minutes, learnt from recorded runs. */
  calibration: real().notNull().default(1),
  calendar: text({ mode: "json" }).$type<WeekCalendar>().notNull(),
  active: flag().notNull().default(true),
  version: version(),
});

export const priceBookVersions = sqliteTable(
  "price_book_versions",
  {
    id: id(),
    number: integer().notNull(),
    content: text({ mode: "json" }).$type<PriceBook>().notNull(),
    note: text(),
    status: text().$type<"draft" | "published" | "superseded">().notNull(),
    createdBy: text(),
    createdAt: createdAt(),
    publishedAt: instant(),
  },
  (table) => [uniqueIndex("price_book_versions_number").on(table.number)],
);
