import { transact } from "~/db/client.server";
import { measureStack, type ThicknessReading } from "~/domain/fit";
import { mayDo } from "~/domain/orders";
import { recordAct } from "~/models/audit.server";
import { findLot } from "~/models/materials.server";
import { changeLot, insertReadings } from "~/models/stock.server";
import type { Actor } from "./actor";
import { STALE } from "./stale";
import { answering, Refused, refuse, type Verdict } from "./verdict";

export interface ReadThicknessOptions {
  readonly actor: Actor;
  readonly lotId: string;
  readonly version: number;
  readonly readings: readonly ThicknessReading[];
  readonly now?: Date;
}

/** A lot is measured anew: the newest readings are its figures; earlier ones stay on record, as do the quotes made on them. */
export async function readThickness(options: ReadThicknessOptions): Promise<Verdict> {
  const { actor, lotId, version, readings, now = new Date() } = options;
  if (!mayDo(actor.roles, "stock.edit"))
    return refuse("not-allowed", "The stock is the operators' and the owner's.");
  const measured = measureStack(readings);
  if (!measured.ok) return refuse("invalid", measured.reason);
  const { min, mean, max } = measured.thickness;
  return answering(() =>
    transact(async (tx): Promise<Verdict> => {
      const lot = await findLot(tx, lotId);
      if (!lot) throw new Refused(refuse("not-found", "There is no such lot."));
      const change = { thicknessMin: min, thicknessMean: mean, thicknessMax: max, measuredAt: now };
      if (!(await changeLot(tx, { id: lotId, version, change }))) throw new Refused(STALE);
      await insertReadings(tx, { lotId, readings, by: actor.id, at: now });
      await recordAct(tx, {
        actorId: actor.id,
        act: "lot.measure",
        subject: { kind: "lot", id: lotId },
        detail: {
          code: lot.code,
          readings: readings.length,
          changes: {
            thickness: {
              before: { min: lot.thicknessMin, mean: lot.thicknessMean, max: lot.thicknessMax },
              after: measured.thickness,
            },
          },
        },
      });
      return { ok: true };
    }),
  );
}
