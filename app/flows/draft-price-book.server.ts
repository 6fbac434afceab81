import { type Executor, transact } from "~/db/client.server";
import { mayDo } from "~/domain/orders";
import { type PriceBook, priceBookSchema } from "~/domain/pricing";
import { recordAct } from "~/models/audit.server";
import {
  changeDraftPriceBook,
  deleteDraftPriceBook,
  findDraftPriceBook,
  findPublishedPriceBook,
  insertDraftPriceBook,
  type PriceBookVersion,
} from "~/models/price-books.server";
import type { Actor } from "./actor";
import { changesOf } from "./changes";
import { priceBookStamp } from "./price-book-stamp.server";
import { STALE } from "./stale";
import { answering, Refused, refuse, type Verdict } from "./verdict";

const OWNERS = refuse("not-allowed", "Prices are the owner's.");
const NO_DRAFT = refuse("not-found", "There is no draft of the price book.");

/** The draft as it was when it was looked at. Throws the refusal where it is gone or another. */
async function takeDraft(tx: Executor, stamp: string): Promise<PriceBookVersion> {
  const draft = await findDraftPriceBook(tx);
  if (!draft) throw new Refused(NO_DRAFT);
  if (priceBookStamp(draft) !== stamp) throw new Refused(STALE);
  return draft;
}

/** Begins a draft as a copy of the prices in force. There is one draft at most: a second start finds the first. */
export async function draftPriceBook({ actor }: { readonly actor: Actor }): Promise<Verdict> {
  if (!mayDo(actor.roles, "price-book.edit")) return OWNERS;
  return answering(() =>
    transact(async (tx): Promise<Verdict> => {
      if (await findDraftPriceBook(tx)) return { ok: true };
      const current = await findPublishedPriceBook(tx);
      if (!current) throw new Refused(refuse("not-found", "There is no price book to copy."));
      const draft = await insertDraftPriceBook(tx, { content: current.content, note: null, by: actor.id });
      await recordAct(tx, {
        actorId: actor.id,
        act: "price-book.draft",
        subject: { kind: "price-book", id: draft.id },
        detail: { number: draft.number, copyOf: current.number },
      });
      return { ok: true };
    }),
  );
}

export interface SaveDraftOptions {
  readonly actor: Actor;
  /** Of the draft as it was when its form was opened. */
  readonly stamp: string;
  readonly content: PriceBook;
  readonly note: string | null;
}

/** Writes other prices into the draft. */
export async function savePriceBookDraft(options: SaveDraftOptions): Promise<Verdict> {
  const { actor, stamp, note } = options;
  if (!mayDo(actor.roles, "price-book.edit")) return OWNERS;
  const content = priceBookSchema.parse(options.content);
  return answering(() =>
    transact(async (tx): Promise<Verdict> => {
      const draft = await takeDraft(tx, stamp);
      const changes = changesOf({ ...draft.content, note: draft.note }, { ...content, note });
      if (Object.keys(changes).length === 0) return { ok: true };
      await changeDraftPriceBook(tx, draft.id, { content, note });
      await recordAct(tx, {
        actorId: actor.id,
        act: "price-book.change",
        subject: { kind: "price-book", id: draft.id },
        detail: { number: draft.number, changes },
      });
      return { ok: true };
    }),
  );
}

/** Throws the draft away; the prices in force stay. */
export async function dropPriceBookDraft(options: {
  readonly actor: Actor;
  readonly stamp: string;
}): Promise<Verdict> {
  const { actor, stamp } = options;
  if (!mayDo(actor.roles, "price-book.edit")) return OWNERS;
  return answering(() =>
    transact(async (tx): Promise<Verdict> => {
      const draft = await takeDraft(tx, stamp);
      await deleteDraftPriceBook(tx, draft.id);
      await recordAct(tx, {
        actorId: actor.id,
        act: "price-book.drop",
        subject: { kind: "price-book", id: draft.id },
        detail: { number: draft.number },
      });
      return { ok: true };
    }),
  );
}
