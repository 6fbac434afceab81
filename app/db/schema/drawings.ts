import { index, integer, primaryKey, real, sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import type { Finding } from "~/domain/fit";
import type { Interpretation } from "~/domain/orders";
import { createdAt, flag, id, instant } from "./columns";
import { orders, stockGroups } from "./orders";
import { users } from "./people";

/** Original bytes, never changed; the object's key is the hash. */
export const drawingFiles = sqliteTable("drawing_files", {
  sha256: text().primaryKey(),
  size: integer().notNull(),
  createdAt: createdAt(),
  /** Gone by the owner's retention rule or a builder's erasure; the row stays to say so. */
  erasedAt: instant(),
});

export const orderDrawings = sqliteTable(
  "order_drawings",
  {
    id: id(),
    orderId: text()
      .notNull()
      .references(() => orders.id, { onDelete: "cascade" }),
    fileSha: text()
      .notNull()
      .references(() => drawingFiles.sha256),
    fileName: text().notNull(),
    position: integer().notNull(),
    uploadedBy: text().references(() => users.id),
    createdAt: createdAt(),
    removedAt: instant(),
  },
  (table) => [
    index("order_drawings_order").on(table.orderId),
    index("order_drawings_file").on(table.fileSha),
  ],
);

/** What a reader of a named version made of a file; the drawing itself lies in object storage under `drawingKey`. */
export const readings = sqliteTable(
  "readings",
  {
    id: id(),
    fileSha: text()
      .notNull()
      .references(() => drawingFiles.sha256),
    readerVersion: text().notNull(),
    status: text().$type<"queued" | "done" | "failed">().notNull(),
    /** Declared unit, layers, counts of entities, what was ignored, notes. */
    summary: text({ mode: "json" }).$type<ReadingSummary>(),
    drawingKey: text(),
    /** One plain sentence for the builder when the file cannot be read. */
    failure: text(),
    createdAt: createdAt(),
    finishedAt: instant(),
  },
  (table) => [uniqueIndex("readings_file_reader").on(table.fileSha, table.readerVersion)],
);

export interface ReadingSummary {
  readonly declared: "mm" | "cm" | "m" | "in" | "ft" | null;
  readonly layers: readonly { readonly name: string; readonly hidden: boolean; readonly count: number }[];
  readonly entities: Readonly<Record<string, number>>;
  readonly ignored: readonly {
    readonly type: string;
    readonly layer: string;
    readonly count: number;
    readonly why: string;
  }[];
  readonly notes: readonly string[];
}

/** The builder's choices, with history: the highest number is the one in force until an order is quoted. */
export const interpretations = sqliteTable(
  "interpretations",
  {
    id: id(),
    orderId: text()
      .notNull()
      .references(() => orders.id, { onDelete: "cascade" }),
    number: integer().notNull(),
    content: text({ mode: "json" }).$type<Interpretation>().notNull(),
    /** Parts found under it, in object storage by content hash. */
    geometryKey: text(),
    createdBy: text(),
    createdAt: createdAt(),
  },
  (table) => [uniqueIndex("interpretations_order_number").on(table.orderId, table.number)],
);

/** Drawings, readings and interpretation frozen together when the order is quoted. */
export const revisions = sqliteTable(
  "revisions",
  {
    id: id(),
    orderId: text()
      .notNull()
      .references(() => orders.id, { onDelete: "cascade" }),
    number: integer().notNull(),
    interpretationId: text()
      .notNull()
      .references(() => interpretations.id),
    files: text({ mode: "json" })
      .$type<{ sha256: string; fileName: string; readingId: string }[]>()
      .notNull(),
    geometryKey: text().notNull(),
    /** The revision it was mended from, and how. */
    derivedFrom: text(),
    derivation: text({ mode: "json" }).$type<Record<string, unknown>>(),
    frozenBy: text(),
    frozenAt: createdAt(),
  },
  (table) => [uniqueIndex("revisions_order_number").on(table.orderId, table.number)],
);

/** A kind of part of a frozen revision. Lengths millimetres, areas mm2. */
export const parts = sqliteTable(
  "parts",
  {
    id: id(),
    revisionId: text()
      .notNull()
      .references(() => revisions.id, { onDelete: "cascade" }),
    stockGroupId: text()
      .notNull()
      .references(() => stockGroups.id),
    position: integer().notNull(),
    /** File and part letter inside the geometry document. */
    fileSha: text().notNull(),
    letter: text().notNull(),
    label: text().notNull(),
    name: text().notNull(),
    quantity: integer().notNull(),
    mirrorOf: text(),
    width: real().notNull(),
    height: real().notNull(),
    outerLength: real().notNull(),
    innerLength: real().notNull(),
    area: real().notNull(),
    grossArea: real().notNull(),
    holes: integer().notNull(),
    grain: text().$type<"along-x" | "along-y" | "free">().notNull(),
  },
  (table) => [index("parts_revision").on(table.revisionId)],
);

export const findings = sqliteTable(
  "findings",
  {
    id: id(),
    revisionId: text()
      .notNull()
      .references(() => revisions.id, { onDelete: "cascade" }),
    position: integer().notNull(),
    severity: text().$type<"stop" | "ask" | "note">().notNull(),
    code: text().notNull(),
    /** With the drawing it is in, where the order has several. */
    content: text({ mode: "json" }).$type<Finding & { readonly fileSha?: string }>().notNull(),
  },
  (table) => [index("findings_revision").on(table.revisionId)],
);

/** Append-only: the last answer to a finding counts. */
export const findingAnswers = sqliteTable(
  "finding_answers",
  {
    id: id(),
    findingId: text()
      .notNull()
      .references(() => findings.id, { onDelete: "cascade" }),
    answer: text().$type<"accept" | "mend" | "message">().notNull(),
    note: text(),
    answeredBy: text()
      .notNull()
      .references(() => users.id),
    createdAt: createdAt(),
  },
  (table) => [index("finding_answers_finding").on(table.findingId)],
);

/** Layer meanings a builder settled once, offered next time. */
export const rememberedLayers = sqliteTable(
  "remembered_layers",
  {
    userId: text()
      .notNull()
      .references(() => users.id, { onDelete: "cascade" }),
    layer: text().notNull(),
    rule: text({ mode: "json" }).$type<Interpretation["files"][number]["layers"][number]>().notNull(),
    confirmed: flag().notNull().default(true),
    updatedAt: createdAt(),
  },
  (table) => [primaryKey({ columns: [table.userId, table.layer] })],
);
