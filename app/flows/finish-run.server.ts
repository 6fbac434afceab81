import { type Executor, transact } from "~/db/client.server";
import { mayDo, stageFromPieces } from "~/domain/orders";
import { recordEvent } from "~/models/events.server";
import { findSheet, listPiecesOnSheet } from "~/models/nests.server";
import { listPieces, movePieces } from "~/models/pieces.server";
import { findRun, markRunFinished } from "~/models/runs.server";
import { listStockGroups, releaseGroup } from "~/models/stock-groups.server";
import type { Actor } from "./actor";
import { changeStage } from "./change-stage.server";
import { takeMove } from "./move.server";
import { mailStage } from "./order-mails.server";
import { settleNest } from "./settle-nest.server";
import { answering, CHANGED, orRollBack, Refused, refuse, type Verdict } from "./verdict";

export interface FinishRunOptions {
  readonly actor: Actor;
  readonly runId: string;
  readonly version: number;
  /** What it took; left out, the time since it began. */
  readonly actualMinutes?: number | undefined;
  readonly now?: Date;
}

/** The sheet is cut: all good pieces on it are, and each of their orders follows. */
export async function finishRun(options: FinishRunOptions): Promise<Verdict<{ moved: number }>> {
  const { actor, runId, version, now = new Date() } = options;
  if (!mayDo(actor.roles, "schedule.edit")) return refuse("not-allowed", "Cutting is the operators' work.");
  return answering(() =>
    transact(async (tx) => {
      const run = await findRun(tx, runId);
      const found = run && (await findSheet(tx, run.sheetId));
      if (!run || !found) throw new Refused(refuse("not-found", "There is no such run."));
      if (run.finishedAt) throw new Refused(refuse("wrong-stage", "This run is finished already."));
      if (!run.startedAt) throw new Refused(refuse("wrong-stage", "Start the run first."));
      const actualMinutes = options.actualMinutes ?? (now.getTime() - run.startedAt.getTime()) / 60_000;
      if (!(actualMinutes >= 0)) throw new Refused(refuse("invalid", "Minutes are a number of 0 or more."));
      if (!(await markRunFinished(tx, { runId, version, at: now, actualMinutes })))
        throw new Refused(CHANGED);
      const waiting = (await listPiecesOnSheet(tx, run.sheetId)).filter(
        (piece) => piece.stage === "nested" && piece.state === "good",
      );
      for (const orderId of new Set(waiting.map((piece) => piece.orderId)))
        await cutOf(tx, actor, {
          orderId,
          ids: waiting.filter((piece) => piece.orderId === orderId).map((piece) => piece.id),
          sheet: `N-${found.nest.number} sheet ${found.sheet.number}`,
        });
      await settleNest(tx, found.nest.id);
      return { ok: true, moved: waiting.length };
    }),
  );
}

async function cutOf(
  tx: Executor,
  actor: Actor,
  cut: { orderId: string; ids: readonly string[]; sheet: string },
): Promise<void> {
  const taken = orRollBack(await takeMove(tx, "cut", { actor, orderId: cut.orderId, version: null }));
  if (taken.repeated) throw new Error("A run names no request.");
  const { order, role } = taken;
  await movePieces(tx, { ids: cut.ids, from: "nested", to: "cut" });
  const { order: after } = orRollBack(
    await changeStage(tx, {
      order,
      to: stageFromPieces(await listPieces(tx, order.id)) ?? order.stage,
      act: "cut",
      by: { id: actor.id, role },
      reason: cut.sheet,
      pieces: { ids: cut.ids, from: "nested", to: "cut" },
    }),
  );
  await recordEvent(tx, { orderId: order.id, kind: "run", data: { finished: true } });
  if (after.stage === order.stage) return;
  await mailStage(tx, { order: after, from: order.stage });
  if (after.stage === "cut" && after.revisionId !== null)
    for (const group of await listStockGroups(tx, after.id, after.revisionId)) await releaseGroup(tx, group);
}
