import { transact } from "~/db/client.server";
import type { Interpretation, LayerChoice } from "~/domain/orders";
import { addInterpretation, recallLayers, rememberLayers } from "~/models/interpretations.server";
import { findLot, findMaterials } from "~/models/materials.server";
import { findOrder } from "~/models/orders.server";
import { type Actor, scopeOfActor } from "./actor";
import { guessedLayers, type OrderInterpretation, orderInterpretation } from "./order-interpretation.server";
import { NO_ORDER, refuse, type Verdict } from "./verdict";

export interface SaveInterpretationOptions {
  readonly actor: Actor;
  readonly orderId: string;
  /** The number of the interpretation that the change was made from. */
  readonly after: number;
  /** All of it, as checked by `interpretationSchema`. */
  readonly content: Interpretation;
}

/**
 * Saves the builder's choices as the next interpretation and remembers what they settled for their layers. The
 * later of two people who change the same one is told.
 */
export async function saveInterpretation(
  options: SaveInterpretationOptions,
): Promise<Verdict<{ number: number }>> {
  const { actor, orderId, after, content } = options;
  return transact(async (tx) => {
    const order = await findOrder(tx, orderId, scopeOfActor(actor));
    if (!order) return NO_ORDER;
    if (order.stage !== "draft")
      return refuse(
        "wrong-stage",
        "This order is quoted already. Take it back to draft before you change it.",
      );
    const current = await orderInterpretation(tx, order);
    const known = new Set(current.content.files.map(({ sha256 }) => sha256));
    if (content.files.length !== known.size || content.files.some(({ sha256 }) => !known.has(sha256)))
      return refuse(
        "changed",
        "The drawings of this order changed meanwhile. Look at it again, then choose.",
      );

    const materialIds = content.files.flatMap(({ materialId }) => materialId ?? []);
    const materials = await findMaterials(tx, materialIds);
    if (materialIds.some((id) => !materials.some((material) => material.id === id && material.active)))
      return refuse("invalid", "A material that was chosen is no longer offered. Choose another.");
    for (const { lotId, materialId } of content.files) {
      if (!lotId) continue;
      const lot = await findLot(tx, lotId);
      if (!lot?.active || lot.materialId !== materialId)
        return refuse("invalid", "A lot that was chosen is not of the chosen material. Choose again.");
    }

    const added = await addInterpretation(tx, { orderId, after, content, createdBy: actor.id });
    if (!added)
      return refuse(
        "changed",
        "Somebody changed these choices while you did. Look at them again, then choose.",
      );
    if (actor.id === order.builderId) await remember(tx, actor.id, current, content);
    return { ok: true, number: added.number };
  });
}

/** Keeps choices that differ from what the layer's name suggests, and later ones that take such a choice back. */
async function remember(
  tx: Parameters<typeof rememberLayers>[0],
  userId: string,
  current: OrderInterpretation,
  content: Interpretation,
): Promise<void> {
  const guesses = current.drawings.flatMap(({ reading }) => guessedLayers(reading?.summary ?? null));
  const chosen = content.files.flatMap(({ layers }) => layers);
  const recalled = await recallLayers(
    tx,
    userId,
    chosen.map(({ layer }) => layer),
  );
  const settled = chosen.filter(
    (choice) =>
      !guesses.some((guess) => sameChoice(guess, choice)) ||
      recalled.some(({ layer }) => layer === choice.layer),
  );
  await rememberLayers(tx, userId, settled, new Date());
}

const sameChoice = (a: LayerChoice, b: LayerChoice) =>
  a.layer === b.layer && a.kind === b.kind && JSON.stringify(a.depth) === JSON.stringify(b.depth);
