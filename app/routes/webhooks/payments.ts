import { applyPaymentEvent } from "~/flows/apply-payment-event.server";
import { recordPaymentEvent } from "~/flows/record-payment-event.server";
import type { Route } from "./+types/payments";

/** Larger than any event that is taken here, small enough to be read whole. */
const MOST_BYTES = 256 * 1024;

/**
 * The payment service tells what happened. 400 for what is not signed by it; 500 when it could not be applied, so
 * that it is sent again; 200 otherwise, for what came before too.
 */
export async function action({ request }: Route.ActionArgs) {
  const rawBody = await readAtMost(request, MOST_BYTES);
  if (!rawBody) return new Response("Too large.", { status: 413 });
  const recorded = await recordPaymentEvent({ rawBody, signature: request.headers.get("stripe-signature") });
  if (!recorded.ok) return new Response(recorded.words, { status: 400 });
  try {
    const applied = await applyPaymentEvent(recorded.eventId);
    return applied.ok ? Response.json({ received: true }) : new Response(applied.words, { status: 500 });
  } catch (error) {
    console.error(`Payment event ${recorded.eventId} was not applied:`, error);
    return new Response("Not applied yet.", { status: 500 });
  }
}

/** Only what the payment service posts is answered here. */
export function loader() {
  return new Response("Post only.", { status: 405, headers: { Allow: "POST" } });
}

async function readAtMost(request: Request, limit: number): Promise<Uint8Array | undefined> {
  const chunks: Uint8Array[] = [];
  let size = 0;
  const reader = request.body?.getReader();
  for (let read = await reader?.read(); read && !read.done; read = await reader?.read()) {
    size += read.value.byteLength;
    if (size > limit) {
      await reader?.cancel();
      return undefined;
    }
    chunks.push(read.value);
  }
  return Buffer.concat(chunks);
}
