import { type Executor, transact } from "~/db/client.server";
import type { OrderChange } from "~/models/order-writes.server";
import type { Order } from "~/models/orders.server";
import { changeStage } from "./change-stage.server";
import { answerMove, type Moved, type MoveOptions, takeMove } from "./move.server";
import { mailSentBack, mailStage } from "./order-mails.server";
import { answering, orRollBack, type Verdict } from "./verdict";
import { dropQuotes } from "./write-quote.server";

interface ReviewMove {
  readonly act: "ask-review" | "accept-review" | "send-back";
  readonly change: OrderChange;
  /** In the same transaction, with the order as it was before the move. */
  readonly before?: (tx: Executor, order: Order) => Promise<void>;
  readonly after?: (tx: Executor, order: Order, before: Order) => Promise<void>;
}

/** One move of the order as a whole; asked for a second time it changes nothing. */
const review = (options: MoveOptions, { act, change, before, after }: ReviewMove): Promise<Verdict<Moved>> =>
  answering(() =>
    transact(async (tx) => {
      const taken = orRollBack(await takeMove(tx, act, options));
      if (taken.repeated) return answerMove(taken.order);
      await before?.(tx, taken.order);
      const { order } = orRollBack(
        await changeStage(tx, {
          order: taken.order,
          to: taken.to,
          act,
          by: { id: options.actor.id, role: taken.role },
          reason: options.reason,
          requestId: options.requestId,
          change,
        }),
      );
      await after?.(tx, order, taken.order);
      return answerMove(order);
    }),
  );

/** The builder wants a person to look before paying. */
export const askReview = (options: MoveOptions): Promise<Verdict<Moved>> =>
  review(options, {
    act: "ask-review",
    change: { reviewAsked: true, reviewedAt: null, reviewedBy: null },
  });

/** A person in the shop has looked: the order can be paid as quoted. */
export const acceptReview = (options: MoveOptions): Promise<Verdict<Moved>> =>
  review(options, {
    act: "accept-review",
    change: { reviewedAt: options.now ?? new Date(), reviewedBy: options.actor.id },
    after: (tx, order, { stage }) => mailStage(tx, { order, from: stage }),
  });

/** A person in the shop has looked, and the builder has to change something: back to draft, with the reason. */
export const sendBack = (options: MoveOptions): Promise<Verdict<Moved>> =>
  review(options, {
    act: "send-back",
    change: { quoteId: null, revisionId: null, promisedFor: null },
    before: async (tx, { id }) => {
      await dropQuotes(tx, id);
    },
    after: (tx, order) => mailSentBack(tx, { order, reason: options.reason ?? "" }),
  });
