import { type Executor, transact } from "~/db/client.server";
import { type Act, mayDo } from "~/domain/orders";
import { recordAct } from "~/models/audit.server";
import { changeMachine, countOpenRuns, findAnyMachine } from "~/models/machines.server";
import { findLot } from "~/models/materials.server";
import { changeLot, changeMaterial, findMaterial } from "~/models/stock.server";
import { changeTool, findTool } from "~/models/tools.server";
import type { Actor } from "./actor";
import { STALE } from "./stale";
import { answering, Refused, refuse, type Verdict } from "./verdict";

export type Retirable = "material" | "lot" | "tool" | "machine";

export interface RetireOptions {
  readonly actor: Actor;
  readonly kind: Retirable;
  readonly id: string;
  readonly version: number;
  /** True puts it in use again. */
  readonly active: boolean;
}

interface Thing {
  readonly name: string;
  readonly active: boolean;
  /** What still needs it; null when nothing does. */
  readonly inUse: string | null;
  readonly change: () => Promise<boolean>;
}

const ACTS: Readonly<Record<Retirable, Act>> = {
  material: "stock.edit",
  lot: "stock.edit",
  tool: "machine.edit",
  machine: "machine.edit",
};

/** Takes something out of use, or back into it. It is never deleted: old orders name it. */
export async function retire(options: RetireOptions): Promise<Verdict> {
  const { actor, kind, id, active } = options;
  if (!mayDo(actor.roles, ACTS[kind])) return refuse("not-allowed", "This is not yours to change.");
  return answering(() =>
    transact(async (tx): Promise<Verdict> => {
      const thing = await find(tx, options);
      if (!thing) throw new Refused(refuse("not-found", `There is no such ${kind}.`));
      if (thing.active === active) return { ok: true };
      if (!active && thing.inUse) throw new Refused(refuse("wrong-stage", thing.inUse));
      if (!(await thing.change())) throw new Refused(STALE);
      await recordAct(tx, {
        actorId: actor.id,
        act: active ? `${kind}.restore` : `${kind}.retire`,
        subject: { kind, id },
        detail: { name: thing.name },
      });
      return { ok: true };
    }),
  );
}

async function find(tx: Executor, { kind, ...asked }: RetireOptions): Promise<Thing | null> {
  const { id, version, active } = asked;
  const change = { id, version, change: { active } };
  if (kind === "material") {
    const row = await findMaterial(tx, id);
    return row
      ? { name: row.code, active: row.active, inUse: null, change: () => changeMaterial(tx, change) }
      : null;
  }
  if (kind === "tool") {
    const row = await findTool(tx, id);
    return row
      ? { name: row.name, active: row.active, inUse: null, change: () => changeTool(tx, change) }
      : null;
  }
  if (kind === "lot") {
    const row = await findLot(tx, id);
    if (!row) return null;
    const inUse =
      row.sheetsReserved > 0
        ? `${row.sheetsReserved} sheets of ${row.code} are reserved for orders. It goes when they are cut or moved.`
        : null;
    return { name: row.code, active: row.active, inUse, change: () => changeLot(tx, change) };
  }
  const row = await findAnyMachine(tx, id);
  if (!row) return null;
  const open = await countOpenRuns(tx, id);
  const inUse =
    open > 0
      ? `${row.name} has ${open === 1 ? "a sheet" : `${open} sheets`} on its days. Move them to another machine first.`
      : null;
  return { name: row.name, active: row.active, inUse, change: () => changeMachine(tx, change) };
}
