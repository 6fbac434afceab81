import type { z } from "zod";
import { requireApiAct, scopeOf } from "~/auth/guards.server";
import { db } from "~/db/client.server";
import { orderListQuerySchema, type orderPageSchema } from "~/documents/api/answers";
import { type OrderPlace, ordersBehind } from "~/models/order-list.server";
import type { Route } from "./+types/orders";
import { answer } from "./answer.server";
import { only } from "./methods.server";
import { addressOf, orderSummaries } from "./order-answers.server";

export const middleware: Route.MiddlewareFunction[] = [only("GET")];

/** `GET /api/orders`: the caller's orders, or all for the shop's people, newest first. */
export async function loader(args: Route.LoaderArgs) {
  const person = await requireApiAct(args, "order.read", "orders:read");
  const { searchParams } = new URL(args.request.url);
  const asked = orderListQuerySchema.safeParse(Object.fromEntries(searchParams));
  if (!asked.success) {
    const errors = asked.error.issues.map((issue) => ({
      name: issue.code === "unrecognized_keys" ? issue.keys.join(", ") : String(issue.path[0] ?? ""),
      words: issue.message,
    }));
    const detail = errors.map((error) => `${error.name}: ${error.words}.`).join(" ");
    return Response.json({ detail, errors }, { status: 422 });
  }
  const { stage, q, since, limit, cursor } = asked.data;
  const found = await ordersBehind(db, scopeOf(person), {
    stages: stage,
    words: q,
    changedSince: since === undefined ? undefined : new Date(since),
    after: cursor === undefined ? undefined : placeAt(cursor),
    limit: limit + 1,
  });
  const shown = found.slice(0, limit);
  const last = found.length > limit ? shown.at(-1) : undefined;
  if (last) searchParams.set("cursor", cursorAt(last));
  const next = last ? addressOf(`/api/orders?${searchParams}`) : null;
  const page: z.infer<typeof orderPageSchema> = { orders: await orderSummaries(shown, new Date()), next };
  return answer(page, next === null ? {} : { Link: `<${next}>; rel="next"` });
}

const cursorAt = ({ createdAt, id }: OrderPlace): string => `${createdAt.getTime()}.${id}`;

function placeAt(cursor: string): OrderPlace {
  const [at = "", id = ""] = cursor.split(".");
  return { createdAt: new Date(Number(at)), id };
}
