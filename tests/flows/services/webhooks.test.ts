import { mkdtemp, rm } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";
import Stripe from "stripe";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { createPayments, type Payments } from "~/services/payments.server";
import { PAYMENTS_WEBHOOK_SECRET, type PaymentsFake, signatureHeader, startPayments } from "~fakes/payments";
import { startReceiver } from "./webhook-receiver";

let receiver: Awaited<ReturnType<typeof startReceiver>>;
let fake: PaymentsFake;
let payments: Payments;

beforeEach(async () => {
  receiver = await startReceiver();
  fake = await startPayments({ port: 0, webhookUrl: receiver.url, retryDelays: [10, 20, 40] });
  payments = clientOf(fake);
});

afterEach(async () => {
  await fake.stop();
  await receiver.stop();
  expect(fake.unexpected).toEqual([]);
});

function clientOf({ url, secretKey, webhookSecret }: PaymentsFake): Payments {
  return createPayments({ apiUrl: url, secretKey, webhookSecret });
}

async function newCheckout(client: Payments): Promise<string> {
  const made = await client.createCheckout({
    idempotencyKey: crypto.randomUUID(),
    currency: "usd",
    lines: [{ name: "Panels", amount: 12_000, quantity: 1 }],
    description: "Order K-1002",
    customerEmail: "ines@kiosk.example",
    successUrl: "http://127.0.0.1:4800/paid",
    cancelUrl: "http://127.0.0.1:4800/back",
    metadata: {},
  });
  if (!made.ok) throw new Error(made.message);
  return made.value.id;
}

async function pay(client = payments, service = fake): Promise<string> {
  const id = await newCheckout(client);
  expect(service.pay(id).kind).toBe("paid");
  return id;
}

/** Causes exactly one event. */
async function expireOne() {
  expect(await payments.expireCheckout(await newCheckout(payments))).toMatchObject({ ok: true });
}

const idsOf = () => receiver.received.map(({ id }) => id);

describe("signed payment events", () => {
  it("pass the real library's check and name their object", async () => {
    const checkoutId = await pay();
    await fake.webhooksSettled();
    expect(receiver.received.map(({ type }) => type).sort()).toEqual([
      "checkout.session.completed",
      "payment_intent.succeeded",
    ]);
    for (const { body, signature } of receiver.received)
      expect(Stripe.webhooks.constructEvent(body, signature, PAYMENTS_WEBHOOK_SECRET).object).toBe("event");
    const completed = receiver.received.find(({ type }) => type === "checkout.session.completed");
    const verified = payments.verifyWebhook(Buffer.from(completed?.body ?? ""), completed?.signature ?? null);
    const checkout = await payments.getCheckout(checkoutId);
    expect(verified).toMatchObject({
      ok: true,
      event: {
        id: completed?.id,
        type: "checkout.session.completed",
        objectType: "checkout.session",
        objectId: checkoutId,
        paymentId: checkout.ok ? checkout.value.payment?.id : undefined,
      },
    });
  });

  it("are refused when altered, unsigned, signed by another or too old", async () => {
    await pay();
    await fake.webhooksSettled();
    const { body, signature } = receiver.received[0] ?? { body: "", signature: "" };
    const refused = { ok: false, reason: "bad-signature" };
    expect(payments.verifyWebhook(body, signature)).toMatchObject({ ok: true });
    expect(payments.verifyWebhook(body.replace("12000", "12"), signature)).toEqual(refused);
    expect(payments.verifyWebhook(body, null)).toEqual(refused);
    expect(payments.verifyWebhook(body, "t=1,v1=abc")).toEqual(refused);
    const seconds = Math.floor(Date.now() / 1000);
    expect(payments.verifyWebhook(body, signatureHeader(body, "whsec_other", seconds))).toEqual(refused);
    // The library's tolerance is 300 s (Webhooks.DEFAULT_TOLERANCE).
    const old = signatureHeader(body, PAYMENTS_WEBHOOK_SECRET, seconds - 310);
    expect(payments.verifyWebhook(body, old)).toEqual(refused);
  });

  it.each(["not json", "[]", '{"id":"evt_1"}'])("are refused when signed but no event: %s", (body) => {
    const signature = signatureHeader(body, PAYMENTS_WEBHOOK_SECRET, Math.floor(Date.now() / 1000));
    expect(payments.verifyWebhook(body, signature)).toEqual({ ok: false, reason: "not-an-event" });
  });

  it("come again when asked, with the same id", async () => {
    await pay();
    await fake.webhooksSettled();
    const [first] = fake.events();
    expect(await fake.deliverAgain(first?.event.id ?? "")).toBe(200);
    expect(idsOf().filter((id) => id === first?.event.id)).toHaveLength(2);
  });

  it("can be held and sent in reverse", async () => {
    fake.pauseWebhooks();
    await pay();
    await pay();
    await fake.webhooksSettled();
    expect(receiver.received).toEqual([]);
    await fake.deliverInReverse();
    const inOrder = fake.events().map(({ event }) => event.id);
    expect(inOrder).toHaveLength(4);
    expect(idsOf()).toEqual(inOrder.toReversed());
  });

  it("can be held and sent in order", async () => {
    fake.pauseWebhooks();
    await pay();
    await fake.resumeWebhooks();
    expect(idsOf()).toEqual(fake.events().map(({ event }) => event.id));
    await pay();
    await fake.webhooksSettled();
    expect(receiver.received).toHaveLength(4);
  });

  it("are tried again after an error, a redirect and a busy answer, until taken", async () => {
    receiver.answerNext(500, 302, 503);
    await expireOne();
    await fake.webhooksSettled();
    expect(fake.events().map(({ attempts, delivered }) => ({ attempts, delivered }))).toEqual([
      { attempts: 4, delivered: true },
    ]);
    expect(new Set(idsOf()).size).toBe(1);
    expect(receiver.received).toHaveLength(4);
  });

  it("are given up after the last retry and can still be sent by hand", async () => {
    receiver.answerNext(...Array.from({ length: 8 }, () => 500));
    await pay();
    await fake.webhooksSettled();
    expect(fake.events().map(({ attempts, delivered }) => ({ attempts, delivered }))).toEqual([
      { attempts: 4, delivered: false },
      { attempts: 4, delivered: false },
    ]);
    expect(await fake.deliverAgain(fake.events()[0]?.event.id ?? "")).toBe(200);
    expect(fake.events()[0]?.delivered).toBe(true);
  });

  it("obey the same switches over HTTP", async () => {
    const turn = async (name: string): Promise<unknown> =>
      (await fetch(`${fake.url}/_fake/${name}`, { method: "POST" })).json();
    await turn("pause");
    await pay();
    await turn("settle");
    expect(receiver.received).toEqual([]);
    await turn("reverse");
    const inOrder = fake.events().map(({ event }) => event.id);
    expect(idsOf()).toEqual(inOrder.toReversed());
    expect(await turn(`deliver-again?event=${inOrder[0]}`)).toEqual({ status: 200 });
    expect(idsOf()).toHaveLength(3);
    expect(await (await fetch(`${fake.url}/_fake/events`)).json()).toEqual(fake.events());
  });

  it("outlive a restart, as do checkouts and remembered keys", async () => {
    const dataDirectory = await mkdtemp(join(tmpdir(), "payments-"));
    const first = await startPayments({ port: 0, dataDirectory });
    const checkoutId = await pay(clientOf(first), first);
    await first.stop();
    expect(first.events().every(({ attempts }) => attempts === 0)).toBe(true);

    const second = await startPayments({ port: 0, dataDirectory, webhookUrl: receiver.url });
    await second.webhooksSettled();
    expect(idsOf()).toHaveLength(2);
    expect(await clientOf(second).getCheckout(checkoutId)).toMatchObject({ ok: true, value: { paid: true } });
    await second.stop();

    const third = await startPayments({ port: 0, dataDirectory, webhookUrl: receiver.url });
    await third.webhooksSettled();
    expect(idsOf()).toHaveLength(2);
    await third.stop();
    await rm(dataDirectory, { recursive: true });
  });
});
