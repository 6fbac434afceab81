import type { SubmissionResult } from "@conform-to/react";
import { parseWithZod } from "@conform-to/zod/v4";
import { data, redirect } from "react-router";
import type { z } from "zod";
import type { Person } from "~/auth/guards.server";
import { ORDER_ACTS, type OrderAct, PICK_UP, rulesOfLines } from "~/components/order/order-acts";
import { db } from "~/db/client.server";
import { answerFinding } from "~/flows/answer-finding.server";
import { approveQuote } from "~/flows/approve-quote.server";
import { cancelOrder } from "~/flows/cancel-order.server";
import { quoteOrder } from "~/flows/quote-order.server";
import { renameOrder } from "~/flows/rename-order.server";
import { requoteOrder } from "~/flows/requote-order.server";
import { askReview } from "~/flows/review-order.server";
import { reviseOrder } from "~/flows/revise-order.server";
import { setChoices } from "~/flows/set-choices.server";
import { setDelivery } from "~/flows/set-delivery.server";
import { startCheckout } from "~/flows/start-checkout.server";
import { takeOutDrawing } from "~/flows/take-out-drawing.server";
import { undoChoices } from "~/flows/undo-choices.server";
import { REFUSAL_STATUS, type Refusal, refuse, type Verdict } from "~/flows/verdict";
import { addAddress, findAddress } from "~/models/addresses.server";
import type { Order } from "~/models/orders.server";

interface ActOptions {
  readonly person: Person;
  readonly order: Order;
}
type Value<Act extends OrderAct> = z.infer<(typeof ORDER_ACTS)[Act]>;
/** Where a done act leads; it stays on the page when left out. */
type Done = Verdict<{ readonly leadsTo?: string }>;
type Acts = { readonly [Act in OrderAct]: (options: ActOptions, value: Value<Act>) => Promise<Done> };

/** One small function an intent: from what the form sent to the flow that does it. */
const ACTS: Acts = {
  rename: (on, { name, trial, version }) => renameOrder({ ...who(on), version, name, trial }),
  start: (on, { after, unitFor, unit, stockFor, materialId }) =>
    setChoices({
      ...who(on),
      after,
      files: [...new Set([...unitFor, ...stockFor])].map((sha256) => ({
        sha256,
        ...(unit !== undefined && unitFor.includes(sha256) ? { unit } : {}),
        ...(materialId !== undefined && stockFor.includes(sha256) ? { materialId } : {}),
      })),
    }),
  file: (on, { after, sha256, unit, materialId }) =>
    setChoices({ ...who(on), after, files: [{ sha256, unit, materialId }] }),
  layers: (on, { after, sha256, layers, shown }) =>
    setChoices({ ...who(on), after, files: [{ sha256, layers: rulesOfLines({ layers, shown }) }] }),
  part: (on, { after, sha256, letter, name, grain }) =>
    setChoices({ ...who(on), after, parts: [{ sha256, letter, name: name || null, grain }] }),
  choices: (on, { after, sanding, leaveTabs, sets }) =>
    setChoices({ ...who(on), after, sanding, leaveTabs, files: sets }),
  undo: (on, { after }) => undoChoices({ ...who(on), after }),
  delivery: deliver,
  "new-address": deliverToNew,
  "take-out": (on, { version, drawingId }) => takeOutDrawing({ ...who(on), version, drawingId }),
  quote: async (on, move) => leadBack(on, await quoteOrder({ ...who(on), ...move })),
  pay,
  requote: async (on, move) => leadBack(on, await requoteOrder({ ...who(on), ...move })),
  revise: async (on, move) => leadBack(on, await reviseOrder({ ...who(on), ...move })),
  "ask-review": async (on, move) => leadBack(on, await askReview({ ...who(on), ...move })),
  answer: (on, { findingId, answer, note }) => answerFinding({ ...who(on), findingId, answer, note }),
  cancel: async (on, move) => leadBack(on, await cancelOrder({ ...who(on), ...move })),
};

const who = ({ person, order }: ActOptions) => ({ actor: person, orderId: order.id });

const leadBack = ({ order }: ActOptions, verdict: Verdict): Done =>
  verdict.ok ? { ok: true, leadsTo: `/orders/${order.id}` } : verdict;

async function deliver(on: ActOptions, { version, to }: Value<"delivery">): Promise<Done> {
  if (to === PICK_UP) return setDelivery({ ...who(on), version, delivery: { kind: "pick-up" } });
  const address = await findAddress(db, on.person.id, to);
  if (!address) return refuse("invalid", "That address is no longer in your address book. Choose another.");
  return setDelivery({ ...who(on), version, delivery: { kind: "ship", shipTo: address.shipTo } });
}

async function deliverToNew(on: ActOptions, value: Value<"new-address">): Promise<Done> {
  const { version, shipTo, keep } = value;
  const delivered = await setDelivery({ ...who(on), version, delivery: { kind: "ship", shipTo } });
  if (delivered.ok && keep) await addAddress(db, on.person.id, shipTo);
  return delivered;
}

/** The release and the pay page in one press; a release given before stands. */
async function pay(on: ActOptions, { version, quoteId, listHash }: Value<"pay">): Promise<Done> {
  const approved = await approveQuote({ ...who(on), version, quoteId, listHash });
  if (!approved.ok) return approved;
  const opened = await startCheckout({ actor: on.person, orderId: on.order.id });
  return opened.ok ? { ok: true, leadsTo: opened.url } : opened;
}

export type ActReply =
  | { readonly ok: true; readonly intent: OrderAct }
  | {
      readonly ok: false;
      readonly intent: OrderAct | null;
      /** Why it was not done, for the person. */
      readonly refusal: Pick<Refusal, "reason" | "words"> | null;
      /** The form as it came, with what is wrong with its fields. */
      readonly result: SubmissionResult | null;
    };

/** Does what a form of the order's page asks: 400 for a form that is not right, the refusal's status, or done. */
export async function actOnOrder(formData: FormData, on: ActOptions) {
  const intent = formData.get("intent");
  if (!isAct(intent))
    return answer(
      { ok: false, intent: null, refusal: refuse("invalid", "There is no such act."), result: null },
      400,
    );
  return act(intent, formData, on);
}

async function act<Act extends OrderAct>(intent: Act, formData: FormData, on: ActOptions) {
  const submission = parseWithZod(formData, { schema: ORDER_ACTS[intent] });
  if (submission.status !== "success")
    return answer({ ok: false, intent, refusal: null, result: submission.reply() }, 400);
  const run: (options: ActOptions, value: Value<Act>) => Promise<Done> = ACTS[intent];
  const done = await run(on, submission.value as Value<Act>);
  if (!done.ok) {
    const { reason, words } = done;
    return answer(
      { ok: false, intent, refusal: { reason, words }, result: submission.reply() },
      REFUSAL_STATUS[reason],
    );
  }
  if (done.leadsTo !== undefined) throw redirect(done.leadsTo);
  return answer({ ok: true, intent }, 200);
}

const isAct = (value: unknown): value is OrderAct =>
  typeof value === "string" && Object.hasOwn(ORDER_ACTS, value);

const answer = (reply: ActReply, status: number) => data<ActReply>(reply, { status });
