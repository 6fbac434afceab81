import { keepPreviousData, useQuery } from "@tanstack/react-query";
import type { Interpretation } from "~/domain/orders";
import type { Delivery } from "~/flows/quote-facts.server";
import type { PriceAnswer } from "~/routes/api/price";

export type ShownPrice = PriceAnswer | { readonly ok: false; readonly words: string };

interface PriceOptions {
  readonly orderId: string;
  /** Of the order's row: a price is asked anew when it changes. */
  readonly version: number;
  readonly content: Interpretation;
  readonly delivery: Delivery;
  /** What came with the page, for the choices that are saved. */
  readonly first: ShownPrice;
  readonly saved: Interpretation;
}

/** The price under the choices as they are now, saved or not; the one before stays while the next is on its way. */
export function usePrice(options: PriceOptions): { price: ShownPrice; stale: boolean } {
  const { orderId, version, content, delivery, first, saved } = options;
  const asked = JSON.stringify({ content, delivery });
  const isSaved = asked === JSON.stringify({ content: saved, delivery });
  const query = useQuery({
    queryKey: ["price", orderId, version, asked],
    queryFn: ({ signal }) => fetchPrice(orderId, asked, signal),
    placeholderData: keepPreviousData,
    staleTime: 60_000,
    ...(isSaved ? { initialData: first } : {}),
  });
  return { price: query.data ?? first, stale: query.isPlaceholderData || query.isFetching };
}

async function fetchPrice(orderId: string, asked: string, signal: AbortSignal): Promise<ShownPrice> {
  const response = await fetch(`/api/orders/${orderId}/price`, {
    method: "POST",
    headers: { "Content-Type": "application/json" },
    body: asked,
    signal,
  });
  const answer: unknown = await response.json().catch(() => null);
  if (isPrice(answer)) return answer;
  return {
    ok: false,
    words: "The price could not be worked out just now. It is asked for again at the next change.",
  };
}

const isPrice = (answer: unknown): answer is ShownPrice =>
  typeof answer === "object" && answer !== null && "ok" in answer && ("quote" in answer || "words" in answer);
