import {
  and,
  asc,
  count,
  countDistinct,
  desc,
  eq,
  gte,
  inArray,
  isNull,
  or,
  type SQL,
  sql,
  sum,
} from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import {
  machines,
  materials,
  nestSheets,
  nests,
  orders,
  parts,
  pieces,
  placements,
  quotes,
  runs,
  stockGroups,
  users,
} from "~/db/schema";
import type { Stage } from "~/domain/orders";
import type { Order } from "./orders.server";
import type { Piece } from "./pieces.server";

export interface QueueSearch {
  readonly stages: readonly Stage[];
  /** Only these orders. */
  readonly ids?: readonly string[] | undefined;
  /** Only orders that use this stock. */
  readonly materialId?: string | undefined;
  /** Part of a reference, an order's name or its builder's. */
  readonly words?: string | undefined;
  /** Only orders shipped since. */
  readonly shippedSince?: Date | undefined;
  /** From 1. */
  readonly page: number;
  readonly size: number;
}

/** A sheet that pieces of an order lie on, and its turn on a machine. */
export interface SheetOfOrder {
  readonly orderId: string;
  readonly sheetId: string;
  readonly nestId: string;
  readonly nestNumber: number;
  readonly number: number;
  readonly status: (typeof nestSheets.$inferSelect)["status"];
  readonly estimatedMinutes: number;
  readonly run: (typeof runs.$inferSelect & { readonly machine: string }) | null;
}

export interface QueuedOrder {
  readonly order: Order;
  readonly builder: string;
  readonly quote: { readonly total: number; readonly machineMinutes: number } | null;
  readonly kinds: number;
  readonly parts: number;
  readonly materials: readonly string[];
  /** How many pieces stand where, remakes told apart. */
  readonly pieces: readonly {
    readonly stage: Piece["stage"];
    readonly state: Piece["state"];
    readonly remake: boolean;
    readonly count: number;
  }[];
  readonly sheets: readonly SheetOfOrder[];
}

/** One page of the shop's orders: those to be received first, then by the day they are promised for; shipped ones by the day they left. */
export async function pageOfQueue(
  executor: Executor,
  search: QueueSearch,
): Promise<{ readonly rows: QueuedOrder[]; readonly found: number }> {
  const asked = and(
    inArray(orders.stage, [...search.stages]),
    search.ids && inArray(orders.id, [...search.ids]),
    search.shippedSince && gte(orders.shippedAt, search.shippedSince),
    search.materialId === undefined ? undefined : onStock(search.materialId),
    withWords(search.words),
  );
  const rows = await executor
    .select({ order: orders, builder: users.name, quote: quotes })
    .from(orders)
    .innerJoin(users, eq(users.id, orders.builderId))
    .leftJoin(quotes, eq(quotes.id, orders.quoteId))
    .where(asked)
    .orderBy(...queueOrder(search))
    .limit(search.size)
    .offset((search.page - 1) * search.size);
  const [counted] = await executor
    .select({ found: count() })
    .from(orders)
    .innerJoin(users, eq(users.id, orders.builderId))
    .where(asked);
  const more = await contentsOf(
    executor,
    rows.map(({ order }) => order),
  );
  return {
    found: counted?.found ?? 0,
    rows: rows.map(({ order, builder, quote }) => ({ order, builder, quote, ...more(order) })),
  };
}

const queueOrder = (search: QueueSearch): SQL[] =>
  search.stages.every((stage) => stage === "shipped")
    ? [desc(orders.shippedAt)]
    : [
        sql`case ${orders.stage} when 'paid' then 0 else 1 end`,
        sql`${orders.promisedFor} is null`,
        asc(orders.promisedFor),
        asc(orders.reference),
      ];

const onStock = (materialId: string): SQL =>
  sql`exists (select 1 from ${stockGroups} where ${stockGroups.orderId} = ${orders.id} and ${stockGroups.revisionId} = ${orders.revisionId} and ${stockGroups.materialId} = ${materialId})`;

/** `%` and `_` in what a person typed are letters like any other. */
function withWords(words: string | undefined): SQL | undefined {
  const wanted = words?.trim();
  if (!wanted) return undefined;
  const pattern = `%${wanted.replace(/[\\%_]/g, (sign) => `\\${sign}`)}%`;
  return or(
    sql`${orders.name} like ${pattern} escape '\\'`,
    sql`${orders.reference} like ${pattern} escape '\\'`,
    sql`${users.name} like ${pattern} escape '\\'`,
  );
}

/** Kinds, parts, stock, pieces and sheets of a page of orders, in a few queries for all of them. */
async function contentsOf(executor: Executor, page: readonly Order[]) {
  const ids = page.map(({ id }) => id);
  const revisionIds = page.flatMap(({ revisionId }) => (revisionId === null ? [] : [revisionId]));
  const kinds = await executor
    .select({
      revisionId: parts.revisionId,
      kinds: count(),
      parts: sum(parts.quantity).mapWith(Number),
    })
    .from(parts)
    .where(inArray(parts.revisionId, revisionIds))
    .groupBy(parts.revisionId);
  const stocks = await executor
    .selectDistinct({ revisionId: stockGroups.revisionId, name: materials.name })
    .from(stockGroups)
    .innerJoin(materials, eq(materials.id, stockGroups.materialId))
    .where(inArray(stockGroups.revisionId, revisionIds));
  const standing = await executor
    .select({
      orderId: pieces.orderId,
      stage: pieces.stage,
      state: pieces.state,
      remake: sql<boolean>`${pieces.remakeOf} is not null`.mapWith(Boolean),
      count: count(),
    })
    .from(pieces)
    .where(inArray(pieces.orderId, ids))
    .groupBy(pieces.orderId, pieces.stage, pieces.state, sql`${pieces.remakeOf} is not null`);
  const sheets = await listSheetsOfOrders(executor, ids);
  return ({ id, revisionId }: Order) => {
    const counted = kinds.find((one) => one.revisionId === revisionId);
    return {
      kinds: counted?.kinds ?? 0,
      parts: counted?.parts ?? 0,
      materials: stocks.filter((one) => one.revisionId === revisionId).map(({ name }) => name),
      pieces: standing.filter((one) => one.orderId === id),
      sheets: sheets.filter((one) => one.orderId === id),
    };
  };
}

/** The sheets that pieces of these orders lie on, by nest and number. */
export async function listSheetsOfOrders(
  executor: Executor,
  orderIds: readonly string[],
): Promise<SheetOfOrder[]> {
  if (orderIds.length === 0) return [];
  const rows = await executor
    .selectDistinct({
      orderId: pieces.orderId,
      sheet: nestSheets,
      nestNumber: nests.number,
      run: runs,
      machine: machines.name,
    })
    .from(placements)
    .innerJoin(pieces, eq(pieces.id, placements.pieceId))
    .innerJoin(nestSheets, eq(nestSheets.id, placements.sheetId))
    .innerJoin(nests, eq(nests.id, nestSheets.nestId))
    .leftJoin(runs, eq(runs.sheetId, nestSheets.id))
    .leftJoin(machines, eq(machines.id, runs.machineId))
    .where(and(inArray(pieces.orderId, [...orderIds]), isNull(placements.releasedAt)))
    .orderBy(nests.number, nestSheets.number);
  return rows.map(({ orderId, sheet, nestNumber, run, machine }) => ({
    orderId,
    sheetId: sheet.id,
    nestId: sheet.nestId,
    nestNumber,
    number: sheet.number,
    status: sheet.status,
    estimatedMinutes: sheet.estimatedMinutes,
    run: run && { ...run, machine: machine ?? "" },
  }));
}

/** The orders that lie on each of some sheets. */
export async function listOrdersOnSheets(executor: Executor, sheetIds: readonly string[]) {
  if (sheetIds.length === 0) return [];
  return executor
    .select({
      sheetId: placements.sheetId,
      orderId: orders.id,
      reference: orders.reference,
      name: orders.name,
      stage: orders.stage,
      promisedFor: orders.promisedFor,
      pieces: countDistinct(pieces.id),
    })
    .from(placements)
    .innerJoin(pieces, eq(pieces.id, placements.pieceId))
    .innerJoin(orders, eq(orders.id, pieces.orderId))
    .where(and(inArray(placements.sheetId, [...sheetIds]), isNull(placements.releasedAt)))
    .groupBy(placements.sheetId, orders.id)
    .orderBy(orders.promisedFor, orders.reference);
}

/** Orders shipped at or after an instant. */
export async function countShippedSince(executor: Executor, since: Date): Promise<number> {
  const [row] = await executor
    .select({ shipped: count() })
    .from(orders)
    .where(and(eq(orders.stage, "shipped"), gte(orders.shippedAt, since)));
  return row?.shipped ?? 0;
}

/** Orders by their ids, the earliest promise first. */
export async function listOrdersById(executor: Executor, ids: readonly string[]): Promise<Order[]> {
  if (ids.length === 0) return [];
  return executor
    .select()
    .from(orders)
    .where(inArray(orders.id, [...ids]))
    .orderBy(orders.promisedFor, orders.reference);
}
