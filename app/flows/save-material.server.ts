import { transact } from "~/db/client.server";
import { mayDo } from "~/domain/orders";
import { recordAct } from "~/models/audit.server";
import type { Material } from "~/models/materials.server";
import {
  changeMaterial,
  findMaterial,
  findMaterialByCode,
  insertMaterial,
  type MaterialFields,
} from "~/models/stock.server";
import type { Actor } from "./actor";
import { changesOf } from "./changes";
import { STALE } from "./stale";
import { answering, Refused, refuse, type Verdict } from "./verdict";

export interface SaveMaterialOptions {
  readonly actor: Actor;
  /** Null for one that is new. */
  readonly material: { readonly id: string; readonly version: number } | null;
  readonly fields: MaterialFields;
}

/** Adds a material, or changes one. Quotes made before keep the facts they were made from. */
export async function saveMaterial(
  options: SaveMaterialOptions,
): Promise<Verdict<{ materialId: Material["id"] }>> {
  const { actor, material, fields } = options;
  if (!mayDo(actor.roles, "stock.edit"))
    return refuse("not-allowed", "The stock is the operators' and the owner's.");
  return answering(() =>
    transact(async (tx): Promise<Verdict<{ materialId: string }>> => {
      const namesake = await findMaterialByCode(tx, fields.code);
      if (namesake && namesake.id !== material?.id)
        throw new Refused(refuse("invalid", `${fields.code} is the code of ${namesake.name}.`));
      if (!material) {
        const added = await insertMaterial(tx, fields);
        if (!added) throw new Refused(STALE);
        await recordAct(tx, {
          actorId: actor.id,
          act: "material.add",
          subject: { kind: "material", id: added.id },
          detail: { code: added.code, changes: changesOf({}, fields) },
        });
        return { ok: true, materialId: added.id };
      }
      const was = await findMaterial(tx, material.id);
      if (!was) throw new Refused(refuse("not-found", "There is no such material."));
      if (!(await changeMaterial(tx, { ...material, change: fields }))) throw new Refused(STALE);
      const changes = changesOf(was, fields);
      if (Object.keys(changes).length > 0)
        await recordAct(tx, {
          actorId: actor.id,
          act: "material.change",
          subject: { kind: "material", id: was.id },
          detail: { code: was.code, changes },
        });
      return { ok: true, materialId: was.id };
    }),
  );
}
