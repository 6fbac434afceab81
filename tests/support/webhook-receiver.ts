/** The webhook route on a port of its own, so that the payments fake can reach it as it reaches the product. */
import { createServer, type Server } from "node:http";
import type { AddressInfo } from "node:net";
import { buffer } from "node:stream/consumers";
import { afterAll, beforeAll } from "vitest";
import { action } from "~/routes/webhooks/payments";

export interface WebhookReceiver {
  readonly url: string;
  /** Statuses answered so far, oldest first. */
  readonly answers: readonly number[];
}

/** Passes every post to the product's own webhook route. */
export function receiveWebhooks(): WebhookReceiver {
  const answers: number[] = [];
  let server: Server | undefined;
  let url = "";
  beforeAll(async () => {
    server = createServer(async (incoming, outgoing) => {
      const request = new Request(`http://${incoming.headers.host}${incoming.url}`, {
        method: "POST",
        headers: { "stripe-signature": String(incoming.headers["stripe-signature"] ?? "") },
        body: await buffer(incoming),
      });
      const answer = await postToRoute(request);
      answers.push(answer.status);
      outgoing.writeHead(answer.status).end(await answer.text());
    });
    await new Promise<void>((listening) => server?.listen(0, "127.0.0.1", listening));
    url = `http://127.0.0.1:${(server.address() as AddressInfo).port}/webhooks/payments`;
  });
  afterAll(() => new Promise((closed) => server?.close(closed)));
  return {
    get url() {
      return url;
    },
    answers,
  };
}

/** The route's action as the router would call it; it looks at the request alone. */
export const postToRoute = (request: Request): Promise<Response> =>
  action({ request } as Parameters<typeof action>[0]);
