/** Signed delivery of events to one address, with retries, and the switches by which tests upset it. */
import { createHmac } from "node:crypto";
import type { StoredEvent } from "./objects";

export interface WebhookTarget {
  url: string;
  secret: string;
}

export interface WebhookOptions {
  events: StoredEvent[];
  target: WebhookTarget | undefined;
  /** Milliseconds before each further attempt. */
  retryDelays: number[];
  /** Called after a delivery changed an event's record. */
  changed(): void;
}

/** Longest wait for the receiver's answer, as in the real service's documentation of about ten seconds. */
const ANSWER_TIMEOUT = 10_000;

/** The signature header: HMAC-SHA256 of `time.body` under the endpoint's secret. `time` in seconds. */
export function signatureHeader(body: string, secret: string, time: number): string {
  return `t=${time},v1=${createHmac("sha256", secret).update(`${time}.${body}`).digest("hex")}`;
}

export class WebhookSender {
  private readonly options: WebhookOptions;
  private target: WebhookTarget | undefined;
  private held: StoredEvent[] | undefined;
  private readonly timers = new Set<NodeJS.Timeout>();
  private readonly running = new Set<Promise<number>>();
  private readonly stopping = new AbortController();

  constructor(options: WebhookOptions) {
    this.options = options;
    this.target = options.target;
  }

  /** Sends soon, or keeps it while paused. Without an address the event is only recorded. */
  enqueue(stored: StoredEvent) {
    if (this.held) this.held.push(stored);
    else this.later(stored, 0, 0);
  }

  pointAt(target: WebhookTarget) {
    this.target = target;
  }

  pause() {
    this.held ??= [];
  }

  /** Sends what was held, in order or reversed, each after the answer to the one before; then as usual. */
  async release(order: "in-order" | "reversed"): Promise<void> {
    const held = this.held ?? [];
    this.held = undefined;
    for (const stored of order === "reversed" ? held.toReversed() : held) {
      const status = await this.attempt(stored);
      if (!isSuccess(status)) this.retry(stored, 0);
    }
  }

  /** One more delivery of an event, delivered before or not; answers the receiver's status, 0 without an answer. */
  deliverAgain(eventId: string): Promise<number> {
    const stored = this.options.events.find(({ event }) => event.id === eventId);
    if (!stored) throw new Error(`There is no event ${eventId}.`);
    return this.attempt(stored);
  }

  /** Resolves once nothing is on its way and no retry is waiting. */
  async settled(): Promise<void> {
    while (this.timers.size > 0 || this.running.size > 0)
      await new Promise((resolve) => setTimeout(resolve, 5));
  }

  /** Takes up again what had not been delivered when the fake was stopped. */
  resumeUndelivered() {
    for (const stored of this.options.events) if (!stored.delivered) this.later(stored, 0, 0);
  }

  async stop(): Promise<void> {
    for (const timer of this.timers) clearTimeout(timer);
    this.timers.clear();
    this.stopping.abort();
    await Promise.allSettled(this.running);
  }

  private later(stored: StoredEvent, delay: number, retries: number) {
    if (!this.target || this.stopping.signal.aborted) return;
    const timer = setTimeout(async () => {
      const attempt = this.attempt(stored);
      this.timers.delete(timer);
      if (!isSuccess(await attempt)) this.retry(stored, retries);
    }, delay);
    this.timers.add(timer);
  }

  private retry(stored: StoredEvent, retries: number) {
    const delay = this.options.retryDelays[retries];
    if (delay !== undefined) this.later(stored, delay, retries + 1);
  }

  private attempt(stored: StoredEvent): Promise<number> {
    const attempt = this.post(stored);
    this.running.add(attempt);
    return attempt.finally(() => this.running.delete(attempt));
  }

  private async post(stored: StoredEvent): Promise<number> {
    if (!this.target) return 0;
    const body = JSON.stringify(stored.event);
    stored.attempts += 1;
    let status = 0;
    try {
      const answer = await fetch(this.target.url, {
        method: "POST",
        redirect: "manual",
        headers: {
          "Content-Type": "application/json; charset=utf-8",
          "User-Agent": "Stripe/1.0 (local stand-in)",
          "Stripe-Signature": signatureHeader(body, this.target.secret, Math.floor(Date.now() / 1000)),
        },
        body,
        signal: AbortSignal.any([this.stopping.signal, AbortSignal.timeout(ANSWER_TIMEOUT)]),
      });
      await answer.body?.cancel();
      status = answer.status;
    } catch {
      status = 0;
    }
    if (isSuccess(status)) stored.delivered = true;
    this.options.changed();
    return status;
  }
}

function isSuccess(status: number): boolean {
  return status >= 200 && status < 300;
}
