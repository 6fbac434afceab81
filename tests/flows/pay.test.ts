import { beforeEach, describe, expect, test } from "vitest";
import { db, transact } from "~/db/client.server";
import {
  auditEntries,
  checkouts,
  ledgerEntries,
  lots,
  newId,
  outbox,
  paymentEvents,
  quotes,
} from "~/db/schema";
import { cancelCheckout } from "~/flows/cancel-checkout.server";
import { cancelOrder } from "~/flows/cancel-order.server";
import { holdOrder } from "~/flows/hold-order.server";
import { reconcilePayments } from "~/flows/reconcile-payments.server";
import { releaseOrder } from "~/flows/release-order.server";
import { reviseOrder } from "~/flows/revise-order.server";
import { startCheckout } from "~/flows/start-checkout.server";
import { findOpenCheckout, listCheckouts } from "~/models/checkouts.server";
import { eventsAfter } from "~/models/events.server";
import { listLedger, owedOnQuote } from "~/models/ledger.server";
import { listStageMoves } from "~/models/stage-moves.server";
import { listStockGroups } from "~/models/stock-groups.server";
import { signatureHeader } from "~fakes/payments";
import { approve, asked, done, makeApproved, makeQuoted, openPayPage, refused } from "../support/chain";
import { resetDatabase } from "../support/database";
import { takeConsoleErrors } from "../support/loud-console";
import {
  freshScene,
  makePerson,
  makeShop,
  orderAsIs,
  type TestPerson,
  type TestShop,
} from "../support/scene";
import { postToRoute, receiveWebhooks } from "../support/webhook-receiver";

const running = freshScene();
const receiver = receiveWebhooks();
const HOUR = 3_600_000;
let builder: TestPerson;
let owner: TestPerson;
let shop: TestShop;
const fake = () => running.fakes.payments;

beforeEach(async () => {
  await fake().webhooksSettled();
  fake().pointWebhooksAt(receiver.url);
  await resetDatabase();
  builder = await makePerson();
  owner = await makePerson({ roles: ["owner"] });
  shop = await makeShop();
});

/** The client tries three times. */
const outage = Array.from({ length: 3 }, () => ({ when: "before", status: 503 }) as const);
const amounts = async (orderId: string) =>
  (await listLedger(db, orderId)).map(({ kind, amount }) => [kind, amount]);
const mails = async () =>
  (await db.select().from(outbox).orderBy(outbox.createdAt)).map(({ template, recipient }) => [
    template,
    recipient,
  ]);
const eventsOf = (sessionId: string) =>
  fake()
    .events()
    .filter(({ event }) => JSON.stringify(event.data.object).includes(sessionId));

/** Paid once: one payment in the ledger, one move, one reservation, one receipt. */
async function expectPaidOnce(orderId: string) {
  const order = await orderAsIs(orderId);
  expect(order).toMatchObject({ stage: "paid", paidAt: expect.any(Date) });
  const { total } = (await db.select().from(quotes))[0] ?? { total: 0 };
  expect(await amounts(orderId)).toEqual([
    ["debt", total],
    ["payment", -total],
  ]);
  expect((await listStageMoves(db, orderId)).filter(({ act }) => act === "pay")).toMatchObject([
    { from: "quoted", to: "paid", actorId: null, actorRole: "system" },
  ]);
  expect(await db.select().from(lots)).toMatchObject([{ sheetsReserved: 1 }]);
  expect(await listStockGroups(db, orderId, order.revisionId ?? "")).toMatchObject([
    { reservedAt: expect.any(Date) },
  ]);
  expect((await mails()).filter(([template]) => template === "receipt")).toEqual([
    ["receipt", builder.email],
  ]);
  expect(await db.$count(auditEntries)).toBe(0);
}

describe("the pay page", () => {
  test("is one for an order: asked for again, it is the same", async () => {
    const order = await makeApproved(builder, shop);
    const both = await Promise.all([
      done(startCheckout({ actor: builder, orderId: order.id })),
      done(startCheckout({ actor: builder, orderId: order.id })),
    ]);
    const again = await done(startCheckout({ actor: builder, orderId: order.id }));
    expect(new Set([...both, again].map(({ url }) => url)).size).toBe(1);
    expect(await listCheckouts(db, order.id)).toMatchObject([{ status: "open", purpose: "full" }]);
  });

  test("asks for what the approved quote comes to, and leads back to the order", async () => {
    const order = await makeApproved(builder, shop);
    const { checkoutId, sessionId } = await openPayPage(builder, order.id);
    const [quote] = await db.select().from(quotes);
    const session = await done(running.services.payments.getCheckout(sessionId).then(asVerdict));
    expect(session.value).toMatchObject({
      amount: quote?.total,
      currency: "usd",
      metadata: { checkoutId, orderId: order.id, quoteId: quote?.id },
    });
    const paid = await fake().pay(sessionId);
    expect(JSON.stringify(paid)).toContain(`/orders/${order.id}/checkout?checkout=${checkoutId}`);
    await fake().webhooksSettled();
  });

  test("opens only for the builder, on an approved quote, with a confirmed address", async () => {
    const order = await makeQuoted(builder, shop);
    const start = (actor: TestPerson) => refused(startCheckout({ actor, orderId: order.id }));
    expect(await start(builder)).toMatchObject({ reason: "incomplete" });
    await done(approve(builder, order.id));
    expect(await start({ ...builder, emailVerified: false })).toMatchObject({ reason: "unverified" });
    expect(await start(owner)).toMatchObject({ reason: "not-allowed" });
    expect(await start(await makePerson())).toMatchObject({ reason: "not-found" });
    expect(
      await refused(
        startCheckout({ actor: builder, orderId: order.id, now: new Date(Date.now() + 15 * 24 * HOUR) }),
      ),
    ).toMatchObject({ reason: "expired" });
    expect(await db.$count(checkouts)).toBe(0);
  });

  test("that the payment service does not open leaves the order payable", async () => {
    const order = await makeApproved(builder, shop);
    fake().failNext(...outage);
    expect(await refused(startCheckout({ actor: builder, orderId: order.id }))).toMatchObject({
      reason: "unavailable",
    });
    expect(await listCheckouts(db, order.id)).toMatchObject([{ status: "open", url: null }]);
    const { sessionId } = await openPayPage(builder, order.id);
    await fake().pay(sessionId);
    await fake().webhooksSettled();
    await expectPaidOnce(order.id);
  });
});

const asVerdict = <Value>(answer: { ok: true; value: Value } | { ok: false; message: string }) => {
  if (!answer.ok) throw new Error(answer.message);
  return { ok: true, value: answer.value } as const;
};

describe("a payment", () => {
  test("is entered by the verified webhook, with receipt, reservation and event", async () => {
    const order = await makeApproved(builder, shop);
    const { sessionId } = await openPayPage(builder, order.id);
    expect((await orderAsIs(order.id)).stage).toBe("quoted");
    await fake().pay(sessionId);
    await fake().webhooksSettled();
    await expectPaidOnce(order.id);
    const told = await eventsAfter(db, order.id, 0, "builder");
    expect(told.filter(({ kind }) => kind === "payment" || kind === "stage").map(({ data }) => data)).toEqual(
      [{ from: "draft", to: "quoted" }, { checkout: "paid" }, { from: "quoted", to: "paid" }],
    );
    expect(await refused(startCheckout({ actor: builder, orderId: order.id }))).toMatchObject({
      reason: "already-paid",
    });
  });

  test("counts once when its events come twice", async () => {
    const order = await makeApproved(builder, shop);
    const { sessionId } = await openPayPage(builder, order.id);
    await fake().pay(sessionId);
    await fake().webhooksSettled();
    for (const { event } of eventsOf(sessionId)) expect(await fake().deliverAgain(event.id)).toBe(200);
    await expectPaidOnce(order.id);
    const stored = await db.select().from(paymentEvents);
    expect(stored.map(({ outcome }) => outcome).sort()).toEqual(["paid", "paid-before"]);
    expect(stored.every(({ appliedAt }) => appliedAt !== null)).toBe(true);
  });

  test("counts once when its events come in reverse, and when they come at the same time", async () => {
    const reversed = await makeApproved(builder, shop);
    fake().pauseWebhooks();
    const first = await openPayPage(builder, reversed.id);
    await fake().pay(first.sessionId);
    await fake().deliverInReverse();
    await fake().webhooksSettled();
    await expectPaidOnce(reversed.id);

    await resetDatabase();
    builder = await makePerson();
    shop = await makeShop();
    const together = await makeApproved(builder, shop);
    fake().pauseWebhooks();
    const second = await openPayPage(builder, together.id);
    await fake().pay(second.sessionId);
    const ids = fake()
      .events()
      .slice(-2)
      .map(({ event }) => event.id);
    const answers = await Promise.all([...ids, ...ids].map((id) => fake().deliverAgain(id)));
    expect(answers).toEqual([200, 200, 200, 200]);
    await fake().resumeWebhooks();
    await fake().webhooksSettled();
    await expectPaidOnce(together.id);
  });

  test("is entered when the news of it was lost: the service is asked", async () => {
    const order = await makeApproved(builder, shop);
    fake().pauseWebhooks();
    const { sessionId } = await openPayPage(builder, order.id);
    await fake().pay(sessionId);
    expect(await reconcilePayments(new Date())).toEqual({ events: 0, checkouts: 0, refunds: 0 });
    expect(await reconcilePayments(new Date(Date.now() + HOUR / 4))).toMatchObject({ checkouts: 1 });
    await expectPaidOnce(order.id);
    await fake().resumeWebhooks();
    await fake().webhooksSettled();
    await expectPaidOnce(order.id);
  });

  test("whose webhook cannot be applied is answered 500, kept, and applied when it comes again", async () => {
    const order = await makeApproved(builder, shop);
    fake().pauseWebhooks();
    const { sessionId } = await openPayPage(builder, order.id);
    await fake().pay(sessionId);
    const completed = eventsOf(sessionId).find(({ event }) => event.type === "checkout.session.completed");
    if (!completed) throw new Error("There is no event.");
    fake().failNext(...outage);
    expect(await fake().deliverAgain(completed.event.id)).toBe(500);
    expect((await orderAsIs(order.id)).stage).toBe("quoted");
    expect(await db.select().from(paymentEvents)).toMatchObject([{ attempts: 1, appliedAt: null }]);
    expect(await reconcilePayments(new Date())).toMatchObject({ events: 1 });
    await expectPaidOnce(order.id);
    await fake().resumeWebhooks();
    await fake().webhooksSettled();
    await expectPaidOnce(order.id);
  });

  test("after a declined card is the same order's, with the failure told in between", async () => {
    const order = await makeApproved(builder, shop);
    const { sessionId } = await openPayPage(builder, order.id);
    // The number that the payment service documents as always declined.
    await fake().pay(sessionId, { number: "4000000000000002" });
    await fake().webhooksSettled();
    expect((await orderAsIs(order.id)).stage).toBe("quoted");
    expect(await findOpenCheckout(db, order.id)).toMatchObject({
      status: "open",
      lastFailure: expect.stringContaining("declined"),
    });
    await fake().pay(sessionId);
    await fake().webhooksSettled();
    await expectPaidOnce(order.id);
  });

  test("of a lot with too few sheets is kept, and the owner is told", async () => {
    const order = await makeApproved(builder, shop);
    await transact((tx) => tx.update(lots).set({ sheetsReserved: 20 }));
    const { sessionId } = await openPayPage(builder, order.id);
    await fake().pay(sessionId);
    await fake().webhooksSettled();
    expect((await orderAsIs(order.id)).stage).toBe("paid");
    expect(await db.select().from(lots)).toMatchObject([{ sheetsReserved: 21 }]);
    expect(await db.select().from(auditEntries)).toMatchObject([{ act: "stock.short", subjectId: order.id }]);
    expect(await mails()).toContainEqual(["owner-attention", owner.email]);
  });

  test("while the order was put on hold is entered; released, the order is paid", async () => {
    const order = await makeApproved(builder, shop);
    const { sessionId } = await openPayPage(builder, order.id);
    await done(holdOrder({ ...(await asked(owner, order.id)), reason: "The sheet is warped." }));
    await fake().pay(sessionId);
    await fake().webhooksSettled();
    expect(await orderAsIs(order.id)).toMatchObject({ stage: "on-hold", heldFrom: "paid" });
    await done(releaseOrder(await asked(owner, order.id)));
    await expectPaidOnce(order.id);
  });
});

describe("a pay page that closes", () => {
  test("by the builder's wish leaves a payable order, and a new page", async () => {
    const order = await makeApproved(builder, shop);
    const first = await openPayPage(builder, order.id);
    await done(cancelCheckout({ actor: builder, orderId: order.id }));
    expect(await fake().pay(first.sessionId)).toMatchObject({ kind: "closed" });
    await fake().webhooksSettled();
    expect(await listCheckouts(db, order.id)).toMatchObject([{ status: "cancelled" }]);
    const second = await openPayPage(builder, order.id);
    expect(second.sessionId).not.toBe(first.sessionId);
    await fake().pay(second.sessionId);
    await fake().webhooksSettled();
    await expectPaidOnce(order.id);
  });

  test("is settled as paid when it was paid at the last moment", async () => {
    const order = await makeApproved(builder, shop);
    fake().pauseWebhooks();
    const { sessionId } = await openPayPage(builder, order.id);
    await fake().pay(sessionId);
    expect(await refused(reviseOrder(await asked(builder, order.id)))).toMatchObject({
      reason: "already-paid",
    });
    await expectPaidOnce(order.id);
    await fake().resumeWebhooks();
    await fake().webhooksSettled();
    await expectPaidOnce(order.id);
  });
});

describe("a payment that no longer fits", () => {
  /** The page stays payable at the service although the order has left it: as when closing it went unheard. */
  const payBehindTheBack = async (orderId: string, leave: () => Promise<void>) => {
    const { sessionId, checkoutId } = await openPayPage(builder, orderId);
    fake().pauseWebhooks();
    await transact((tx) => tx.update(checkouts).set({ status: "cancelled" }));
    await leave();
    await fake().pay(sessionId);
    await fake().resumeWebhooks();
    await fake().webhooksSettled();
    return checkoutId;
  };

  test("on a superseded quote is in the ledger and before the owner, and pays nothing else", async () => {
    const order = await makeApproved(builder, shop);
    const [quote] = await db.select().from(quotes);
    const checkoutId = await payBehindTheBack(order.id, async () => {
      await done(reviseOrder(await asked(builder, order.id)));
    });
    expect((await orderAsIs(order.id)).stage).toBe("draft");
    expect(await amounts(order.id)).toEqual([
      ["debt", quote?.total],
      ["debt-released", -(quote?.total ?? 0)],
      ["payment", -(quote?.total ?? 0)],
    ]);
    expect(await owedOnQuote(db, order.id, quote?.id ?? "")).toBe(-(quote?.total ?? 0));
    expect(await listCheckouts(db, order.id)).toMatchObject([{ id: checkoutId, status: "paid" }]);
    expect(await db.select().from(auditEntries)).toMatchObject([
      { act: "payment.misfit", subjectId: order.id, detail: { checkoutId } },
    ]);
    expect(await mails()).toEqual(
      expect.arrayContaining([
        ["owner-attention", owner.email],
        ["receipt", builder.email],
      ]),
    );
    expect(await db.select().from(lots)).toMatchObject([{ sheetsReserved: 0 }]);
  });

  test("on a cancelled order, too", async () => {
    const order = await makeApproved(builder, shop);
    await payBehindTheBack(order.id, async () => {
      await done(cancelOrder({ ...(await asked(builder, order.id)), reason: "Drawn anew." }));
    });
    expect((await orderAsIs(order.id)).stage).toBe("cancelled");
    expect((await amounts(order.id)).map(([kind]) => kind)).toEqual(["debt", "debt-released", "payment"]);
    expect(await db.select().from(auditEntries)).toMatchObject([{ act: "payment.misfit" }]);
  });

  test("a second time on a paid order, too", async () => {
    const order = await makeApproved(builder, shop);
    await payBehindTheBack(order.id, async () => {
      const { sessionId } = await openPayPage(builder, order.id);
      await fake().pay(sessionId);
      await reconcilePayments(new Date(Date.now() + HOUR / 4));
      expect((await orderAsIs(order.id)).stage).toBe("paid");
    });
    expect((await orderAsIs(order.id)).stage).toBe("paid");
    expect((await amounts(order.id)).map(([kind]) => kind)).toEqual(["debt", "payment", "payment"]);
    expect(await db.select().from(auditEntries)).toMatchObject([{ act: "payment.misfit" }]);
    expect(await db.select().from(lots)).toMatchObject([{ sheetsReserved: 1 }]);
  });
});

describe("the webhook route", () => {
  const post = (body: string, signature: string) =>
    postToRoute(
      new Request("http://127.0.0.1/webhooks/payments", {
        method: "POST",
        headers: { "stripe-signature": signature },
        body,
      }),
    );
  const event = (type: string, object: Record<string, unknown>) =>
    JSON.stringify({ id: `evt_${newId()}`, object: "event", type, created: 1_764_600_000, data: { object } });
  const now = () => Math.floor(Date.now() / 1000);

  test("answers 400 to what the payment service did not sign, and stores nothing", async () => {
    const body = event("checkout.session.completed", { id: "cs_1", object: "checkout.session" });
    for (const signature of [
      "",
      "t=1,v1=00",
      signatureHeader(body, "whsec_other", now()),
      signatureHeader(body, fake().webhookSecret, now() - 3_600),
      signatureHeader(`${body} `, fake().webhookSecret, now()),
    ])
      expect((await post(body, signature)).status).toBe(400);
    expect(await db.$count(paymentEvents)).toBe(0);
  });

  test("takes events of other things than ours and leaves them be", async () => {
    for (const [type, object] of [
      ["customer.created", { id: "cus_1", object: "customer" }],
      ["checkout.session.completed", { id: "cs_unknown", object: "checkout.session" }],
    ] as const) {
      const body = event(type, object);
      expect((await post(body, signatureHeader(body, fake().webhookSecret, now()))).status).toBe(200);
    }
    expect((await db.select().from(paymentEvents)).map(({ outcome }) => outcome)).toEqual([
      "nothing to apply",
      "not-ours",
    ]);
    expect(await db.$count(ledgerEntries)).toBe(0);
    expect(takeConsoleErrors()).toEqual([]);
  });

  test("refuses a body beyond all measure", async () => {
    const body = "x".repeat(300_000);
    expect((await post(body, signatureHeader(body, fake().webhookSecret, now()))).status).toBe(413);
  });
});

/* Last in this file: the payment service's clock only runs forward. */
describe("a pay page's time", () => {
  test("over leaves a payable order; the news of it may be lost", async () => {
    const order = await makeApproved(builder, shop);
    await openPayPage(builder, order.id);
    fake().passTime(2 * 3_600);
    await fake().webhooksSettled();
    expect(await listCheckouts(db, order.id)).toMatchObject([{ status: "expired" }]);

    fake().pauseWebhooks();
    const { sessionId } = await done(
      startCheckout({ actor: builder, orderId: order.id, now: new Date(Date.now() + 2 * HOUR) }).then(
        async (verdict) => {
          const open = await findOpenCheckout(db, order.id);
          if (!open?.sessionId) throw new Error("No page is open.");
          return verdict.ok ? { ...verdict, sessionId: open.sessionId } : verdict;
        },
      ),
    );
    fake().passTime(2 * 3_600);
    expect(await findOpenCheckout(db, order.id)).toMatchObject({ sessionId });
    await reconcilePayments(new Date(Date.now() + HOUR));
    expect(await findOpenCheckout(db, order.id)).toBeUndefined();
    expect((await orderAsIs(order.id)).stage).toBe("quoted");
    await fake().resumeWebhooks();
    await fake().webhooksSettled();
  });

  test("over, though the payment came just before and its news just after, is a payment", async () => {
    const later = new Date(Date.now() + 4 * HOUR);
    const order = await makeApproved(builder, shop);
    await done(startCheckout({ actor: builder, orderId: order.id, now: later }));
    const open = await findOpenCheckout(db, order.id);
    if (!open?.sessionId) throw new Error("No page is open.");
    fake().pauseWebhooks();
    await fake().pay(open.sessionId);
    await transact((tx) => tx.update(checkouts).set({ status: "expired" }));
    fake().passTime(2 * 3_600);
    await fake().resumeWebhooks();
    await fake().webhooksSettled();
    await expectPaidOnce(order.id);
    expect(await listCheckouts(db, order.id)).toMatchObject([{ status: "paid" }]);
  });
});
