import { z } from "zod";
import { requireOrder } from "~/auth/guards.server";
import { requireSameOrigin } from "~/auth/same-origin.server";
import { markThreadRead } from "~/flows/mark-read.server";
import { REFUSAL_STATUS } from "~/flows/verdict";
import type { Route } from "./+types/thread-read";
import { only } from "./methods.server";

export const middleware: Route.MiddlewareFunction[] = [only("POST")];

const readSchema = z.object({ messageId: z.string().min(1).max(64) });

/** `POST /api/orders/:orderId/messages/read` with `{ messageId }`: the person has read up to this message. */
export async function action(args: Route.ActionArgs) {
  const { request } = args;
  requireSameOrigin(request);
  const { order, person } = await requireOrder(args, "order.message", args.params.orderId);
  const read = readSchema.safeParse(await request.json().catch(() => undefined));
  if (!read.success) return Response.json({ ok: false, words: "Name the message." }, { status: 400 });
  const verdict = await markThreadRead({
    actor: person,
    orderId: order.id,
    messageId: read.data.messageId,
  });
  return verdict.ok
    ? Response.json({ ok: true })
    : Response.json({ ok: false, words: verdict.words }, { status: REFUSAL_STATUS[verdict.reason] });
}
