import { transact } from "~/db/client.server";
import { mayDo } from "~/domain/orders";
import { recordAct } from "~/models/audit.server";
import { findDraftPriceBook, findPublishedPriceBook, putDraftInForce } from "~/models/price-books.server";
import type { Actor } from "./actor";
import { changesOf } from "./changes";
import { priceBookStamp } from "./price-book-stamp.server";
import { STALE } from "./stale";
import { answering, Refused, refuse, type Verdict } from "./verdict";

export interface PublishOptions {
  readonly actor: Actor;
  /** Of the draft whose effect was looked at. */
  readonly stamp: string;
  readonly now?: Date;
}

/** The draft comes into force for quotes from now on. Quotes that stand keep the version they were made on. */
export async function publishPriceBook(options: PublishOptions): Promise<Verdict<{ number: number }>> {
  const { actor, stamp, now = new Date() } = options;
  if (!mayDo(actor.roles, "price-book.edit")) return refuse("not-allowed", "Prices are the owner's.");
  return answering(() =>
    transact(async (tx): Promise<Verdict<{ number: number }>> => {
      const draft = await findDraftPriceBook(tx);
      if (!draft) throw new Refused(refuse("not-found", "There is no draft of the price book."));
      if (priceBookStamp(draft) !== stamp) throw new Refused(STALE);
      const current = await findPublishedPriceBook(tx);
      await putDraftInForce(tx, draft.id, now);
      await recordAct(tx, {
        actorId: actor.id,
        act: "price-book.publish",
        subject: { kind: "price-book", id: draft.id },
        detail: {
          number: draft.number,
          instead: current?.number ?? null,
          changes: changesOf(current?.content ?? {}, draft.content),
        },
      });
      return { ok: true, number: draft.number };
    }),
  );
}
