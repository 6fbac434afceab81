import { useFetcher } from "react-router";
import type { ActReply } from "~/routes/builder/order-acts.server";
import type { OrderAct } from "./order-acts";

/** One form of an order's page: sent without leaving the page, its answer kept beside it. */
export function useAct(intent: OrderAct, about = "") {
  const fetcher = useFetcher<ActReply>({ key: `${intent} ${about}` });
  const reply = fetcher.state === "idle" ? fetcher.data : undefined;
  const failed = reply && !reply.ok ? reply : null;
  return {
    Form: fetcher.Form,
    submit: fetcher.submit,
    pending: fetcher.state !== "idle",
    done: reply?.ok ?? false,
    refusal: failed?.refusal ?? null,
    result: failed?.result ?? null,
  };
}
