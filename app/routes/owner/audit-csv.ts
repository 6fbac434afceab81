import { requireAct } from "~/auth/guards.server";
import { db } from "~/db/client.server";
import { csvOf } from "~/documents/csv";
import { pageOfAudit } from "~/models/audit-list.server";
import { currentSettings } from "~/models/settings.server";
import type { Route } from "./+types/audit-csv";
import { auditFilterOf, auditSearchOf } from "./audit-search.server";

/** More than this is asked for by day. */
const MOST_ROWS = 20_000;

const HEAD = [
  "at",
  "person",
  "person id",
  "role",
  "act",
  "subject",
  "subject id",
  "order",
  "reason",
  "detail",
];

/** The entries that the page's filters show, all pages of them. */
export async function loader(args: Route.LoaderArgs): Promise<Response> {
  await requireAct(args, "audit.read");
  const filter = auditFilterOf(args.url.searchParams);
  const { timeZone } = (await currentSettings(db)).shop;
  const { rows } = await pageOfAudit(db, auditSearchOf({ ...filter, page: 1 }, timeZone, MOST_ROWS));
  const lines = rows.map((row) => [
    row.at.toISOString(),
    row.actor ?? "",
    row.actorId ?? "system",
    row.role ?? "",
    row.act,
    row.subjectKind,
    row.subjectId,
    row.reference ?? "",
    row.reason ?? "",
    JSON.stringify(row.detail),
  ]);
  return new Response(csvOf([HEAD, ...lines]), {
    headers: {
      "Content-Type": "text/csv; charset=utf-8",
      "Content-Disposition": 'attachment; filename="kerfpost-audit.csv"',
      "Cache-Control": "private, no-store",
    },
  });
}
