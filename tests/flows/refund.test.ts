import { beforeEach, describe, expect, test } from "vitest";
import { db } from "~/db/client.server";
import { auditEntries, newId, outbox } from "~/db/schema";
import { cancelOrder } from "~/flows/cancel-order.server";
import { reconcilePayments } from "~/flows/reconcile-payments.server";
import { type RefundOptions, refundOrder } from "~/flows/refund-order.server";
import { listPaidCheckouts } from "~/models/checkouts.server";
import { listLedger, owedOnQuote } from "~/models/ledger.server";
import { listRefunds } from "~/models/refunds.server";
import { asked, done, makePaid, refused } from "../support/chain";
import { resetDatabase } from "../support/database";
import { freshScene, makePerson, makeShop, orderAsIs, type TestPerson } from "../support/scene";
import { receiveWebhooks } from "../support/webhook-receiver";

const running = freshScene();
const receiver = receiveWebhooks();
const fake = () => running.fakes.payments;
let builder: TestPerson;
let owner: TestPerson;
/** A paid order: its id, what was paid, and the form of a refund on it. */
let paid: { orderId: string; quoteId: string; total: number };
let form: (change: Partial<RefundOptions>) => RefundOptions;

beforeEach(async () => {
  await fake().webhooksSettled();
  fake().pointWebhooksAt(receiver.url);
  await resetDatabase();
  builder = await makePerson();
  owner = await makePerson({ roles: ["owner"] });
  const order = await makePaid(builder, await makeShop(), fake());
  const [checkout] = await listPaidCheckouts(db, order.id);
  if (!checkout || !order.quoteId) throw new Error("The order is not paid.");
  paid = { orderId: order.id, quoteId: order.quoteId, total: checkout.amount };
  form = (change) => ({
    actor: owner,
    orderId: order.id,
    checkoutId: checkout.id,
    refundId: newId(),
    amount: 1_000,
    reason: "A scratched face.",
    ...change,
  });
});

const amounts = async (kind: string) =>
  (await listLedger(db, paid.orderId)).filter((entry) => entry.kind === kind).map((entry) => entry.amount);
const refundMails = async () =>
  (await db.select().from(outbox))
    .filter(({ template }) => template === "refund")
    .map(({ payload }) => payload);

describe("a refund", () => {
  test("of a part, then of the rest, is entered once each, by answer or by webhook", async () => {
    expect(await done(refundOrder(form({ amount: 1_800 })))).toMatchObject({ status: "done" });
    await fake().webhooksSettled();
    expect(await amounts("refund")).toEqual([1_800]);
    expect(await owedOnQuote(db, paid.orderId, paid.quoteId)).toBe(0);
    await done(refundOrder(form({ amount: paid.total - 1_800, reason: "All of it, after all." })));
    await fake().webhooksSettled();
    expect(await amounts("refund")).toEqual([1_800, paid.total - 1_800]);
    expect(await amounts("debt-released")).toEqual([-1_800, 1_800 - paid.total]);
    expect((await listRefunds(db, paid.orderId)).map(({ status, askedBy }) => [status, askedBy])).toEqual([
      ["done", owner.id],
      ["done", owner.id],
    ]);
    const mails = await refundMails();
    expect(mails.map(({ subject }) => subject)).toEqual([
      expect.stringContaining("$18.00"),
      expect.stringContaining(`$${((paid.total - 1_800) / 100).toFixed(2)}`),
    ]);
    expect(mails[0]?.text).toContain("A scratched face.");
    expect(await refused(refundOrder(form({ amount: 1 })))).toMatchObject({ reason: "too-much" });
  });

  test("is never more than is left of the payment, however many ask at once", async () => {
    expect(await refused(refundOrder(form({ amount: paid.total + 1 })))).toMatchObject({
      reason: "too-much",
      words: expect.stringContaining(`$${(paid.total / 100).toFixed(2)}`),
    });
    const most = paid.total - 500;
    const answers = await Promise.all([
      refundOrder(form({ amount: most })),
      refundOrder(form({ amount: most })),
    ]);
    expect(answers.filter(({ ok }) => ok)).toHaveLength(1);
    expect(await amounts("refund")).toEqual([most]);
    for (const amount of [0, -5, 1.5, Number.NaN])
      expect(await refused(refundOrder(form({ amount })))).toMatchObject({ reason: "invalid" });
    expect(await refused(refundOrder(form({ reason: " " })))).toMatchObject({ reason: "incomplete" });
    await fake().webhooksSettled();
  });

  test("sent twice by the same form gives back once", async () => {
    const once = form({ amount: 700 });
    const answers = await Promise.all([refundOrder(once), refundOrder(once)]);
    expect(answers).toEqual([
      { ok: true, status: "done" },
      { ok: true, status: "done" },
    ]);
    expect(await refused(refundOrder({ ...once, amount: 900 }))).toMatchObject({ reason: "changed" });
    await fake().webhooksSettled();
    expect(await amounts("refund")).toEqual([700]);
    expect(await refundMails()).toHaveLength(1);
  });

  test("is the owner's alone", async () => {
    for (const roles of [["operator"], ["clerk"], ["builder"]] as const)
      expect(await refused(refundOrder(form({ actor: await makePerson({ roles }) })))).toMatchObject({
        reason: "not-allowed",
      });
    expect(await amounts("refund")).toEqual([]);
  });

  test("that got no answer is sent again under the same key, and given back once", async () => {
    fake().failNext({ when: "after" }, { when: "before", status: 503 }, { when: "before", status: 503 });
    fake().pauseWebhooks();
    expect(await done(refundOrder(form({ amount: 900 })))).toEqual({ ok: true, status: "asked" });
    expect(await amounts("refund")).toEqual([]);
    expect(await refused(refundOrder(form({ amount: paid.total })))).toMatchObject({ reason: "too-much" });
    expect(await reconcilePayments()).toMatchObject({ refunds: 1 });
    await fake().resumeWebhooks();
    await fake().webhooksSettled();
    expect(await amounts("refund")).toEqual([900]);
    expect(await refundMails()).toHaveLength(1);
  });

  test("that the bank sends back is due again, and the owner is told", async () => {
    await done(refundOrder(form({ amount: 900 })));
    await fake().webhooksSettled();
    const [refund] = await listRefunds(db, paid.orderId);
    fake().failRefund(refund?.externalId ?? "");
    await fake().webhooksSettled();
    expect(await amounts("refund")).toEqual([900, -900]);
    expect(await owedOnQuote(db, paid.orderId, paid.quoteId)).toBe(-900);
    expect(await listRefunds(db, paid.orderId)).toMatchObject([{ status: "failed" }]);
    expect((await db.select().from(auditEntries)).map(({ act }) => act)).toEqual([
      "refund.make",
      "refund.returned",
    ]);
    await done(refundOrder(form({ amount: paid.total })));
    await fake().webhooksSettled();
    expect(await owedOnQuote(db, paid.orderId, paid.quoteId)).toBe(0);
  });

  test("made in the payment service's own pages is entered as well", async () => {
    const [checkout] = await listPaidCheckouts(db, paid.orderId);
    const made = await running.services.payments.refund({
      idempotencyKey: newId(),
      paymentId: checkout?.paymentIntent ?? "",
      amount: 2_500,
      reason: "requested_by_customer",
      metadata: {},
    });
    expect(made).toMatchObject({ ok: true });
    await fake().webhooksSettled();
    expect(await amounts("refund")).toEqual([2_500]);
    expect(await listRefunds(db, paid.orderId)).toMatchObject([
      { status: "done", askedBy: "payment-service", amount: 2_500 },
    ]);
    expect(await refused(refundOrder(form({ amount: paid.total })))).toMatchObject({ reason: "too-much" });
  });

  test("on a cancelled order settles what the shop owes", async () => {
    await done(cancelOrder({ ...(await asked(owner, paid.orderId)), reason: "The builder moved away." }));
    expect((await orderAsIs(paid.orderId)).stage).toBe("cancelled");
    expect(await owedOnQuote(db, paid.orderId, paid.quoteId)).toBe(-paid.total);
    await done(refundOrder(form({ amount: paid.total })));
    await fake().webhooksSettled();
    expect(await owedOnQuote(db, paid.orderId, paid.quoteId)).toBe(0);
    expect(await amounts("debt-released")).toEqual([-paid.total]);
  });
});
