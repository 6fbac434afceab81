import type { Person } from "~/auth/guards.server";
import { db } from "~/db/client.server";
import { checkMove, type MoveName, mayDo, type OrderFacts, type Role, type Stage } from "~/domain/orders";
import { factsOfOrder } from "~/flows/order-facts.server";
import { listPaidCheckouts } from "~/models/checkouts.server";
import { listLedger, owedOnQuote } from "~/models/ledger.server";
import type { Order } from "~/models/orders.server";
import { findAddressee, findNames } from "~/models/people.server";
import { listPieces } from "~/models/pieces.server";
import { listSheetsOfOrders } from "~/models/queue.server";
import { listRefunds, refundedThrough } from "~/models/refunds.server";
import { listStageMoves } from "~/models/stage-moves.server";
import { listStockGroups } from "~/models/stock-groups.server";
import { frozenView } from "../builder/frozen-view.server";

/** An act of the page: may be done now, or why not. Absent where it is not this person's at all. */
export interface ActState {
  readonly may: boolean;
  readonly why: string | null;
}

/** Each act of the page with the moves that do it, the first allowed counting. */
const PAGE_ACTS = {
  "accept-review": ["accept-review"],
  "send-back": ["send-back"],
  receive: ["receive"],
  nest: ["nest"],
  cut: ["cut"],
  "remove-tabs": ["remove-tabs"],
  remake: ["remake"],
  hold: ["hold"],
  release: ["release"],
  undo: ["undo", "undo-ship"],
  cancel: ["cancel", "cancel-late"],
  ship: ["ship"],
} as const satisfies Record<string, readonly MoveName[]>;
export type PageAct = keyof typeof PAGE_ACTS;

/** A reason is asked for by the form itself. */
const WITH_A_REASON = "given";

function actStates(facts: OrderFacts, roles: readonly Role[]): Partial<Record<PageAct, ActState>> {
  const staff = roles.filter((role) => role !== "builder");
  const states: Partial<Record<PageAct, ActState>> = {};
  for (const [act, moves] of Object.entries(PAGE_ACTS) as [PageAct, readonly MoveName[]][]) {
    const verdicts = moves.map((move) => checkMove(move, facts, staff, WITH_A_REASON));
    const refusals = verdicts.flatMap((verdict) => (verdict.ok ? [] : [verdict]));
    const spoken = refusals.find(({ why }) => why !== "not-allowed");
    if (refusals.length < verdicts.length) states[act] = { may: true, why: null };
    else if (spoken) states[act] = { may: false, why: spoken.words };
  }
  return states;
}

/** An order as the shop's people see it. Instants are ISO strings, money integer cents, lengths millimetres. */
export async function staffOrderView(order: Order, person: Person, now = new Date()) {
  const facts = await factsOfOrder(db, order, now);
  const moves = await listStageMoves(db, order.id);
  const ledger = await listLedger(db, order.id);
  const refunds = await listRefunds(db, order.id);
  const builder = await findAddressee(db, order.builderId);
  const names = await findNames(
    db,
    [...moves, ...ledger].flatMap(({ actorId }) => (actorId === null ? [] : [actorId])),
  );
  const nameOf = (id: string | null) => (id === null ? null : (names.get(id) ?? null));
  const reached: Partial<Record<Stage, string>> = { draft: order.createdAt.toISOString() };
  for (const { to, createdAt } of moves) reached[to] ??= createdAt.toISOString();
  return {
    id: order.id,
    reference: order.reference,
    name: order.name,
    stage: order.stage,
    heldFrom: order.heldFrom,
    holdReason: order.holdReason,
    reviewAsked: order.reviewAsked,
    trial: order.trial,
    version: order.version,
    delivery: order.delivery,
    shipTo: order.shipTo,
    builder: builder ? { name: builder.name, email: builder.email } : null,
    /** Made here, so that the same act sent twice moves once. */
    requestId: crypto.randomUUID(),
    refundId: crypto.randomUUID(),
    acts: actStates(facts, person.roles),
    mayRun: mayDo(person.roles, "schedule.edit"),
    mayRefund: mayDo(person.roles, "refund.make"),
    mayShip: mayDo(person.roles, "shipping.edit"),
    rule: {
      stage: order.stage,
      heldFrom: order.heldFrom,
      reached,
      further: 0,
      promisedFor: order.promisedFor?.toISOString() ?? null,
      shippedAt: order.shippedAt?.toISOString() ?? null,
      now: now.toISOString(),
    },
    frozen: await frozenView(order, person.roles, now),
    pieces: (await listPieces(db, order.id)).map(
      ({ id, part, number, of, stage, state, remakeOf, cause, payer, stockGroupId }) => ({
        id,
        label: part.label,
        number,
        of,
        stage,
        state,
        remake: remakeOf !== null,
        cause,
        payer,
        stockGroupId,
      }),
    ),
    stocks: (order.revisionId === null ? [] : await listStockGroups(db, order.id, order.revisionId)).map(
      ({ id, materialId, lotId, material, lot, sheets, reservedAt }) => ({
        id,
        materialId,
        lotId,
        material: material.name,
        lot: lot?.code ?? null,
        thickness: lot ? { min: lot.thicknessMin, mean: lot.thicknessMean, max: lot.thicknessMax } : null,
        sheets,
        reserved: reservedAt !== null,
      }),
    ),
    sheets: (await listSheetsOfOrders(db, [order.id])).map((sheet) => ({
      ...sheet,
      run: sheet.run && {
        id: sheet.run.id,
        version: sheet.run.version,
        machine: sheet.run.machine,
        day: sheet.run.day,
        plannedMinutes: sheet.run.plannedMinutes,
        startedAt: sheet.run.startedAt?.toISOString() ?? null,
        finishedAt: sheet.run.finishedAt?.toISOString() ?? null,
        actualMinutes: sheet.run.actualMinutes,
      },
    })),
    moves: moves
      .map(({ id, from, to, act, actorId, actorRole, reason, undoes, pieceIds, createdAt }) => ({
        id,
        from,
        to,
        act,
        by: nameOf(actorId),
        role: actorRole,
        reason,
        undone: undoes !== null,
        pieces: pieceIds?.length ?? null,
        at: createdAt.toISOString(),
      }))
      .reverse(),
    money: {
      owed: order.quoteId === null ? 0 : await owedOnQuote(db, order.id, order.quoteId),
      ledger: ledger.map(({ id, kind, amount, currency, note, actorId, createdAt }) => ({
        id,
        kind,
        amount,
        currency,
        note,
        by: nameOf(actorId),
        at: createdAt.toISOString(),
      })),
      waitingRefunds: refunds
        .filter(({ status }) => status !== "done")
        .map(({ id, amount, status, reason, createdAt }) => ({
          id,
          amount,
          status,
          reason,
          at: createdAt.toISOString(),
        })),
      payments: await refundablePayments(order, ledger),
    },
  };
}
export type StaffOrderView = Awaited<ReturnType<typeof staffOrderView>>;

/** Payments with what is left of each to give back, in cents. */
async function refundablePayments(order: Order, ledger: Awaited<ReturnType<typeof listLedger>>) {
  const paid = await listPaidCheckouts(db, order.id);
  return Promise.all(
    paid.map(async ({ id, currency, updatedAt }) => {
      const came = -ledger
        .filter((entry) => entry.kind === "payment" && entry.checkoutId === id)
        .reduce((total, { amount }) => total + amount, 0);
      return {
        checkoutId: id,
        currency,
        came,
        left: came - (await refundedThrough(db, id)),
        at: updatedAt.toISOString(),
      };
    }),
  );
}
