import { data, redirect } from "react-router";
import { requireAct } from "~/auth/guards.server";
import { ActForm } from "~/components/act-form";
import { Button } from "~/components/button";
import { ButtonLink } from "~/components/button-link";
import { DateTime } from "~/components/date-time";
import { EmptyState } from "~/components/empty-state";
import { Notice } from "~/components/notice";
import { PriceDocument } from "~/components/owner/price-document";
import { PageHeader } from "~/components/page-header";
import { Rail, RailSection } from "~/components/rail";
import { Sheet } from "~/components/sheet";
import { db } from "~/db/client.server";
import { draftPriceBook } from "~/flows/draft-price-book.server";
import { REFUSAL_STATUS } from "~/flows/verdict";
import { findNames } from "~/models/people.server";
import { listPriceBooks } from "~/models/price-books.server";
import type { Route } from "./+types/price-book";

/** Versions that stand beside the current one. */
const BESIDE = 2;

export async function loader(args: Route.LoaderArgs) {
  await requireAct(args, "price-book.edit");
  const versions = await listPriceBooks(db);
  const names = await findNames(
    db,
    versions.flatMap(({ createdBy }) => (createdBy === null ? [] : [createdBy])),
  );
  return {
    versions: versions.map(({ id, number, status, note, content, createdBy, publishedAt }) => ({
      id,
      number,
      status,
      note,
      content,
      by: createdBy === null ? null : (names.get(createdBy) ?? null),
      publishedAt,
    })),
  };
}

export async function action(args: Route.ActionArgs) {
  const actor = await requireAct(args, "price-book.edit");
  const drafted = await draftPriceBook({ actor });
  if (!drafted.ok) return data({ words: drafted.words }, { status: REFUSAL_STATUS[drafted.reason] });
  throw redirect("/owner/price-book/draft");
}

export const meta: Route.MetaFunction = () => [{ title: "Price book · Kerfpost" }];

export default function PriceBookPage({ loaderData, actionData }: Route.ComponentProps) {
  const { versions } = loaderData;
  const current = versions.find(({ status }) => status === "published");
  const draft = versions.find(({ status }) => status === "draft");
  const earlier = versions.filter(({ status }) => status === "superseded").slice(0, BESIDE);
  const columns = [...(draft ? [draft] : []), ...(current ? [current] : []), ...earlier];
  return (
    <>
      <PageHeader
        eyebrow={current && `version ${current.number}`}
        title="Price book"
        lead={
          current?.publishedAt && (
            <>
              In force since <DateTime at={current.publishedAt} show="full" />. Quotes keep the version they
              were made on.
            </>
          )
        }
        right={
          draft ? (
            <ButtonLink to="/owner/price-book/draft" variant="primary">
              Go on with draft {draft.number}
            </ButtonLink>
          ) : (
            <ActForm intent="draft" fields={{}}>
              {(pending) => (
                <Button variant="primary" pending={pending}>
                  Draft other prices
                </Button>
              )}
            </ActForm>
          )
        }
      />
      {actionData?.words && <Notice live>{actionData.words}</Notice>}
      {columns.length === 0 ? (
        <EmptyState place>No prices yet: nothing can be quoted.</EmptyState>
      ) : (
        <Sheet padded>
          <PriceDocument versions={columns} />
        </Sheet>
      )}
      <Rail label="Versions">
        {versions.map(({ id, number, status, note, by, publishedAt }) => (
          <RailSection
            key={id}
            title={`Version ${number}`}
            note={status === "draft" ? "draft" : publishedAt && <DateTime at={publishedAt} show="full" />}
          >
            <p>{note ?? <span className="text-soft">no note</span>}</p>
            <p className="text-caption text-soft">
              {status === "published" ? "in force" : status === "draft" ? "not in force" : "superseded"}
              {by && `, by ${by}`}
            </p>
          </RailSection>
        ))}
      </Rail>
    </>
  );
}
