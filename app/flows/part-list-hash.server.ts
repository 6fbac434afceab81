import { createHash } from "node:crypto";
import type { Executor } from "~/db/client.server";
import { canonicalJson } from "~/documents/canonical-json";
import type { Order } from "~/models/orders.server";
import { listParts, type PartRow } from "~/models/parts.server";

/**
 * What the builder approves, in one value: labels, names, counts, sizes and stock of the part list as shown. The
 * page sends the one it showed, and it must be that of the quote.
 */
export const partListHash = (quoteId: string, parts: readonly PartRow[]): string =>
  createHash("sha256")
    .update(
      canonicalJson({
        quoteId,
        parts: parts.map(({ label, name, quantity, width, height, holes, stockGroupId, grain }) => ({
          label,
          name,
          quantity,
          width,
          height,
          holes,
          stockGroupId,
          grain,
        })),
      }),
    )
    .digest("hex");

/** Of the part list of an order's current quote. Throws while it has none. */
export async function listHashOfOrder(
  executor: Executor,
  { quoteId, revisionId }: Pick<Order, "quoteId" | "revisionId">,
): Promise<string> {
  if (quoteId === null || revisionId === null) throw new Error("The order has no quote.");
  return partListHash(quoteId, await listParts(executor, revisionId));
}
