import type { Executor } from "~/db/client.server";
import type { Lot } from "~/models/materials.server";
import { takeSheets } from "~/models/materials.server";
import {
  findNestContent,
  type Nest,
  type NestContent,
  setNestStatus,
  setSheetStatus,
} from "~/models/nests.server";
import { findRunOfSheet, removeRunsOfSheets } from "~/models/runs.server";

type Sheet = NestContent["sheets"][number];

/**
 * Brings a nest and its sheets to what their pieces and runs say: a sheet is cut when no piece on it waits for the
 * router, and is not to be cut when no piece is left on it. A sheet leaves its lot when it is cut.
 */
export async function settleNest(tx: Executor, nestId: string): Promise<void> {
  const content = await findNestContent(tx, nestId);
  if (!content) return;
  const statuses: Sheet["status"][] = [];
  for (const sheet of content.sheets) {
    const status = await statusOf(tx, sheet);
    statuses.push(status);
    if (status === sheet.status) continue;
    await setSheetStatus(tx, sheet.id, status);
    if (status === "rejected") await removeRunsOfSheets(tx, [sheet.id]);
    if (content.lot) await countSheet(tx, content.lot, sheet.status, status);
  }
  const { nest } = content;
  const status = nestStatusOf(statuses);
  if (status !== nest.status) await setNestStatus(tx, { nestId: nest.id, version: nest.version, status });
}

async function statusOf(tx: Executor, sheet: Sheet): Promise<Sheet["status"]> {
  const onIt = sheet.placements.map(({ piece }) => piece);
  if (onIt.length === 0) return sheet.status === "cut" ? "cut" : "rejected";
  if (!onIt.some((piece) => piece.stage === "nested" && piece.state === "good")) return "cut";
  const run = await findRunOfSheet(tx, sheet.id);
  return run?.startedAt && !run.finishedAt ? "cutting" : "planned";
}

function nestStatusOf(sheets: readonly Sheet["status"][]): Nest["status"] {
  if (sheets.every((status) => status === "rejected")) return "dropped";
  if (sheets.every((status) => status === "rejected" || status === "cut")) return "done";
  return sheets.some((status) => status === "cut" || status === "cutting") ? "cutting" : "locked";
}

async function countSheet(tx: Executor, lot: Lot, was: Sheet["status"], is: Sheet["status"]): Promise<void> {
  if (is === "cut") await takeSheets(tx, lot.id, 1);
  else if (was === "cut") await takeSheets(tx, lot.id, -1);
}
