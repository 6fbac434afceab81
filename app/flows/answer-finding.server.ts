import { transact } from "~/db/client.server";
import { checkMove, mayDo } from "~/domain/orders";
import { recordEvent } from "~/models/events.server";
import {
  type AnsweredFinding,
  type FindingAnswer,
  insertFindingAnswer,
  listFindings,
} from "~/models/findings.server";
import { newMessageId } from "~/models/messages.server";
import { findOrder } from "~/models/orders.server";
import { listParts } from "~/models/parts.server";
import { type Actor, scopeOfActor } from "./actor";
import { changeStage } from "./change-stage.server";
import { answerMove, type Moved } from "./move.server";
import { factsOfOrder } from "./order-facts.server";
import { answering, NO_ORDER, orRollBack, Refused, refuse, type Verdict } from "./verdict";
import { writeMessage } from "./write-message.server";

export interface AnswerFindingOptions {
  readonly actor: Actor;
  readonly orderId: string;
  readonly findingId: string;
  /** `message` puts the question to the shop, in the order's thread: it stays open until the builder accepts. */
  readonly answer: Extract<FindingAnswer["answer"], "accept" | "message">;
  readonly note?: string | null | undefined;
}

/**
 * The builder answers a question about the drawing; the answer is kept beside it. With the last one answered, an
 * order that waited for nothing else can be paid.
 */
export async function answerFinding(options: AnswerFindingOptions): Promise<Verdict<Moved>> {
  const { actor, orderId, findingId, answer, note } = options;
  if (!mayDo(actor.roles, "order.edit")) return refuse("not-allowed", "The builder answers.");
  if (answer === "message" && !note?.trim()) return refuse("incomplete", "Write your question to the shop.");
  return answering(() =>
    transact(async (tx) => {
      const order = await findOrder(tx, orderId, scopeOfActor(actor));
      if (!order) throw new Refused(NO_ORDER);
      if (order.builderId !== actor.id) throw new Refused(refuse("not-allowed", "The builder answers."));
      if (order.revisionId === null || (order.stage !== "quoted" && order.stage !== "needs-review"))
        throw new Refused(refuse("wrong-stage", `The order is ${order.stage}: there is nothing to answer.`));
      const finding = (await listFindings(tx, order.revisionId)).find(({ id }) => id === findingId);
      if (finding?.severity !== "ask") throw new Refused(refuse("not-found", "There is no such question."));
      await insertFindingAnswer(tx, { findingId, answer, note: note?.trim() || null, answeredBy: actor.id });
      await recordEvent(tx, { orderId: order.id, kind: "quote", data: { answered: finding.code } });
      if (answer === "message")
        await writeMessage(tx, {
          order,
          id: newMessageId(),
          authorId: actor.id,
          audience: "both",
          body: note?.trim() ?? "",
          partLabel: labelOf(finding, await listParts(tx, order.revisionId)),
          spot: finding.content.at,
          files: [],
          now: new Date(),
        });
      const facts = await factsOfOrder(tx, order, new Date());
      if (order.stage !== "needs-review" || facts.unansweredAsks > 0 || facts.reviewOpen)
        return answerMove(order);
      const verdict = checkMove("accept-review", facts, "system");
      if (!verdict.ok) return answerMove(order);
      const { order: after } = orRollBack(
        await changeStage(tx, {
          order,
          to: verdict.to,
          act: "accept-review",
          by: { id: null, role: "system" },
          reason: "Every question about the drawing is answered.",
        }),
      );
      return answerMove(after);
    }),
  );
}

/** The label in the part list of the part a finding is about. */
function labelOf({ content }: AnsweredFinding, parts: Awaited<ReturnType<typeof listParts>>): string | null {
  const { part, fileSha } = content;
  const found = parts.find((one) => one.letter === part && (!fileSha || one.fileSha === fileSha));
  return found?.label ?? null;
}
