import { requireAct } from "~/auth/guards.server";
import type { Route } from "./+types/sheet-labels";
import { printLabels } from "./print-labels.server";

/** Labels of everything on a sheet, whosever it is. */
export async function loader(args: Route.LoaderArgs) {
  await requireAct(args, "queue.read");
  return printLabels(args.url, { sheetId: args.params.sheetId });
}
