import { db, type Executor, transact } from "~/db/client.server";
import { checkNest, frameOfPlacement, type NestItem, type NestRequest, nestOnSheets } from "~/domain/nesting";
import { mayDo, type Role, stageFromPieces } from "~/domain/orders";
import type { Part } from "~/domain/parts";
import type { PriceBook } from "~/domain/pricing";
import { estimateMinutes } from "~/domain/toolpath";
import { recordEvent } from "~/models/events.server";
import { findMaterials, type Material } from "~/models/materials.server";
import { insertLockedNest, type Nest, type NewNest } from "~/models/nests.server";
import { findOrder, type Order } from "~/models/orders.server";
import { listPieces, listPiecesToNest, movePieces } from "~/models/pieces.server";
import { findPublishedPriceBook } from "~/models/price-books.server";
import { findRevision } from "~/models/revisions.server";
import { currentSettings } from "~/models/settings.server";
import { type Actor, scopeOfActor } from "./actor";
import { changeStage } from "./change-stage.server";
import { loadGeometry } from "./geometry-store.server";
import { takeMove } from "./move.server";
import { mailStage } from "./order-mails.server";
import { answering, CHANGED, orRollBack, Refused, refuse, type Verdict } from "./verdict";

/** The simple nest is the same for every seed; the column is there for one that is not. */
const SEED = 0;

export interface ProposeNestOptions {
  readonly actor: Actor;
  readonly materialId: string;
  /** Orders whose waiting pieces on this stock are laid; all of one lot. */
  readonly orderIds: readonly string[];
}

type WaitingPiece = Awaited<ReturnType<typeof listPiecesToNest>>[number];

export interface NestProposal {
  readonly material: Material;
  readonly lotId: string | null;
  readonly spacing: number;
  readonly margin: number;
  readonly sheets: NewNest["sheets"];
  readonly pieces: readonly WaitingPiece[];
}

/** Lays the waiting pieces of some orders on sheets of one stock, checks the result, and saves nothing. */
export async function proposeNest({
  actor,
  materialId,
  orderIds,
}: ProposeNestOptions): Promise<Verdict<NestProposal>> {
  if (!mayDo(actor.roles, "nest.edit")) return refuse("not-allowed", "Nesting is the operators' work.");
  const pieces = (await listPiecesToNest(db, { materialId })).filter((piece) =>
    orderIds.includes(piece.orderId),
  );
  if (pieces.length === 0)
    return refuse("wrong-stage", "No piece of these orders waits for a nest on this stock.");
  const lotId = pieces[0]?.lotId ?? null;
  if (pieces.some((piece) => piece.lotId !== lotId))
    return refuse("invalid", "These orders were quoted on different lots. Nest one lot at a time.");
  const [material] = await findMaterials(db, [materialId]);
  const book = await findPublishedPriceBook(db);
  if (!material || !book) return refuse("unavailable", "The stock or the price book is missing.");
  const { nesting } = await currentSettings(db);
  const outlines = await findOutlines(actor, pieces);
  const request: NestRequest = {
    items: pieces.map((piece) => nestItem(piece, material)),
    sheet: { length: material.sheetLength, width: material.sheetWidth },
    spacing: nesting.spacing,
    margin: nesting.margin,
  };
  const nest = nestOnSheets(request);
  const checked = checkNest(nest, request);
  if (!checked.ok) throw new Error(`The nest is wrong: ${checked.problems.join(" ")}`);
  const [tooLarge] = nest.unplaced;
  if (tooLarge) {
    const piece = pieces.find(({ id }) => id === tooLarge.item);
    return refuse(
      "no-room",
      `Part ${piece?.part.label} does not go on a sheet of ${material.code} along its grain. Hold the order and ask its builder.`,
    );
  }
  return {
    ok: true,
    material,
    lotId,
    spacing: nesting.spacing,
    margin: nesting.margin,
    pieces,
    sheets: nest.sheets.map((sheet) => {
      const placed = sheet.placements.map((placement) => {
        const piece = pieces.find(({ id }) => id === placement.item);
        const part = outlines.get(placement.item);
        if (!piece || !part) throw new Error(`Piece ${placement.item} has no outline.`);
        return { piece, frame: frameOn(part, { ...placement, alongY: isTurned(piece, material) }) };
      });
      return {
        ...request.sheet,
        yield: sheet.yield,
        estimatedMinutes: minutesOf(placed, material, book.content),
        placements: placed.map(({ piece, frame }) => ({ pieceId: piece.id, ...frame })),
      };
    }),
  };
}

/** A part whose grain runs along its own Y lies a quarter turn from how it was drawn. */
const isTurned = (piece: WaitingPiece, material: Material): boolean =>
  material.hasGrain && piece.part.grain === "along-y";

function nestItem(piece: WaitingPiece, material: Material): NestItem {
  const { width, height, grain } = piece.part;
  const turned = isTurned(piece, material);
  return {
    id: piece.id,
    width: turned ? height : width,
    height: turned ? width : height,
    mayTurn90: !material.hasGrain || grain === "free",
    quantity: 1,
  };
}

function frameOn(
  part: Part,
  {
    alongY,
    ...placement
  }: ReturnType<typeof nestOnSheets>["sheets"][number]["placements"][number] & {
    alongY: boolean;
  },
) {
  return frameOfPlacement(part.box, { ...placement, turnDegrees: alongY ? 90 : placement.turnDegrees });
}

function minutesOf(placed: readonly { piece: WaitingPiece }[], material: Material, book: PriceBook): number {
  const estimate = estimateMinutes({
    parts: placed.map(({ piece: { part } }) => ({
      quantity: 1,
      cutLength: part.outerLength + part.innerLength,
      holes: part.holes,
    })),
    thickness: material.nominalThickness,
    sheets: 1,
    rates: book,
  });
  if (!estimate.ok) throw new Error(estimate.reason);
  return estimate.estimate.minutes;
}

/** The part of every piece out of the geometry its revision froze, by piece id. */
async function findOutlines(actor: Actor, pieces: readonly WaitingPiece[]): Promise<Map<string, Part>> {
  const outlines = new Map<string, Part>();
  for (const orderId of new Set(pieces.map((piece) => piece.orderId))) {
    const order = await findOrder(db, orderId, scopeOfActor(actor));
    const revision =
      order?.revisionId == null ? undefined : await findRevision(db, orderId, order.revisionId);
    const geometry = revision && (await loadGeometry(revision.geometryKey));
    for (const piece of pieces.filter((one) => one.orderId === orderId)) {
      const file = geometry?.files.find(({ sha256 }) => sha256 === piece.part.fileSha);
      const part = file?.report.parts.find(({ id }) => id === piece.part.letter);
      if (part) outlines.set(piece.id, part);
    }
  }
  return outlines;
}

export interface NestOrdersOptions extends ProposeNestOptions {
  /** The versions of the orders as they were seen, by id. */
  readonly versions: Readonly<Record<string, number>>;
  readonly requestId?: string | undefined;
}

/** Nests orders and locks the nest: their pieces are spoken for, and move to nested. */
export async function nestOrders(options: NestOrdersOptions): Promise<Verdict<{ nest: Nest }>> {
  const proposed = await proposeNest(options);
  if (!proposed.ok) return proposed;
  return answering(() => transact((tx) => lock(tx, options, proposed)));
}

async function lock(
  tx: Executor,
  options: NestOrdersOptions,
  proposal: NestProposal,
): Promise<Verdict<{ nest: Nest }>> {
  const { actor } = options;
  const { material, lotId, spacing, margin, sheets } = proposal;
  const orderIds = [...new Set(proposal.pieces.map((piece) => piece.orderId))];
  const orders: { order: Order; role: Role }[] = [];
  for (const orderId of orderIds) {
    const version = options.versions[orderId];
    if (version === undefined) throw new Refused(CHANGED);
    const taken = orRollBack(
      await takeMove(tx, "nest", { actor, orderId, version, requestId: options.requestId }),
    );
    if (taken.repeated) throw new Refused(refuse("wrong-stage", "This nest is made already."));
    orders.push(taken);
  }
  const nest = await insertLockedNest(tx, {
    materialId: material.id,
    lotId,
    spacing,
    margin,
    seed: SEED,
    createdBy: actor.id,
    sheets,
  });
  for (const { order, role } of orders) {
    const ids = proposal.pieces.filter((piece) => piece.orderId === order.id).map((piece) => piece.id);
    if ((await movePieces(tx, { ids, from: "received", to: "nested" })) !== ids.length)
      throw new Refused(CHANGED);
    const { order: after } = orRollBack(
      await changeStage(tx, {
        order,
        to: stageFromPieces(await listPieces(tx, order.id)) ?? order.stage,
        act: "nest",
        by: { id: actor.id, role },
        reason: `Nest N-${nest.number}`,
        requestId: options.requestId,
        pieces: { ids, from: "received", to: "nested" },
      }),
    );
    await recordEvent(tx, { orderId: order.id, kind: "nest", data: { nest: nest.number } });
    if (after.stage !== order.stage) await mailStage(tx, { order: after, from: order.stage });
  }
  return { ok: true, nest };
}
