import { db } from "~/db/client.server";
import type { Interpretation } from "~/domain/orders";
import { findInterpretationNumbered } from "~/models/interpretations.server";
import { findOrder } from "~/models/orders.server";
import { type Actor, scopeOfActor } from "./actor";
import { orderInterpretation } from "./order-interpretation.server";
import { saveInterpretation } from "./save-interpretation.server";
import { NO_ORDER, refuse, type Verdict } from "./verdict";

export interface UndoChoicesOptions {
  readonly actor: Actor;
  readonly orderId: string;
  /** The number of the interpretation whose change is taken back. */
  readonly after: number;
}

/**
 * Takes the last change of the choices back: what stood before is saved as the next interpretation, so that nothing
 * of the history is lost and a second undo brings the change back. Drawings stay as they are.
 */
export async function undoChoices({
  actor,
  orderId,
  after,
}: UndoChoicesOptions): Promise<Verdict<{ number: number }>> {
  const order = await findOrder(db, orderId, scopeOfActor(actor));
  if (!order) return NO_ORDER;
  const before = await findInterpretationNumbered(db, order.id, after - 1);
  if (!before) return refuse("incomplete", "There is no earlier change to go back to.");
  const { content } = await orderInterpretation(db, order);
  return saveInterpretation({ actor, orderId, after, content: asBefore(content, before.content) });
}

function asBefore(now: Interpretation, before: Interpretation): Interpretation {
  const here = new Set(now.files.map(({ sha256 }) => sha256));
  return {
    ...before,
    files: now.files.map((file) => before.files.find(({ sha256 }) => sha256 === file.sha256) ?? file),
    parts: before.parts.filter(({ sha256 }) => here.has(sha256)),
  };
}
