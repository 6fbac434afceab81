import { and, countDistinct, eq, isNull, sql } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { materials, nestSheets, nests, orders, parts, pieces, placements } from "~/db/schema";
import type { PieceWithPart } from "./pieces.server";

/** Sheets that still have pieces with their tabs on, oldest nest first, with the orders on each. */
export async function listSheetsAtBench(executor: Executor) {
  return executor
    .select({
      sheetId: nestSheets.id,
      nestNumber: nests.number,
      number: nestSheets.number,
      material: materials.name,
      orderId: orders.id,
      reference: orders.reference,
      name: orders.name,
      promisedFor: orders.promisedFor,
      waiting: countDistinct(pieces.id),
    })
    .from(pieces)
    .innerJoin(placements, and(eq(placements.pieceId, pieces.id), isNull(placements.releasedAt)))
    .innerJoin(nestSheets, eq(placements.sheetId, nestSheets.id))
    .innerJoin(nests, eq(nestSheets.nestId, nests.id))
    .innerJoin(materials, eq(nests.materialId, materials.id))
    .innerJoin(orders, eq(pieces.orderId, orders.id))
    .where(and(eq(pieces.stage, "cut"), eq(pieces.state, "good")))
    .groupBy(nestSheets.id, orders.id)
    .orderBy(nests.number, nestSheets.number, orders.reference);
}

export type PieceOnSheet = PieceWithPart & {
  readonly reference: string;
  readonly orderName: string;
  /** Where it lies or lay: nest and sheet; null when on no sheet. */
  readonly sheet: { readonly id: string; readonly nestNumber: number; readonly number: number } | null;
};

/** Pieces of an order or on a sheet, with the sheet each lies on. Ones that were taken off their sheet have none. */
export async function listPiecesWithSheet(
  executor: Executor,
  of: { readonly orderId: string } | { readonly sheetId: string },
): Promise<PieceOnSheet[]> {
  const rows = await executor
    .select({
      piece: pieces,
      part: parts,
      reference: orders.reference,
      orderName: orders.name,
      sheetId: nestSheets.id,
      nestNumber: nests.number,
      number: nestSheets.number,
    })
    .from(pieces)
    .innerJoin(parts, eq(pieces.partId, parts.id))
    .innerJoin(orders, eq(pieces.orderId, orders.id))
    .leftJoin(placements, and(eq(placements.pieceId, pieces.id), isNull(placements.releasedAt)))
    .leftJoin(nestSheets, eq(placements.sheetId, nestSheets.id))
    .leftJoin(nests, eq(nestSheets.nestId, nests.id))
    .where("orderId" in of ? eq(pieces.orderId, of.orderId) : eq(nestSheets.id, of.sheetId))
    .orderBy(orders.reference, parts.position, pieces.number, sql`${pieces}.rowid`);
  return rows.map(({ piece, part, reference, orderName, sheetId, nestNumber, number }) => ({
    ...piece,
    part,
    reference,
    orderName,
    sheet:
      sheetId === null || nestNumber === null || number === null ? null : { id: sheetId, nestNumber, number },
  }));
}
