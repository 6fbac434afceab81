import { data, Link } from "react-router";
import { z } from "zod";
import { requireAct } from "~/auth/guards.server";
import { ActForm, ActNotice } from "~/components/act-form";
import { Beside } from "~/components/beside";
import { ButtonLink } from "~/components/button-link";
import { ConfirmButton } from "~/components/confirm-button";
import { DateTime } from "~/components/date-time";
import { DefinitionList } from "~/components/definition-list";
import { ErrorPanel } from "~/components/error-panel";
import { plainField } from "~/components/field";
import { Measure } from "~/components/measure";
import { HeaderFact, PageHeader } from "~/components/page-header";
import { Rail, RailSection } from "~/components/rail";
import { seenAnew } from "~/components/seen-anew";
import { Sheet } from "~/components/sheet";
import { SheetViewer } from "~/components/sheet-viewer/sheet-viewer";
import { NestOrdersList } from "~/components/shop/nest-orders-list";
import { TextField } from "~/components/text-field";
import { TextLink } from "~/components/text-link";
import { shownDay } from "~/domain/scheduling";
import { formatMinutes } from "~/domain/units";
import { dropNest } from "~/flows/drop-nest.server";
import { dispatchAct, formAct } from "../dispatch-act.server";
import type { Route } from "./+types/nest";
import { nestView } from "./nest-view.server";

const dropSchema = z.object({
  version: z.coerce.number().int(),
  reason: z
    .string({ error: "Say why it is dropped." })
    .trim()
    .min(3, "Say why it is dropped, in a few words.")
    .max(500),
});

export async function loader(args: Route.LoaderArgs) {
  await requireAct(args, "nest.edit");
  const nest = await nestView(args.params.nestId);
  if (!nest) throw data({ words: "There is no such nest." }, { status: 404 });
  return nest;
}

export async function action(args: Route.ActionArgs) {
  const person = await requireAct(args, "nest.edit");
  return dispatchAct(await args.request.formData(), {
    drop: formAct(dropSchema, async (drop) => {
      const verdict = await dropNest({ actor: person, nestId: args.params.nestId, ...drop });
      return verdict.ok ? { ok: true, words: "Dropped: its pieces wait for another nest." } : verdict;
    }),
  });
}

export const shouldRevalidate = seenAnew;

export const meta: Route.MetaFunction = ({ loaderData }) => [
  {
    title: `${loaderData && typeof loaderData === "object" && "number" in loaderData ? `N-${loaderData.number}` : "Nest"} · Kerfpost`,
  },
];

export default function Nest({ loaderData: nest, actionData }: Route.ComponentProps) {
  const { stock, sheets } = nest;
  return (
    <>
      <PageHeader
        eyebrow={
          <>
            <TextLink to="/shop/nest">Nest desk</TextLink> · {stock.name}
            {stock.lot && ` · lot ${stock.lot}`}
            {stock.thickness && (
              <>
                {" "}
                · <Measure length={stock.thickness.min} digits={2} bare />–
                <Measure length={stock.thickness.max} digits={2} />
              </>
            )}
          </>
        }
        title={`Nest N-${nest.number}`}
        right={<HeaderFact label="stands">{nest.status}</HeaderFact>}
      />
      <ActNotice reply={actionData} />
      <Beside
        main={
          <div className="space-y-5">
            {sheets.map(({ id, number, status, run, view }) => (
              <Sheet key={id} label={`Sheet ${number} of ${sheets.length}`}>
                <h2 className="flex flex-wrap justify-between gap-x-4 border-b border-line px-4 py-2 text-small font-semibold">
                  <span>
                    Sheet {number} of {sheets.length}
                  </span>
                  <span className="measure font-normal text-soft">
                    {status}
                    {run && `, ${shownDay(run.day)}`}
                    {run?.actualMinutes != null && `, took ${formatMinutes(run.actualMinutes)}`}
                  </span>
                </h2>
                {view && <SheetViewer sheet={view} label={`Sheet ${number} of ${sheets.length}`} />}
                {status === "planned" && !run && (
                  <p className="border-t border-line px-4 py-2 text-small">
                    <Link
                      to={`/shop/schedule?sheet=${id}`}
                      className="text-blue underline underline-offset-2"
                    >
                      Schedule this sheet
                    </Link>
                  </p>
                )}
              </Sheet>
            ))}
          </div>
        }
        rail={<NestRail nest={nest} />}
      />
    </>
  );
}

function NestRail({ nest }: { readonly nest: Route.ComponentProps["loaderData"] }) {
  const minutes = nest.sheets.reduce((total, { view }) => total + (view?.minutes ?? 0), 0);
  return (
    <Rail label="This nest">
      {nest.orders.length > 0 ? (
        <NestOrdersList orders={nest.orders} />
      ) : (
        <RailSection title="Empty">
          <p className="text-soft">No piece lies on it any more.</p>
        </RailSection>
      )}
      <RailSection
        title="Sheets"
        note={<span className="text-price text-ink">{nest.sheets.length}</span>}
        measured
      >
        <DefinitionList
          items={[
            { term: "Router, as estimated", value: formatMinutes(minutes) },
            ...(nest.lockedAt
              ? [
                  {
                    term: "Locked",
                    value: <DateTime at={nest.lockedAt} show="day-time" />,
                    note: nest.lockedBy,
                  },
                ]
              : []),
          ]}
        />
        <div className="mt-3 space-y-3">
          {nest.status === "locked" && (
            <>
              <ButtonLink to="/shop/schedule" variant="primary" wide>
                Schedule its sheets
              </ButtonLink>
              <ActForm intent="drop" fields={{ version: nest.version }}>
                {(pending) => (
                  <ConfirmButton
                    label="Drop the nest"
                    question="All its pieces wait for another nest; its runs leave the schedule."
                    confirm="Drop it"
                    variant="plain"
                    pending={pending}
                  >
                    <TextField
                      field={plainField("reason", { id: "drop-reason", required: true })}
                      label="Why it is dropped"
                      minLength={3}
                      maxLength={500}
                    />
                  </ConfirmButton>
                )}
              </ActForm>
            </>
          )}
        </div>
      </RailSection>
    </Rail>
  );
}

export function ErrorBoundary({ error }: Route.ErrorBoundaryProps) {
  return <ErrorPanel error={error} />;
}
