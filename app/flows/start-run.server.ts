import { transact } from "~/db/client.server";
import { mayDo } from "~/domain/orders";
import { recordEvent } from "~/models/events.server";
import { findSheet, listPiecesOnSheet } from "~/models/nests.server";
import { findRun, markRunStarted } from "~/models/runs.server";
import type { Actor } from "./actor";
import { settleNest } from "./settle-nest.server";
import { answering, CHANGED, Refused, refuse, type Verdict } from "./verdict";

export interface StartRunOptions {
  readonly actor: Actor;
  readonly runId: string;
  readonly version: number;
  readonly now?: Date;
}

/** The sheet lies on the machine and is being cut. */
export async function startRun({
  actor,
  runId,
  version,
  now = new Date(),
}: StartRunOptions): Promise<Verdict> {
  if (!mayDo(actor.roles, "schedule.edit")) return refuse("not-allowed", "Cutting is the operators' work.");
  return answering(() =>
    transact(async (tx) => {
      const run = await findRun(tx, runId);
      const found = run && (await findSheet(tx, run.sheetId));
      if (!run || !found) throw new Refused(refuse("not-found", "There is no such run."));
      if (run.startedAt) throw new Refused(refuse("wrong-stage", "This run has begun already."));
      if (!(await markRunStarted(tx, { runId, version, at: now, by: actor.id }))) throw new Refused(CHANGED);
      await settleNest(tx, found.nest.id);
      const orderIds = new Set((await listPiecesOnSheet(tx, run.sheetId)).map((piece) => piece.orderId));
      for (const orderId of orderIds)
        await recordEvent(tx, { orderId, kind: "run", data: { started: true } });
      return { ok: true };
    }),
  );
}
