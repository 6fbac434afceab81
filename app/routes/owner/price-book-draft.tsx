import { parseWithZod } from "@conform-to/zod/v4";
import { data, redirect } from "react-router";
import { requireAct } from "~/auth/guards.server";
import { ActForm } from "~/components/act-form";
import { ConfirmButton } from "~/components/confirm-button";
import { Notice } from "~/components/notice";
import { PriceBookForm } from "~/components/owner/price-book-form";
import { priceBookFormOf, priceBookFormSchema, priceBookOf } from "~/components/owner/price-book-schema";
import { TrialList } from "~/components/owner/trial-list";
import { PageHeader } from "~/components/page-header";
import { Sheet } from "~/components/sheet";
import { TextLink } from "~/components/text-link";
import { db } from "~/db/client.server";
import { dropPriceBookDraft, savePriceBookDraft } from "~/flows/draft-price-book.server";
import { priceBookStamp } from "~/flows/price-book-stamp.server";
import { publishPriceBook } from "~/flows/publish-price-book.server";
import { tryPriceBook } from "~/flows/try-price-book.server";
import { REFUSAL_STATUS, type Verdict } from "~/flows/verdict";
import { findDraftPriceBook, findPublishedPriceBook } from "~/models/price-books.server";
import type { Route } from "./+types/price-book-draft";

export async function loader(args: Route.LoaderArgs) {
  await requireAct(args, "price-book.edit");
  const draft = await findDraftPriceBook(db);
  if (!draft) throw redirect("/owner/price-book");
  const current = await findPublishedPriceBook(db);
  const stamp = priceBookStamp(draft);
  return {
    number: draft.number,
    current: current?.number ?? null,
    stamp,
    values: priceBookFormOf(draft.content, draft.note, stamp),
    tried: (await tryPriceBook(draft.content)).map(({ quote, repriced }) => ({
      id: quote.id,
      orderId: quote.orderId,
      reference: quote.reference,
      orderName: quote.orderName,
      number: quote.number,
      bookNumber: quote.bookNumber,
      repriced,
    })),
  };
}

export async function action(args: Route.ActionArgs) {
  const actor = await requireAct(args, "price-book.edit");
  const sent = await args.request.formData();
  const intent = sent.get("intent");
  if (intent === "publish" || intent === "drop") {
    const stamp = String(sent.get("stamp"));
    const done: Verdict =
      intent === "publish"
        ? await publishPriceBook({ actor, stamp })
        : await dropPriceBookDraft({ actor, stamp });
    if (!done.ok) return data({ words: done.words, result: null }, { status: REFUSAL_STATUS[done.reason] });
    throw redirect("/owner/price-book");
  }
  const submission = parseWithZod(sent, { schema: priceBookFormSchema });
  if (submission.status !== "success")
    return data({ words: null, result: submission.reply() }, { status: 400 });
  const { stamp, note } = submission.value;
  const saved = await savePriceBookDraft({
    actor,
    stamp,
    content: priceBookOf(submission.value),
    note: note ?? null,
  });
  if (!saved.ok)
    return data(
      { words: null, result: submission.reply({ formErrors: [saved.words] }) },
      { status: REFUSAL_STATUS[saved.reason] },
    );
  throw redirect("/owner/price-book/draft");
}

export const meta: Route.MetaFunction = () => [{ title: "Draft of the price book · Kerfpost" }];

export default function PriceBookDraft({ loaderData, actionData }: Route.ComponentProps) {
  const { number, current, stamp, values, tried } = loaderData;
  return (
    <>
      <PageHeader
        eyebrow={<TextLink to="/owner/price-book">Price book</TextLink>}
        title={`Draft of version ${number}`}
        lead="Nothing here is in force until it is published. Save the draft to see what it does to the last orders."
        right={
          <>
            <ActForm intent="publish" fields={{ stamp }}>
              {(pending) => (
                <ConfirmButton
                  label={`Publish version ${number}`}
                  question={`Quotes made from now on use version ${number}. Quotes that stand keep ${current === null ? "theirs" : `version ${current} or whichever they were made on`}.`}
                  confirm={`Publish version ${number}`}
                  variant="primary"
                  pending={pending}
                />
              )}
            </ActForm>
            <ActForm intent="drop" fields={{ stamp }}>
              {(pending) => (
                <ConfirmButton
                  label="Throw the draft away"
                  question="What was written in it is gone; the prices in force stay."
                  confirm="Throw it away"
                  variant="quiet"
                  pending={pending}
                />
              )}
            </ActForm>
          </>
        }
      />
      {actionData?.words && <Notice live>{actionData.words}</Notice>}
      <TrialList tried={tried} />
      <Sheet padded>
        <PriceBookForm key={stamp} values={values} stamp={stamp} lastResult={actionData?.result} />
      </Sheet>
    </>
  );
}
