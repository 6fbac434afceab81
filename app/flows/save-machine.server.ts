import { transact } from "~/db/client.server";
import { mayDo } from "~/domain/orders";
import { recordAct } from "~/models/audit.server";
import {
  changeMachine,
  findAnyMachine,
  findMachineByName,
  insertMachine,
  type MachineFields,
} from "~/models/machines.server";
import type { Actor } from "./actor";
import { changesOf } from "./changes";
import { STALE } from "./stale";
import { answering, Refused, refuse, type Verdict } from "./verdict";

export interface SaveMachineOptions {
  readonly actor: Actor;
  /** Null for one that is new. */
  readonly machine: { readonly id: string; readonly version: number } | null;
  readonly fields: MachineFields;
}

/** A router with its bed, its speeds and its week. Dates promised from now on count with its hours. */
export async function saveMachine({ actor, machine, fields }: SaveMachineOptions): Promise<Verdict> {
  if (!mayDo(actor.roles, "machine.edit")) return refuse("not-allowed", "Machines are the owner's.");
  return answering(() =>
    transact(async (tx): Promise<Verdict> => {
      const namesake = await findMachineByName(tx, fields.name);
      if (namesake && namesake.id !== machine?.id)
        throw new Refused(refuse("invalid", `There is a machine ${fields.name} already.`));
      if (!machine) {
        const added = await insertMachine(tx, fields);
        await recordAct(tx, {
          actorId: actor.id,
          act: "machine.add",
          subject: { kind: "machine", id: added.id },
          detail: { name: added.name, changes: changesOf({}, fields) },
        });
        return { ok: true };
      }
      const was = await findAnyMachine(tx, machine.id);
      if (!was) throw new Refused(refuse("not-found", "There is no such machine."));
      if (!(await changeMachine(tx, { ...machine, change: fields }))) throw new Refused(STALE);
      const changes = changesOf(was, fields);
      if (Object.keys(changes).length > 0)
        await recordAct(tx, {
          actorId: actor.id,
          act: "machine.change",
          subject: { kind: "machine", id: was.id },
          detail: { name: was.name, changes },
        });
      return { ok: true };
    }),
  );
}
