import { transact } from "~/db/client.server";
import { changeStage } from "./change-stage.server";
import { answerMove, type Moved, type MoveOptions, takeMove } from "./move.server";
import { mailSentBack, mailStage } from "./order-mails.server";
import { answering, orRollBack, type Verdict } from "./verdict";
import { dropQuotes } from "./write-quote.server";

/** The builder wants a person to look before paying. */
export const askReview = (options: MoveOptions): Promise<Verdict<Moved>> =>
  answering(() =>
    transact(async (tx) => {
      const taken = orRollBack(await takeMove(tx, "ask-review", options));
      if (taken.repeated) return answerMove(taken.order);
      const { order } = orRollBack(
        await changeStage(tx, {
          order: taken.order,
          to: taken.to,
          act: "ask-review",
          by: { id: options.actor.id, role: taken.role },
          reason: options.reason,
          requestId: options.requestId,
          change: { reviewAsked: true, reviewedAt: null, reviewedBy: null },
        }),
      );
      return answerMove(order);
    }),
  );

/** A person in the shop has looked: the order can be paid as quoted. */
export const acceptReview = (options: MoveOptions): Promise<Verdict<Moved>> =>
  answering(() =>
    transact(async (tx) => {
      const taken = orRollBack(await takeMove(tx, "accept-review", options));
      if (taken.repeated) return answerMove(taken.order);
      const { order } = orRollBack(
        await changeStage(tx, {
          order: taken.order,
          to: taken.to,
          act: "accept-review",
          by: { id: options.actor.id, role: taken.role },
          reason: options.reason,
          requestId: options.requestId,
          change: { reviewedAt: options.now ?? new Date(), reviewedBy: options.actor.id },
        }),
      );
      await mailStage(tx, { order, from: taken.order.stage });
      return answerMove(order);
    }),
  );

/** A person in the shop has looked, and the builder has to change something: back to draft, with the reason. */
export const sendBack = (options: MoveOptions): Promise<Verdict<Moved>> =>
  answering(() =>
    transact(async (tx) => {
      const taken = orRollBack(await takeMove(tx, "send-back", options));
      if (taken.repeated) return answerMove(taken.order);
      await dropQuotes(tx, taken.order.id);
      const { order } = orRollBack(
        await changeStage(tx, {
          order: taken.order,
          to: taken.to,
          act: "send-back",
          by: { id: options.actor.id, role: taken.role },
          reason: options.reason,
          requestId: options.requestId,
          change: { quoteId: null, revisionId: null, promisedFor: null },
        }),
      );
      await mailSentBack(tx, { order, reason: options.reason ?? "" });
      return answerMove(order);
    }),
  );
