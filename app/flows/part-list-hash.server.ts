import { createHash } from "node:crypto";
import { canonicalJson } from "~/documents/canonical-json";
import type { PartRow } from "~/models/parts.server";

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
