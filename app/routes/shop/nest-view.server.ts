import type { Person } from "~/auth/guards.server";
import { silhouetteOf } from "~/components/drawing-viewer/view-geometry-of";
import { placedBox, type SheetView } from "~/components/sheet-viewer/sheet-view";
import { db } from "~/db/client.server";
import type { Part } from "~/domain/parts";
import { findPlacedParts } from "~/flows/find-placed-parts.server";
import { proposeNest } from "~/flows/nest-orders.server";
import type { Lot, Material } from "~/models/materials.server";
import { findLot, findMaterials } from "~/models/materials.server";
import { findNestContent, listNests } from "~/models/nests.server";
import type { Order } from "~/models/orders.server";
import { findNames } from "~/models/people.server";
import { listPiecesToNest, type PieceWithPart } from "~/models/pieces.server";
import { listOrdersById } from "~/models/queue.server";
import { findRunOfSheet } from "~/models/runs.server";

export interface StockChoice {
  readonly materialId: string;
  readonly lotId: string | null;
}

/** A stock as addresses and forms carry it: `material.lot`, the lot empty where there is none. */
export function readStock(text: string | null): StockChoice | null {
  const [materialId, lotId] = text?.split(".") ?? [];
  return materialId ? { materialId, lotId: lotId || null } : null;
}
const stockKey = ({ materialId, lotId }: StockChoice): string => `${materialId}.${lotId ?? ""}`;

const describeStock = (material: Material, lot: Lot | null | undefined) => ({
  name: material.name,
  lot: lot?.code ?? null,
  thickness: lot ? { min: lot.thicknessMin, max: lot.thicknessMax } : null,
  sheet: { length: material.sheetLength, width: material.sheetWidth },
});

/** Received pieces that wait for a nest, by stock and order; what is due first comes first. */
export async function nestPool() {
  const waiting = await listPiecesToNest(db, {});
  const orders = await listOrdersById(db, [...new Set(waiting.map(({ orderId }) => orderId))]);
  const materials = await findMaterials(
    db,
    waiting.map(({ materialId }) => materialId),
  );
  const outlines = await findPlacedParts(waiting);
  const keys = [...new Set(waiting.map(stockKey))];
  const stocks = await Promise.all(
    keys.map(async (key) => {
      const here = waiting.filter((piece) => stockKey(piece) === key);
      const material = materials.find(({ id }) => id === here[0]?.materialId);
      const lotId = here[0]?.lotId ?? null;
      return material
        ? {
            key,
            ...describeStock(material, lotId === null ? null : await findLot(db, lotId)),
            pieces: here.length,
            orders: orders.flatMap((order) => {
              const mine = here.filter(({ orderId }) => orderId === order.id);
              return mine.length > 0 ? [waitingOrder(order, mine, outlines)] : [];
            }),
          }
        : null;
    }),
  );
  return stocks.filter((stock) => stock !== null);
}
export type NestPool = Awaited<ReturnType<typeof nestPool>>;

function waitingOrder(order: Order, mine: readonly PieceWithPart[], outlines: ReadonlyMap<string, Part>) {
  const outline = mine.map(({ part }) => outlines.get(part.id)).find((part) => part !== undefined);
  return {
    id: order.id,
    reference: order.reference,
    name: order.name,
    version: order.version,
    promisedFor: order.promisedFor?.toISOString() ?? null,
    pieces: mine.length,
    remakes: mine.filter(({ remakeOf }) => remakeOf !== null).length,
    shape: outline ? silhouetteOf(outline) : null,
  };
}

type Laid = {
  readonly length: number;
  readonly width: number;
  readonly yield: number;
  readonly estimatedMinutes: number;
  readonly placements: readonly { readonly pieceId: string; x: number; y: number; turnDegrees: number }[];
};

interface Laying {
  readonly sheets: readonly Laid[];
  readonly pieces: readonly PieceWithPart[];
  readonly orders: readonly Order[];
  readonly outlines: ReadonlyMap<string, Part>;
  readonly rules: { readonly spacing: number; readonly margin: number };
  readonly hasGrain: boolean;
}

/** Sheets as the viewer draws them. */
function sheetViews({ sheets, pieces, orders, outlines, rules, hasGrain }: Laying): SheetView[] {
  return sheets.map((sheet) => ({
    length: sheet.length,
    width: sheet.width,
    ...rules,
    hasGrain,
    yield: sheet.yield,
    minutes: sheet.estimatedMinutes,
    parts: sheet.placements.flatMap(({ pieceId, x, y, turnDegrees }) => {
      const piece = pieces.find(({ id }) => id === pieceId);
      const outline = piece && outlines.get(piece.part.id);
      const order = orders.findIndex(({ id }) => id === piece?.orderId);
      if (!piece || !outline) return [];
      const frame = { x, y, turnDegrees };
      const number = orders[order]?.reference.replace(/^\D+/, "") ?? "";
      return [
        {
          id: pieceId,
          label: `${number} ${piece.part.label}·${piece.number}`,
          order: Math.max(0, order),
          d: silhouetteOf(outline).d,
          ...frame,
          box: placedBox(outline.box, frame),
        },
      ];
    }),
  }));
}

const onNest = (orders: readonly Order[], pieces: readonly PieceWithPart[], sheets: readonly Laid[]) =>
  orders.map((order) => {
    const mine = pieces.filter(({ orderId }) => orderId === order.id);
    return {
      id: order.id,
      reference: order.reference,
      name: order.name,
      version: order.version,
      promisedFor: order.promisedFor?.toISOString() ?? null,
      pieces: mine.length,
      sheets: sheets.flatMap((sheet, index) =>
        sheet.placements.some(({ pieceId }) => mine.some(({ id }) => id === pieceId)) ? [index + 1] : [],
      ),
    };
  });

/** What the chosen orders' pieces come to on sheets of their stock; nothing is saved. */
export async function nestProposal(person: Person, stock: StockChoice, orderIds: readonly string[]) {
  const proposed = await proposeNest({ actor: person, materialId: stock.materialId, orderIds });
  if (!proposed.ok) return { ok: false as const, words: proposed.words };
  const { material, lotId, sheets, pieces, spacing, margin } = proposed;
  const orders = await listOrdersById(db, [...new Set(pieces.map(({ orderId }) => orderId))]);
  const outlines = await findPlacedParts(pieces);
  const area = pieces.reduce((total, { part }) => total + part.width * part.height, 0);
  return {
    ok: true as const,
    stock: describeStock(material, lotId === null ? null : await findLot(db, lotId)),
    materialId: material.id,
    orders: onNest(orders, pieces, sheets),
    areaBound: Math.ceil(area / (material.sheetLength * material.sheetWidth)),
    minutes: sheets.reduce((total, { estimatedMinutes }) => total + estimatedMinutes, 0),
    sheets: sheetViews({
      sheets,
      pieces,
      orders,
      outlines,
      rules: { spacing, margin },
      hasGrain: material.hasGrain,
    }),
  };
}
export type NestProposalView = Extract<Awaited<ReturnType<typeof nestProposal>>, { ok: true }>;

/** Nests made so far, newest first. */
export async function nestList() {
  const found = await listNests(db, { statuses: ["locked", "cutting", "done"], limit: 50 });
  return found.map(({ nest, material, sheets, pieces }) => ({
    id: nest.id,
    number: nest.number,
    status: nest.status,
    lockedAt: nest.lockedAt?.toISOString() ?? null,
    material: material.name,
    sheets,
    pieces,
  }));
}

/** A locked nest as it lies; undefined where there is none. */
export async function nestView(nestId: string) {
  const content = await findNestContent(db, nestId);
  if (!content) return undefined;
  const { nest, material, lot, sheets } = content;
  const pieces = sheets.flatMap(({ placements }) =>
    placements.map(({ piece, part }): PieceWithPart => ({ ...piece, part })),
  );
  const orders = await listOrdersById(db, [...new Set(pieces.map(({ orderId }) => orderId))]);
  const names = await findNames(db, nest.lockedBy === null ? [] : [nest.lockedBy]);
  const views = sheetViews({
    sheets,
    pieces,
    orders,
    outlines: await findPlacedParts(pieces),
    rules: { spacing: nest.spacing, margin: nest.margin },
    hasGrain: material.hasGrain,
  });
  return {
    id: nest.id,
    number: nest.number,
    status: nest.status,
    version: nest.version,
    lockedBy: nest.lockedBy === null ? null : (names.get(nest.lockedBy) ?? null),
    lockedAt: nest.lockedAt?.toISOString() ?? null,
    stock: describeStock(material, lot),
    orders: onNest(orders, pieces, sheets),
    sheets: await Promise.all(
      sheets.map(async ({ id, number, status }, index) => {
        const run = await findRunOfSheet(db, id);
        return {
          id,
          number,
          status,
          view: views[index],
          run: run ? { day: run.day, done: run.finishedAt !== null, actualMinutes: run.actualMinutes } : null,
        };
      }),
    ),
  };
}
