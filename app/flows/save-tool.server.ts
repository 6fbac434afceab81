import { transact } from "~/db/client.server";
import { mayDo } from "~/domain/orders";
import { recordAct } from "~/models/audit.server";
import { changeTool, findTool, findToolByNumber, insertTool, type ToolFields } from "~/models/tools.server";
import type { Actor } from "./actor";
import { changesOf } from "./changes";
import { STALE } from "./stale";
import { answering, Refused, refuse, type Verdict } from "./verdict";

export interface SaveToolOptions {
  readonly actor: Actor;
  /** Null for one that is new. */
  readonly tool: { readonly id: string; readonly version: number } | null;
  readonly fields: ToolFields;
}

/** A tool in the changer, with the diameter it was last measured at. */
export async function saveTool({ actor, tool, fields }: SaveToolOptions): Promise<Verdict> {
  if (!mayDo(actor.roles, "machine.edit")) return refuse("not-allowed", "Tools are the owner's.");
  return answering(() =>
    transact(async (tx): Promise<Verdict> => {
      const namesake = await findToolByNumber(tx, fields.number);
      if (namesake && namesake.id !== tool?.id)
        throw new Refused(refuse("invalid", `T${fields.number} is ${namesake.name}.`));
      if (!tool) {
        const added = await insertTool(tx, fields);
        await recordAct(tx, {
          actorId: actor.id,
          act: "tool.add",
          subject: { kind: "tool", id: added.id },
          detail: { name: added.name, changes: changesOf({}, fields) },
        });
        return { ok: true };
      }
      const was = await findTool(tx, tool.id);
      if (!was) throw new Refused(refuse("not-found", "There is no such tool."));
      if (!(await changeTool(tx, { ...tool, change: fields }))) throw new Refused(STALE);
      const changes = changesOf(was, fields);
      if (Object.keys(changes).length > 0)
        await recordAct(tx, {
          actorId: actor.id,
          act: "tool.change",
          subject: { kind: "tool", id: was.id },
          detail: { name: was.name, changes },
        });
      return { ok: true };
    }),
  );
}
