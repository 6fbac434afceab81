/** Hooks over HTTP, for browser tests that run in another process: everything under /_fake/. */
import type { IncomingMessage, ServerResponse } from "node:http";
import { sendJson, type Unexpected } from "../local-server";
import type { StoredEvent } from "./objects";
import type { WebhookSender } from "./webhooks";

export interface SwitchesParts {
  sender: WebhookSender;
  events: StoredEvent[];
  unexpected: Unexpected[];
  passTime(seconds: number): void;
}

/**
 * GET /_fake/events and /_fake/unexpected; POST /_fake/pause, /resume, /reverse, /settle,
 * /deliver-again?event=ID and /pass-time?seconds=N. False when the path is none of them.
 */
export async function answerSwitch(
  request: IncomingMessage,
  response: ServerResponse,
  address: URL,
  { sender, events, unexpected, passTime }: SwitchesParts,
): Promise<boolean> {
  const switches: Record<string, () => unknown> = {
    "GET events": () => events,
    "GET unexpected": () => unexpected,
    "POST pause": () => sender.pause(),
    "POST resume": () => sender.release("in-order"),
    "POST reverse": () => sender.release("reversed"),
    "POST settle": () => sender.settled(),
    "POST deliver-again": async () => ({
      status: await sender.deliverAgain(address.searchParams.get("event") ?? ""),
    }),
    "POST pass-time": () => passTime(Number(address.searchParams.get("seconds"))),
  };
  const [, name] = /^\/_fake\/([\w-]+)$/.exec(address.pathname) ?? [];
  const turn = switches[`${request.method} ${name}`];
  if (!turn) return false;
  sendJson(response, 200, (await turn()) ?? {});
  return true;
}
