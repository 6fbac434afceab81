import { db } from "~/db/client.server";
import type { FileInterpretation, Interpretation } from "~/domain/orders";
import { findOrder } from "~/models/orders.server";
import { type Actor, scopeOfActor } from "./actor";
import { orderInterpretation } from "./order-interpretation.server";
import { saveInterpretation } from "./save-interpretation.server";
import { NO_ORDER, refuse, type Verdict } from "./verdict";

export interface SetChoicesOptions {
  readonly actor: Actor;
  readonly orderId: string;
  /** The number of the interpretation that the change was made from. */
  readonly after: number;
  readonly files?: readonly (Pick<FileInterpretation, "sha256"> &
    Partial<Pick<FileInterpretation, "unit" | "layers" | "materialId" | "lotId" | "sets">>)[];
  /** Parts that get a name or a grain direction of their own. */
  readonly parts?: Interpretation["parts"];
  readonly sanding?: Interpretation["sanding"];
  readonly leaveTabs?: boolean;
}

/** Changes some of the builder's choices and leaves the others as they are. */
export async function setChoices(options: SetChoicesOptions): Promise<Verdict<{ number: number }>> {
  const { actor, orderId, after } = options;
  const order = await findOrder(db, orderId, scopeOfActor(actor));
  if (!order) return NO_ORDER;
  const { content } = await orderInterpretation(db, order);
  const unknown = options.files?.some(({ sha256 }) => !content.files.some((file) => file.sha256 === sha256));
  if (unknown) return refuse("changed", "The drawings of this order changed meanwhile. Look at it again.");
  return saveInterpretation({
    actor,
    orderId,
    after,
    content: {
      ...content,
      sanding: options.sanding ?? content.sanding,
      leaveTabs: options.leaveTabs ?? content.leaveTabs,
      parts: withParts(content.parts, options.parts ?? []),
      files: content.files.map((file) => {
        const chosen = options.files?.find(({ sha256 }) => sha256 === file.sha256);
        const changed = { ...file, ...chosen };
        /* A lot belongs to its material. */
        return changed.materialId === file.materialId
          ? changed
          : { ...changed, lotId: chosen?.lotId ?? null };
      }),
    },
  });
}

/** The later choice for a part stands in place of the earlier one. */
function withParts(
  earlier: Interpretation["parts"],
  later: Interpretation["parts"],
): Interpretation["parts"] {
  const kept = earlier.filter(
    (part) => !later.some(({ sha256, letter }) => sha256 === part.sha256 && letter === part.letter),
  );
  return [...kept, ...later];
}
