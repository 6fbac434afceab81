import type { Person } from "~/auth/guards.server";
import {
  finishRunSchema,
  moveSchema,
  reasonedSchema,
  refundSchema,
  remakeSchema,
  somePiecesSchema,
  startRunSchema,
} from "~/components/shop/order-acts";
import { formatMoney } from "~/domain/units";
import { cancelOrder } from "~/flows/cancel-order.server";
import { finishRun } from "~/flows/finish-run.server";
import { holdOrder } from "~/flows/hold-order.server";
import { movePieces } from "~/flows/move-pieces.server";
import { receiveOrder } from "~/flows/receive-order.server";
import { refundOrder } from "~/flows/refund-order.server";
import { releaseOrder } from "~/flows/release-order.server";
import { remakePiece } from "~/flows/remake-piece.server";
import { acceptReview, sendBack } from "~/flows/review-order.server";
import { startRun } from "~/flows/start-run.server";
import { undoMove } from "~/flows/undo-move.server";
import type { Verdict } from "~/flows/verdict";
import { type Done, dispatchAct, formAct } from "../dispatch-act.server";

interface On {
  readonly person: Person;
  readonly orderId: string;
}

/** What a form of the staff's order page asks for, done by the flow that serves it. */
export function actOnStaffOrder(formData: FormData, { person, orderId }: On) {
  const who = { actor: person, orderId };
  const say = (verdict: Verdict, words: string): Done => (verdict.ok ? { ok: true, words } : verdict);
  return dispatchAct(formData, {
    "accept-review": formAct(moveSchema, async (move) =>
      say(await acceptReview({ ...who, ...move }), "Accepted: the builder can pay it as quoted."),
    ),
    "send-back": formAct(reasonedSchema, async (move) =>
      say(await sendBack({ ...who, ...move }), "Sent back to the builder."),
    ),
    receive: formAct(moveSchema, async (move) =>
      say(await receiveOrder({ ...who, ...move }), "Received: its pieces wait for a nest."),
    ),
    "cut-all": formAct(moveSchema, async (move) =>
      say(await movePieces({ ...who, ...move, act: "cut", pieceIds: "all" }), "Marked cut."),
    ),
    "tabs-all": formAct(moveSchema, async (move) =>
      say(await movePieces({ ...who, ...move, act: "remove-tabs", pieceIds: "all" }), "Tabs are off."),
    ),
    "tabs-some": formAct(somePiecesSchema, async ({ piece, ...move }) =>
      say(
        await movePieces({ ...who, ...move, act: "remove-tabs", pieceIds: piece }),
        `Tabs are off ${piece.length === 1 ? "one piece" : `${piece.length} pieces`}.`,
      ),
    ),
    remake: formAct(remakeSchema, async (move) =>
      say(await remakePiece({ ...who, ...move }), "Marked; another one waits for the next nest."),
    ),
    hold: formAct(reasonedSchema, async (move) => say(await holdOrder({ ...who, ...move }), "Held.")),
    release: formAct(moveSchema, async (move) =>
      say(await releaseOrder({ ...who, ...move }), "Released: it goes on from where it stood."),
    ),
    undo: formAct(reasonedSchema, async (move) =>
      say(await undoMove({ ...who, ...move }), "The last step is taken back."),
    ),
    cancel: formAct(reasonedSchema, async (move) =>
      say(await cancelOrder({ ...who, ...move }), "Cancelled."),
    ),
    "start-run": formAct(startRunSchema, async ({ runId, runVersion }) =>
      say(await startRun({ actor: person, runId, version: runVersion }), "On the router."),
    ),
    "finish-run": formAct(finishRunSchema, async ({ runId, runVersion, minutes }) =>
      say(
        await finishRun({ actor: person, runId, version: runVersion, actualMinutes: minutes }),
        "The sheet is cut.",
      ),
    ),
    refund: formAct(refundSchema, async (refund) =>
      say(
        await refundOrder({ ...who, ...refund }),
        `${formatMoney(refund.amount)} goes back to the builder.`,
      ),
    ),
  });
}
