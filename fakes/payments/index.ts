/**
 * Payments: the part of Stripe's API that the product uses, spoken to the real `stripe` SDK, with a hosted pay
 * page and signed webhooks. Written from the SDK's own types and, where those are silent, from memory.
 *
 * Where it departs from the real service:
 * - Only card payments by Checkout in `payment` mode; no customers, taxes, discounts, payouts, fees or disputes;
 *   `balance_transaction` is always null. Objects carry the fields listed in objects.ts and no others.
 * - Any Stripe-Version is accepted and answered in one shape, that of the SDK's own version.
 * - Events are of the types in objects.ts only, as if one endpoint had subscribed to just these. Their retries
 *   come after seconds, not hours, and end after some attempts.
 * - The pay page does not wait for the webhook's answer before it sends the browser back.
 * - A refund succeeds at once; `refund.updated` follows it, as when the bank's reference arrives.
 * - No rate limits. Smallest and largest amounts are those of US dollars for every currency.
 * - An unknown address answers 501 (the real one 404) so that it stands out.
 */
import type { IncomingMessage, ServerResponse } from "node:http";
import { join } from "node:path";
import { jsonFile } from "../json-file";
import { type ListenOptions, listen, type RunningFake, sendJson, type Unexpected } from "../local-server";
import { answerApi, type PlannedFailure } from "./api";
import type { CardFields } from "./cards";
import { Desk, type Emit } from "./desk";
import { emptyState, newId, type PaymentsState, type ServiceEvent, type StoredEvent } from "./objects";
import { createPayPage, type PayPage } from "./pay-page";
import { Refunds } from "./refunds";
import { answerSwitch } from "./switches";
import { WebhookSender, type WebhookTarget } from "./webhooks";

export { signatureHeader } from "./webhooks";

export const PAYMENTS_SECRET_KEY = "sk_test_kerfpost_local";
export const PAYMENTS_WEBHOOK_SECRET = "whsec_kerfpost_local";
const API_VERSION = "2026-10-28.endive";

export interface PaymentsFakeOptions extends ListenOptions {
  /** State is kept in `payments.json` there; without it in memory. */
  dataDirectory?: string | undefined;
  secretKey?: string | undefined;
  /** Where events go; may be set later with `pointWebhooksAt`. */
  webhookUrl?: string | undefined;
  webhookSecret?: string | undefined;
  /** Milliseconds before each further attempt at a delivery that failed. */
  retryDelays?: number[] | undefined;
}

export interface PaymentsFake extends RunningFake {
  secretKey: string;
  webhookSecret: string;
  /** Events oldest first, with how often they were sent and whether the receiver took them. */
  events(): readonly StoredEvent[];
  pointWebhooksAt(url: string): void;
  pauseWebhooks(): void;
  /** Sends what was held back in order. */
  resumeWebhooks(): Promise<void>;
  /** Sends what was held back, newest first, each after the answer to the one before. */
  deliverInReverse(): Promise<void>;
  /** Sends an event once more; answers the receiver's status. */
  deliverAgain(eventId: string): Promise<number>;
  /** Resolves when no delivery or retry is outstanding. */
  webhooksSettled(): Promise<void>;
  /** The next requests to /v1 fail, one per entry. */
  failNext(...failures: PlannedFailure[]): void;
  /** Fills in and sends the pay page as a person would. */
  pay(sessionId: string, card?: Partial<CardFields>): ReturnType<PayPage["submit"]>;
  confirm(sessionId: string, confirmed: boolean): ReturnType<PayPage["confirm"]>;
  /** The bank sends a refund back. */
  failRefund(refundId: string): void;
  /** Moves the fake's clock on and expires what is due. */
  passTime(seconds: number): void;
}

const DEFAULT_RETRIES = [1_000, 2_000, 5_000, 10_000, 30_000, 60_000, 120_000, 300_000];

/** Starts the payments fake. */
export async function startPayments(options: PaymentsFakeOptions): Promise<PaymentsFake> {
  const secretKey = options.secretKey ?? PAYMENTS_SECRET_KEY;
  const webhookSecret = options.webhookSecret ?? PAYMENTS_WEBHOOK_SECRET;
  const file = jsonFile<PaymentsState>(options.dataDirectory && join(options.dataDirectory, "payments.json"));
  const state = file.read() ?? emptyState();
  const changed = () => file.write(state);
  const unexpected: Unexpected[] = [];
  const planned: PlannedFailure[] = [];
  let passed = 0;
  const now = () => Math.floor(Date.now() / 1000) + passed;
  const target = (url: string): WebhookTarget => ({ url, secret: webhookSecret });
  const sender = new WebhookSender({
    events: state.events,
    target: options.webhookUrl ? target(options.webhookUrl) : undefined,
    retryDelays: options.retryDelays ?? DEFAULT_RETRIES,
    changed,
  });

  let cause: ServiceEvent["request"] = { id: null, idempotency_key: null };
  let baseUrl = "";
  const emit: Emit = (type, object) => {
    const event: ServiceEvent = {
      id: newId("evt"),
      object: "event",
      api_version: API_VERSION,
      created: now(),
      data: { object: structuredClone(object) },
      livemode: false,
      pending_webhooks: 1,
      request: cause,
      type,
    };
    const stored: StoredEvent = { event, delivered: false, attempts: 0 };
    state.events.push(stored);
    sender.enqueue(stored);
  };
  const desk = new Desk({ state, now, baseUrl: () => baseUrl, emit });
  const refunds = new Refunds({ state, desk, now, emit });
  const noCause = () => {
    cause = { id: null, idempotency_key: null };
  };
  const page = createPayPage({ desk, now, acting: noCause, changed });
  const sweep = () => {
    noCause();
    const before = state.events.length;
    desk.sweep();
    if (state.events.length > before) changed();
  };
  const passTime = (seconds: number) => {
    passed += seconds;
    sweep();
  };
  const apiParts = {
    state,
    desk,
    refunds,
    secretKey,
    unexpected,
    planned,
    now,
    changed,
    duringRequest(id: string, key: string | null) {
      cause = { id, idempotency_key: key };
    },
  };

  const handler = async (request: IncomingMessage, response: ServerResponse) => {
    const address = new URL(request.url ?? "/", "http://payments");
    sweep();
    if (address.pathname.startsWith("/v1/")) return answerApi(request, response, address, apiParts);
    if (
      await answerSwitch(request, response, address, { sender, events: state.events, unexpected, passTime })
    )
      return;
    if (await page.answer(request, response, address.pathname)) return;
    unexpected.push({ method: request.method ?? "GET", path: address.pathname, why: "no such page" });
    sendJson(response, 501, {
      error: { type: "api_error", message: `The local payments stand-in has no ${address.pathname}.` },
    });
  };
  const server = await listen(handler, options);
  baseUrl = server.url;
  const clock = setInterval(sweep, 1_000);
  clock.unref();
  sender.resumeUndelivered();

  return {
    url: server.url,
    port: server.port,
    secretKey,
    webhookSecret,
    unexpected,
    events: () => state.events,
    pointWebhooksAt: (url) => sender.pointAt(target(url)),
    pauseWebhooks: () => sender.pause(),
    resumeWebhooks: () => sender.release("in-order"),
    deliverInReverse: () => sender.release("reversed"),
    deliverAgain: (eventId) => sender.deliverAgain(eventId),
    webhooksSettled: () => sender.settled(),
    failNext: (...failures) => {
      planned.push(...failures);
    },
    pay: (sessionId, card) =>
      page.submit(sessionId, {
        email: desk.session(sessionId).customer_email ?? "builder@example.com",
        number: "4242424242424242",
        expiry: "12/49",
        cvc: "123",
        ...card,
      }),
    confirm: (sessionId, confirmed) => page.confirm(sessionId, confirmed),
    failRefund(refundId) {
      noCause();
      refunds.fail(refundId);
      changed();
    },
    passTime,
    async stop() {
      clearInterval(clock);
      await sender.stop();
      await server.stop();
    },
  };
}
