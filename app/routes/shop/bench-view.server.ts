import type { Person } from "~/auth/guards.server";
import { silhouetteOf } from "~/components/drawing-viewer/view-geometry-of";
import { db } from "~/db/client.server";
import { mayDo } from "~/domain/orders";
import { findPlacedParts } from "~/flows/find-placed-parts.server";
import { listPiecesWithSheet, listSheetsAtBench } from "~/models/bench.server";

/** Sheets with tabs still on, and the orders they are of. */
export async function benchList() {
  const rows = await listSheetsAtBench(db);
  const sheets = [...new Set(rows.map(({ sheetId }) => sheetId))].map((sheetId) => {
    const mine = rows.filter((row) => row.sheetId === sheetId);
    return {
      id: sheetId,
      nest: mine[0]?.nestNumber ?? 0,
      number: mine[0]?.number ?? 0,
      material: mine[0]?.material ?? "",
      waiting: mine.reduce((sum, { waiting }) => sum + waiting, 0),
      orders: mine.map(({ reference }) => reference),
    };
  });
  const orders = [...new Set(rows.map(({ orderId }) => orderId))].map((orderId) => {
    const mine = rows.filter((row) => row.orderId === orderId);
    return {
      id: orderId,
      reference: mine[0]?.reference ?? "",
      name: mine[0]?.name ?? "",
      promisedFor: mine[0]?.promisedFor?.toISOString() ?? null,
      waiting: mine.reduce((sum, { waiting }) => sum + waiting, 0),
      sheets: mine.length,
    };
  });
  return { sheets, orders };
}

/** Every piece of an order, or on a sheet, as the bench handles it. */
export async function benchView(
  of: { readonly orderId: string } | { readonly sheetId: string },
  person: Person,
) {
  const pieces = (await listPiecesWithSheet(db, of)).filter(({ state }) => state !== "cancelled");
  const outlines = await findPlacedParts(pieces);
  const shapes = [...outlines].map(([partId, part]) => [partId, silhouetteOf(part)] as const);
  return {
    mayAct: mayDo(person.roles, "piece.move"),
    shapes: Object.fromEntries(shapes),
    pieces: pieces.map((piece) => ({
      id: piece.id,
      code: piece.code,
      orderId: piece.orderId,
      reference: piece.reference,
      partId: piece.part.id,
      label: piece.part.label,
      number: piece.number,
      of: piece.of,
      stage: piece.stage,
      state: piece.state,
      remake: piece.remakeOf !== null,
      sheet: piece.sheet && { nest: piece.sheet.nestNumber, number: piece.sheet.number },
    })),
  };
}
export type BenchView = Awaited<ReturnType<typeof benchView>>;
export type BenchPiece = BenchView["pieces"][number];
