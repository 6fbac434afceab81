import type { Executor } from "~/db/client.server";
import { checkMove, MOVES, type MoveName, type MoveVerdict, type Role, type Stage } from "~/domain/orders";
import { findOrder, type Order } from "~/models/orders.server";
import { findMoveByRequest } from "~/models/stage-moves.server";
import { type Actor, scopeOfActor } from "./actor";
import { factsOfOrder } from "./order-facts.server";
import { CHANGED, NO_ORDER, type Refusal, type RefusalReason, refuse, type Verdict } from "./verdict";

/** What every act on an order's stage is asked with. */
export interface MoveOptions {
  readonly actor: Actor;
  readonly orderId: string;
  /** The order's version as the person saw it; null where the act is guarded by another row's version. */
  readonly version: number | null;
  readonly reason?: string | null | undefined;
  /** Made with the form: the same act sent twice moves once. */
  readonly requestId?: string | undefined;
  readonly now?: Date | undefined;
}

export interface Moved {
  readonly order: Order;
}
export const answerMove = (order: Order) => ({ ok: true, order }) as const;

export type Taken = Verdict<
  { readonly order: Order } & (
    | { readonly repeated: true }
    | { readonly repeated: false; readonly name: MoveName; readonly to: Stage; readonly role: Role }
  )
>;

/**
 * Reads an order under the actor's scope, inside the transaction that is to move it, and decides whether the move
 * may be made: the first of the names that may. `repeated` when this request moved it before.
 */
export async function takeMove(
  tx: Executor,
  names: MoveName | readonly MoveName[],
  options: MoveOptions,
): Promise<Taken> {
  const { actor, orderId, version, requestId, reason, now = new Date() } = options;
  const order = await findOrder(tx, orderId, scopeOfActor(actor));
  if (!order) return NO_ORDER;
  if (requestId !== undefined && (await findMoveByRequest(tx, order.id, requestId)))
    return { ok: true, repeated: true, order };
  if (version !== null && order.version !== version) return CHANGED;
  const roles = rolesOn(order, actor);
  const facts = await factsOfOrder(tx, order, now);
  let refusal: Extract<MoveVerdict, { ok: false }> | null = null;
  for (const name of typeof names === "string" ? [names] : names) {
    const verdict = checkMove(name, facts, roles, reason);
    if (verdict.ok)
      return { ok: true, repeated: false, order, name, to: verdict.to, role: roleFor(name, roles) };
    if (refusal === null || verdict.why !== "not-allowed") refusal = verdict;
  }
  if (refusal === null) throw new Error("No move was named.");
  return refusalOfMove(refusal);
}

/** Being a builder counts on one's own orders only, whatever else a person is. */
const rolesOn = (order: Order, { id, roles }: Actor): readonly Role[] =>
  order.builderId === id ? roles : roles.filter((role) => role !== "builder");

/** The role a move is written down under: the first that the table lets make it. */
const roleFor = (name: MoveName, roles: readonly Role[]): Role => {
  const by: readonly string[] = MOVES[name].by;
  const role = roles.find((one) => by.includes(one));
  if (!role) throw new Error(`None of ${roles.join(", ")} may ${name}.`);
  return role;
};

const REASONS: Record<Extract<MoveVerdict, { ok: false }>["why"], RefusalReason> = {
  unknown: "invalid",
  "not-allowed": "not-allowed",
  "wrong-stage": "wrong-stage",
  reason: "incomplete",
  units: "incomplete",
  stock: "incomplete",
  delivery: "incomplete",
  "no-stops": "open-findings",
  "asks-answered": "open-findings",
  "quote-open": "expired",
  approved: "incomplete",
  reviewed: "wrong-stage",
  "paid-in-full": "unpaid",
  "pieces-ready": "wrong-stage",
  "nothing-nested": "wrong-stage",
  "nothing-cut": "wrong-stage",
  "held-from-known": "wrong-stage",
};

export const refusalOfMove = ({ why, words }: Extract<MoveVerdict, { ok: false }>): Refusal =>
  refuse(REASONS[why], words);
