import type { Executor } from "~/db/client.server";
import { type FormaldehydeLine, formaldehydeLine } from "~/domain/shipping";
import { listStageMoves } from "~/models/stage-moves.server";
import type { StockedGroup } from "~/models/stock-groups.server";

/** The month the order's pieces last came off the router, in the shop's zone: `December 2026`. */
export async function monthMade(
  executor: Executor,
  orderId: string,
  timeZone: string,
): Promise<string | null> {
  const moves = await listStageMoves(executor, orderId);
  const undone = new Set(moves.map(({ undoes }) => undoes));
  const cut = moves.findLast(({ id, act }) => act === "cut" && !undone.has(id));
  return cut ? cut.createdAt.toLocaleDateString("en-US", { month: "long", year: "numeric", timeZone }) : null;
}

/** The formaldehyde line for a box holding parts of these stocks. */
export const lineForBox = (
  groups: readonly StockedGroup[],
  maker: string,
  made: string | null,
): FormaldehydeLine =>
  made === null
    ? { line: null, missing: [] }
    : formaldehydeLine(
        groups.map(({ material, lot }) => ({
          kind: material.kind,
          lot: lot?.code ?? null,
          document: lot?.supplierDocument ?? null,
        })),
        maker,
        made,
      );
