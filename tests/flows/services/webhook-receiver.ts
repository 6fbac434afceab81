/** A receiver of payment events for tests: keeps raw bodies and signatures, answers as told. */
import { listen, readBody, send } from "~fakes/local-server";

export interface ReceivedEvent {
  body: string;
  signature: string;
  id: string;
  type: string;
}

/** Starts a receiver on a free port; `answerNext` sets the statuses of the next answers, 200 after them. */
export async function startReceiver() {
  const received: ReceivedEvent[] = [];
  const statuses: number[] = [];
  const server = await listen(
    async (request, response) => {
      const body = await readBody(request);
      const { id, type } = JSON.parse(body) as { id: string; type: string };
      received.push({ body, signature: request.headers["stripe-signature"]?.toString() ?? "", id, type });
      send(response, statuses.shift() ?? 200, "text/plain", "");
    },
    { port: 0 },
  );
  return {
    ...server,
    received,
    answerNext: (...next: number[]) => {
      statuses.push(...next);
    },
  };
}
