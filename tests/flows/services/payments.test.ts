import Stripe from "stripe";
import { describe, expect, it } from "vitest";
import type { Checkout, CheckoutWanted, PaymentsResult } from "~/services/payments.server";
import { createPayments } from "~/services/payments.server";
import { fakesForTests, serviceConfigs, takeUnexpected } from "../../support/fakes";

const running = fakesForTests();

let made = 0;
function checkoutWanted(changes: Partial<CheckoutWanted> = {}): CheckoutWanted {
  made += 1;
  return {
    idempotencyKey: `checkout-${made}`,
    currency: "usd",
    lines: [
      { name: "Panels for the tea kiosk", description: "3 sheets, 18 mm", amount: 41_250, quantity: 1 },
      { name: "Freight", amount: 2_500, quantity: 2 },
    ],
    description: "Order K-1001",
    customerEmail: "ines@kiosk.example",
    successUrl: "http://127.0.0.1:4800/orders/abc/paid?checkout={CHECKOUT_SESSION_ID}",
    cancelUrl: "http://127.0.0.1:4800/orders/abc",
    metadata: { orderId: "ord_1", quoteId: "quo_1" },
    ...changes,
  };
}

function taken<Value>(result: PaymentsResult<Value>): Value {
  if (!result.ok) throw new Error(`${result.reason}: ${result.message}`);
  return result.value;
}

async function newCheckout(changes: Partial<CheckoutWanted> = {}): Promise<Checkout> {
  return taken(await running.services.payments.createCheckout(checkoutWanted(changes)));
}

async function paidCheckout(): Promise<{ checkout: Checkout; paymentId: string }> {
  const { id } = await newCheckout();
  expect(running.fakes.payments.pay(id).kind).toBe("paid");
  const checkout = taken(await running.services.payments.getCheckout(id));
  return { checkout, paymentId: checkout.payment?.id ?? "" };
}

function eventTypes(objectIds: (string | undefined)[]): string[] {
  return running.fakes.payments
    .events()
    .filter(({ event }) => objectIds.includes((event.data.object as { id: string }).id))
    .map(({ event }) => event.type);
}

/** The plain SDK, for requests that the typed client does not make. */
function sdk(): Stripe {
  const { hostname, port } = new URL(running.fakes.payments.url);
  return new Stripe(running.fakes.payments.secretKey, {
    host: hostname,
    port,
    protocol: "http",
    telemetry: false,
    maxNetworkRetries: 0,
  });
}

async function sendPayForm(checkout: Checkout, fields: Record<string, string>, path = "") {
  return fetch(`${running.fakes.payments.url}/pay/${checkout.id}${path}`, {
    method: "POST",
    redirect: "manual",
    body: new URLSearchParams(fields),
  });
}

const CARD = { email: "ines@kiosk.example", number: "4242 4242 4242 4242", expiry: "12/49", cvc: "123" };

describe("checkout", () => {
  it("is open and unpaid at first, with a page that names the amount and the way back", async () => {
    const checkout = await newCheckout();
    // 412.50 + 2 x 25.00
    expect(checkout).toMatchObject({ status: "open", paid: false, amount: 46_250, currency: "usd" });
    expect(checkout.payment).toBeUndefined();
    expect(checkout.metadata).toEqual({ orderId: "ord_1", quoteId: "quo_1" });
    const page = await (await fetch(checkout.url ?? "")).text();
    expect(page).toContain("$462.50");
    expect(page).toContain("Panels for the tea kiosk");
    expect(page).toContain('href="http://127.0.0.1:4800/orders/abc"');
  });

  it("is paid by a good card on the page, which sends the payer back with the checkout's id", async () => {
    const checkout = await newCheckout();
    const answer = await sendPayForm(checkout, CARD);
    expect(answer.status).toBe(303);
    expect(answer.headers.get("location")).toBe(
      `http://127.0.0.1:4800/orders/abc/paid?checkout=${checkout.id}`,
    );
    const after = taken(await running.services.payments.getCheckout(checkout.id));
    expect(after).toMatchObject({ status: "complete", paid: true, url: undefined });
    expect(after.payment).toMatchObject({
      status: "succeeded",
      amount: 46_250,
      amountReceived: 46_250,
      amountRefunded: 0,
      metadata: { orderId: "ord_1", quoteId: "quo_1" },
    });
    expect(await (await fetch(after.payment?.receiptUrl ?? "")).text()).toContain("$462.50");
    expect(eventTypes([checkout.id, after.payment?.id])).toEqual([
      "payment_intent.succeeded",
      "checkout.session.completed",
    ]);
    const found = taken(await running.services.payments.findCheckoutOfPayment(after.payment?.id ?? ""));
    expect(found?.id).toBe(checkout.id);
  });

  it("is charged once when the form is sent twice", async () => {
    const checkout = await newCheckout();
    const answers = await Promise.all([sendPayForm(checkout, CARD), sendPayForm(checkout, CARD)]);
    expect(answers.map(({ status }) => status)).toEqual([303, 303]);
    expect(eventTypes([checkout.id])).toEqual(["checkout.session.completed"]);
  });

  // Test card numbers and their codes as published in the service's testing guide, from memory.
  it.each([
    ["4000000000000002", "Your card was declined.", "card_declined", "generic_decline"],
    ["4000000000009995", "Your card has insufficient funds.", "card_declined", "insufficient_funds"],
    ["4000000000000069", "Your card has expired.", "expired_card", undefined],
  ])(
    "stays open when card %s is declined, and can still be paid",
    async (number, message, code, declineCode) => {
      const checkout = await newCheckout();
      const answer = await sendPayForm(checkout, { ...CARD, number });
      expect(answer.status).toBe(402);
      expect(await answer.text()).toContain(message);
      const declined = taken(await running.services.payments.getCheckout(checkout.id));
      expect(declined).toMatchObject({ status: "open", paid: false });
      expect(declined.payment).toMatchObject({
        status: "requires_payment_method",
        failure: message,
        amountReceived: 0,
      });
      const intent = await sdk().paymentIntents.retrieve(declined.payment?.id ?? "");
      expect(intent.last_payment_error).toMatchObject({ code });
      expect(intent.last_payment_error?.decline_code).toBe(declineCode);
      expect((await sendPayForm(checkout, CARD)).status).toBe(303);
      expect(eventTypes([checkout.id, declined.payment?.id])).toEqual([
        "payment_intent.payment_failed",
        "payment_intent.succeeded",
        "checkout.session.completed",
      ]);
    },
  );

  it.each([
    ["number", { number: "4111111111111111" }],
    ["expiry", { expiry: "01/20" }],
    ["expiry", { expiry: "13/49" }],
    ["cvc", { cvc: "12" }],
    ["email", { email: "nobody" }],
  ])("points at a wrong %s without an attempt", async (field, change) => {
    const checkout = await newCheckout();
    const answer = await sendPayForm(checkout, { ...CARD, ...change });
    expect(answer.status).toBe(400);
    expect(await answer.text()).toMatch(new RegExp(`name="${field}"[^>]*aria-invalid`));
    expect(taken(await running.services.payments.getCheckout(checkout.id)).payment).toBeUndefined();
  });

  it.each([
    ["yes", 303, "complete", ["payment_intent.succeeded", "checkout.session.completed"]],
    ["no", 402, "open", ["payment_intent.payment_failed"]],
  ])(
    "asks for a confirmation where the card wants one, answered %s",
    async (answer, status, state, types) => {
      const checkout = await newCheckout();
      const asked = await sendPayForm(checkout, { ...CARD, number: "4000002500003155" });
      expect(asked.status).toBe(200);
      expect(await asked.text()).toContain("$462.50");
      const waiting = taken(await running.services.payments.getCheckout(checkout.id));
      expect(waiting.payment?.status).toBe("requires_action");
      expect((await sendPayForm(checkout, { answer }, "/confirm")).status).toBe(status);
      expect(taken(await running.services.payments.getCheckout(checkout.id)).status).toBe(state);
      expect(eventTypes([checkout.id, waiting.payment?.id])).toEqual(types);
    },
  );

  it("escapes what the order put into its lines", async () => {
    const checkout = await newCheckout({
      lines: [{ name: '<script>alert("x")</script>', amount: 5_000, quantity: 1 }],
    });
    const page = await (await fetch(checkout.url ?? "")).text();
    expect(page).not.toContain("<script>");
    expect(page).toContain("&lt;script&gt;");
  });

  it("cannot be paid once it was expired by the shop", async () => {
    const checkout = await newCheckout();
    const expired = taken(await running.services.payments.expireCheckout(checkout.id));
    expect(expired).toMatchObject({ status: "expired", paid: false, url: undefined });
    expect((await fetch(checkout.url ?? "")).status).toBe(410);
    expect((await sendPayForm(checkout, CARD)).status).toBe(410);
    expect(eventTypes([checkout.id])).toEqual(["checkout.session.expired"]);
    expect(await running.services.payments.expireCheckout(checkout.id)).toMatchObject({
      ok: false,
      reason: "refused",
    });
  });

  it("expires by itself at its time", async () => {
    const checkout = await newCheckout({ expiresAt: new Date(Date.now() + 31 * 60_000) });
    running.fakes.payments.passTime(30 * 60);
    expect(taken(await running.services.payments.getCheckout(checkout.id)).status).toBe("open");
    running.fakes.payments.passTime(2 * 60);
    expect(taken(await running.services.payments.getCheckout(checkout.id)).status).toBe("expired");
    expect(eventTypes([checkout.id])).toEqual(["checkout.session.expired"]);
  });

  // Bounds of expires_at and of amounts as documented by the service, from memory.
  it.each([
    ["an expiry sooner than 30 minutes", { expiresAt: new Date(Date.now() + 60_000) }],
    ["an amount under the smallest charge", { lines: [{ name: "Scrap", amount: 49, quantity: 1 }] }],
    ["no lines", { lines: [] }],
    ["an address that is none", { customerEmail: "nobody" }],
  ])("is refused with %s", async (_case, change) => {
    const refused = await running.services.payments.createCheckout(checkoutWanted(change));
    expect(refused).toMatchObject({ ok: false, reason: "refused" });
  });

  it("answers not-found for a checkout that never was", async () => {
    expect(await running.services.payments.getCheckout("cs_test_nowhere")).toMatchObject({
      ok: false,
      reason: "not-found",
    });
  });
});

describe("idempotency", () => {
  it("answers the same checkout to the same key and content", async () => {
    const wanted = checkoutWanted();
    const first = taken(await running.services.payments.createCheckout(wanted));
    const again = taken(await running.services.payments.createCheckout(wanted));
    expect(again).toEqual(first);
    const raw = await sdk().checkout.sessions.list({ limit: 100 });
    expect(raw.data.filter(({ id }) => id === first.id)).toHaveLength(1);
  });

  it("refuses the same key for other content", async () => {
    const wanted = checkoutWanted();
    taken(await running.services.payments.createCheckout(wanted));
    const other = await running.services.payments.createCheckout({
      ...wanted,
      lines: [{ name: "Other", amount: 1_000, quantity: 1 }],
    });
    expect(other).toMatchObject({ ok: false, reason: "conflict" });
  });

  it("refunds once when the answer was lost on its way and the SDK asked again", async () => {
    const { paymentId } = await paidCheckout();
    running.fakes.payments.failNext({ when: "after" });
    const refund = taken(
      await running.services.payments.refund({
        idempotencyKey: `refund-of-${paymentId}`,
        paymentId,
        amount: 10_000,
        reason: "requested_by_customer",
        metadata: {},
      }),
    );
    expect(refund).toMatchObject({ amount: 10_000, status: "succeeded", paymentId });
    const payment = taken(await running.services.payments.getPayment(paymentId));
    expect(payment.amountRefunded).toBe(10_000);
  });

  it("gets through one failure of the service, and says unavailable when it lasts", async () => {
    running.fakes.payments.failNext({ when: "before", status: 500 });
    expect((await running.services.payments.createCheckout(checkoutWanted())).ok).toBe(true);
    const failure = { when: "before", status: 503 } as const;
    running.fakes.payments.failNext(failure, failure, failure);
    expect(await running.services.payments.createCheckout(checkoutWanted())).toMatchObject({
      ok: false,
      reason: "unavailable",
    });
  });
});

describe("refunds", () => {
  const refund = (paymentId: string, amount: number, idempotencyKey: string) =>
    running.services.payments.refund({
      idempotencyKey,
      paymentId,
      amount,
      reason: "requested_by_customer",
      metadata: { orderId: "ord_1" },
    });

  it("gives back a part, then the rest, then nothing more", async () => {
    const { paymentId } = await paidCheckout();
    const part = taken(await refund(paymentId, 6_250, `${paymentId}-a`));
    expect(part).toMatchObject({ amount: 6_250, metadata: { orderId: "ord_1" } });
    const tooMuch = await refund(paymentId, 40_001, `${paymentId}-b`);
    expect(tooMuch).toMatchObject({ ok: false, reason: "refused" });
    expect(tooMuch.ok ? "" : tooMuch.message).toContain("greater than unrefunded amount on charge ($400.00)");
    taken(await refund(paymentId, 40_000, `${paymentId}-c`));
    const payment = taken(await running.services.payments.getPayment(paymentId));
    expect(payment.amountRefunded).toBe(46_250);
    expect(await refund(paymentId, 1, `${paymentId}-d`)).toMatchObject({ ok: false, reason: "refused" });
    const charge = await sdk().charges.retrieve(payment.chargeId ?? "");
    expect(charge).toMatchObject({ refunded: true, amount_refunded: 46_250 });
    expect(eventTypes([charge.id])).toEqual(["charge.refunded", "charge.refunded"]);
    expect(eventTypes([part.id])).toEqual(["refund.created", "refund.updated"]);
  });

  it("is refused where nothing was paid", async () => {
    const checkout = await newCheckout();
    running.fakes.payments.pay(checkout.id, { number: "4000000000000002" });
    const declined = taken(await running.services.payments.getCheckout(checkout.id));
    expect(await refund(declined.payment?.id ?? "", 100, "nothing-paid")).toMatchObject({
      ok: false,
      reason: "refused",
    });
  });

  it("comes back when the bank cannot place it", async () => {
    const { paymentId } = await paidCheckout();
    const made = taken(await refund(paymentId, 46_250, `${paymentId}-returned`));
    running.fakes.payments.failRefund(made.id);
    expect(taken(await running.services.payments.getRefund(made.id)).status).toBe("failed");
    expect(taken(await running.services.payments.getPayment(paymentId)).amountRefunded).toBe(0);
    expect(eventTypes([made.id])).toContain("refund.failed");
  });
});

describe("what the stand-in does not know or allow", () => {
  it("fails loudly at an unknown request and an unknown parameter", async () => {
    await expect(sdk().customers.create({ email: "x@example.com" })).rejects.toMatchObject({
      statusCode: 501,
    });
    await expect(
      sdk().checkout.sessions.create({
        mode: "payment",
        success_url: "http://127.0.0.1/ok",
        allow_promotion_codes: true,
        line_items: [
          { quantity: 1, price_data: { currency: "usd", unit_amount: 500, product_data: { name: "x" } } },
        ],
      }),
    ).rejects.toMatchObject({ statusCode: 400, code: "parameter_unknown", param: "allow_promotion_codes" });
    expect(takeUnexpected(running.fakes).map(({ method, path }) => `${method} ${path}`)).toEqual([
      "POST /v1/customers",
      "POST /v1/checkout/sessions",
    ]);
  });

  it("refuses a wrong key", async () => {
    const stranger = createPayments({
      ...serviceConfigs(running.fakes).payments,
      secretKey: "sk_test_other",
    });
    expect(await stranger.getCheckout("cs_test_any")).toMatchObject({ ok: false, reason: "misconfigured" });
  });

  it("refuses to expand what cannot be", async () => {
    const checkout = await newCheckout();
    await expect(
      sdk().checkout.sessions.retrieve(checkout.id, { expand: ["customer"] }),
    ).rejects.toMatchObject({ statusCode: 400 });
  });

  it("expands line items and changes a payment's description when asked", async () => {
    const { checkout, paymentId } = await paidCheckout();
    const session = await sdk().checkout.sessions.retrieve(checkout.id, { expand: ["line_items"] });
    expect(session.line_items?.data.map(({ amount_total }) => amount_total)).toEqual([41_250, 5_000]);
    const intent = await sdk().paymentIntents.update(paymentId, {
      description: "Order K-1001, revised",
      metadata: { quoteId: "", note: "kept" },
    });
    expect(intent.description).toBe("Order K-1001, revised");
    expect(intent.metadata).toEqual({ orderId: "ord_1", note: "kept" });
  });
});
