import { createHash } from "node:crypto";
import type { PriceBook } from "~/domain/pricing";

/** Tells one content of a draft from another: a change names the one it was written on. */
export const priceBookStamp = (draft: {
  readonly content: PriceBook;
  readonly note: string | null;
}): string =>
  createHash("sha256")
    .update(JSON.stringify([draft.content, draft.note]))
    .digest("hex")
    .slice(0, 32);
