import { transact } from "~/db/client.server";
import { measureStack, type ThicknessReading } from "~/domain/fit";
import { mayDo } from "~/domain/orders";
import { recordAct } from "~/models/audit.server";
import {
  findLotByCode,
  findMaterial,
  insertLot,
  insertReadings,
  type LotFields,
} from "~/models/stock.server";
import type { Actor } from "./actor";
import { answering, Refused, refuse, type Verdict } from "./verdict";

export interface AddLotOptions {
  readonly actor: Actor;
  readonly materialId: string;
  readonly fields: LotFields;
  readonly readings: readonly ThicknessReading[];
  readonly now?: Date;
}

/** A stack comes in: it is measured before anything is cut from it, and its figures are its readings'. */
export async function addLot(options: AddLotOptions): Promise<Verdict<{ lotId: string }>> {
  const { actor, materialId, fields, readings, now = new Date() } = options;
  if (!mayDo(actor.roles, "stock.edit"))
    return refuse("not-allowed", "The stock is the operators' and the owner's.");
  const measured = measureStack(readings);
  if (!measured.ok) return refuse("invalid", measured.reason);
  const { min, mean, max } = measured.thickness;
  return answering(() =>
    transact(async (tx): Promise<Verdict<{ lotId: string }>> => {
      const material = await findMaterial(tx, materialId);
      if (!material) throw new Refused(refuse("not-found", "There is no such material."));
      if (!material.active)
        throw new Refused(refuse("invalid", `${material.name} is retired. Put it in use first.`));
      if (await findLotByCode(tx, fields.code))
        throw new Refused(refuse("invalid", `There is a lot ${fields.code} already.`));
      const lot = await insertLot(tx, {
        ...fields,
        materialId,
        thicknessMin: min,
        thicknessMean: mean,
        thicknessMax: max,
        measuredAt: now,
      });
      await insertReadings(tx, { lotId: lot.id, readings, by: actor.id, at: now });
      await recordAct(tx, {
        actorId: actor.id,
        act: "lot.add",
        subject: { kind: "lot", id: lot.id },
        detail: {
          ...fields,
          material: material.code,
          thickness: measured.thickness,
          readings: readings.length,
        },
      });
      return { ok: true, lotId: lot.id };
    }),
  );
}
