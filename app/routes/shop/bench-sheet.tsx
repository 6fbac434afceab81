import { data } from "react-router";
import { requireAct } from "~/auth/guards.server";
import { ErrorPanel } from "~/components/error-panel";
import { PageHeader } from "~/components/page-header";
import { BenchBoard } from "~/components/shipping/bench-board";
import { LabelsLinks } from "~/components/shipping/labels-links";
import { TextLink } from "~/components/text-link";
import { db } from "~/db/client.server";
import { findSheet } from "~/models/nests.server";
import type { Route } from "./+types/bench-sheet";
import { benchView } from "./bench-view.server";

export async function loader(args: Route.LoaderArgs) {
  const person = await requireAct(args, "queue.read");
  const found = await findSheet(db, args.params.sheetId);
  if (!found) throw data({ words: "There is no such sheet." }, { status: 404 });
  return {
    id: found.sheet.id,
    nestId: found.nest.id,
    name: `Nest ${found.nest.number}, sheet ${found.sheet.number}`,
    bench: await benchView({ sheetId: found.sheet.id }, person),
  };
}

export const meta: Route.MetaFunction = ({ loaderData }) => [
  { title: `Bench, ${loaderData?.name ?? "sheet"} · Kerfpost` },
];

export default function BenchSheet({ loaderData: sheet }: Route.ComponentProps) {
  const mixed = new Set(sheet.bench.pieces.map(({ orderId }) => orderId)).size > 1;
  return (
    <>
      <PageHeader
        eyebrow={
          <>
            <TextLink to="/shop/bench">Bench</TextLink> ·{" "}
            <TextLink to={`/shop/nest/${sheet.nestId}`}>nest</TextLink>
          </>
        }
        title={sheet.name}
        right={<LabelsLinks to={`/shop/sheets/${sheet.id}/labels.pdf`} />}
      />
      <BenchBoard of={{ sheetId: sheet.id }} bench={sheet.bench} mixed={mixed} />
    </>
  );
}

export function ErrorBoundary({ error }: Route.ErrorBoundaryProps) {
  return <ErrorPanel error={error} />;
}
