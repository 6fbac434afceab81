import { type Executor, transact } from "~/db/client.server";
import { mayDo, stageFromPieces } from "~/domain/orders";
import { recordAct } from "~/models/audit.server";
import { recordEvent } from "~/models/events.server";
import { findNestContent, releasePlacements, setNestStatus } from "~/models/nests.server";
import { findOrder } from "~/models/orders.server";
import { listPieces, movePieces } from "~/models/pieces.server";
import { removeRunsOfSheets } from "~/models/runs.server";
import { type Actor, roleOfActor } from "./actor";
import { changeStage } from "./change-stage.server";
import { answering, CHANGED, orRollBack, Refused, refuse, type Verdict } from "./verdict";

export interface DropNestOptions {
  readonly actor: Actor;
  readonly nestId: string;
  readonly version: number;
  readonly reason: string;
}

/** Takes a locked nest apart before anything of it is cut: its pieces wait for another. */
export async function dropNest(options: DropNestOptions): Promise<Verdict> {
  const { actor, nestId, version, reason } = options;
  if (!mayDo(actor.roles, "nest.edit")) return refuse("not-allowed", "Nesting is the operators' work.");
  if (reason.trim() === "") return refuse("incomplete", "Say why the nest is dropped.");
  return answering(() =>
    transact(async (tx) => {
      const content = await findNestContent(tx, nestId);
      if (!content) throw new Refused(refuse("not-found", "There is no such nest."));
      const { nest, sheets } = content;
      if (nest.status !== "locked")
        throw new Refused(
          refuse("wrong-stage", `Nest N-${nest.number} is ${nest.status}; it cannot be dropped.`),
        );
      if (!(await setNestStatus(tx, { nestId, version, status: "dropped" }))) throw new Refused(CHANGED);
      const placed = sheets.flatMap((sheet) => sheet.placements.map(({ piece }) => piece));
      await releasePlacements(
        tx,
        placed.map((piece) => piece.id),
      );
      await removeRunsOfSheets(
        tx,
        sheets.map((sheet) => sheet.id),
      );
      for (const orderId of new Set(placed.map((piece) => piece.orderId)))
        await sendBack(tx, {
          orderId,
          ids: placed
            .filter((piece) => piece.orderId === orderId && piece.stage === "nested")
            .map(({ id }) => id),
          options,
          nestNumber: nest.number,
        });
      await recordAct(tx, {
        actorId: actor.id,
        act: "nest.drop",
        subject: { kind: "nest", id: nest.id },
        detail: { reason, pieces: placed.length },
      });
      return { ok: true };
    }),
  );
}

async function sendBack(
  tx: Executor,
  back: { orderId: string; ids: readonly string[]; options: DropNestOptions; nestNumber: number },
): Promise<void> {
  const { actor, reason } = back.options;
  const order = await findOrder(tx, back.orderId, { kind: "staff" });
  if (!order) throw new Error(`Order ${back.orderId} is gone.`);
  await movePieces(tx, { ids: back.ids, from: "nested", to: "received" });
  const follows = stageFromPieces(await listPieces(tx, order.id)) ?? order.stage;
  /* A held order stays held, and goes on from where its pieces now stand. */
  const held = order.stage === "on-hold";
  orRollBack(
    await changeStage(tx, {
      order,
      to: held ? order.stage : follows,
      act: "drop-nest",
      by: { id: actor.id, role: roleOfActor(actor) },
      reason: `Nest N-${back.nestNumber}: ${reason}`,
      pieces: { ids: back.ids, from: "nested", to: "received" },
      ...(held ? { change: { heldFrom: follows } } : {}),
    }),
  );
  await recordEvent(tx, { orderId: order.id, kind: "nest", data: { dropped: back.nestNumber } });
}
