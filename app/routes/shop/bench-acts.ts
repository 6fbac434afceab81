import { z } from "zod";
import { requireAct } from "~/auth/guards.server";
import { requireSameOrigin } from "~/auth/same-origin.server";
import { benchAct, benchActSchema } from "~/flows/bench-act.server";
import { REFUSAL_STATUS } from "~/flows/verdict";
import type { Route } from "./+types/bench-acts";
import { benchView } from "./bench-view.server";

const shownSchema = z.union([
  z.object({ orderId: z.string().min(1) }).strict(),
  z.object({ sheetId: z.string().min(1) }).strict(),
]);

/** The pieces of one order or sheet as they stand: what the bench's page asks for after each act. */
export async function loader(args: Route.LoaderArgs) {
  const person = await requireAct(args, "queue.read");
  const asked = shownSchema.safeParse(Object.fromEntries(new URL(args.request.url).searchParams));
  if (!asked.success) return Response.json({ words: "Which order, or which sheet?" }, { status: 400 });
  return Response.json(await benchView(asked.data, person));
}

/** One act of the bench, sent by its page as often as it takes to arrive; it is done once. */
export async function action(args: Route.ActionArgs) {
  const person = await requireAct(args, "piece.move");
  requireSameOrigin(args.request);
  const asked = benchActSchema.safeParse(await args.request.json().catch(() => undefined));
  if (!asked.success)
    return Response.json(
      { ok: false, reason: "invalid", words: z.prettifyError(asked.error) },
      { status: 400 },
    );
  const done = await benchAct(person, asked.data);
  return Response.json(done, { status: done.ok ? 200 : REFUSAL_STATUS[done.reason] });
}
