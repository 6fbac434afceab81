import { transact } from "~/db/client.server";
import { mayDo } from "~/domain/orders";
import { recordAct } from "~/models/audit.server";
import { findLot } from "~/models/materials.server";
import { changeLot as changeLotRow, findLotByCode, type LotFields } from "~/models/stock.server";
import type { Actor } from "./actor";
import { changesOf } from "./changes";
import { STALE } from "./stale";
import { answering, Refused, refuse, type Verdict } from "./verdict";

export interface ChangeLotOptions {
  readonly actor: Actor;
  readonly lotId: string;
  readonly version: number;
  readonly fields: LotFields;
}

/** Code, papers and count of a lot. Sheets that orders have reserved cannot be counted away. */
export async function changeLot(options: ChangeLotOptions): Promise<Verdict> {
  const { actor, lotId, version, fields } = options;
  if (!mayDo(actor.roles, "stock.edit"))
    return refuse("not-allowed", "The stock is the operators' and the owner's.");
  return answering(() =>
    transact(async (tx): Promise<Verdict> => {
      const lot = await findLot(tx, lotId);
      if (!lot) throw new Refused(refuse("not-found", "There is no such lot."));
      if (lot.version !== version) throw new Refused(STALE);
      const namesake = await findLotByCode(tx, fields.code);
      if (namesake && namesake.id !== lotId)
        throw new Refused(refuse("invalid", `There is a lot ${fields.code} already.`));
      if (fields.sheetsOnHand < lot.sheetsReserved)
        throw new Refused(
          refuse(
            "invalid",
            `${lot.sheetsReserved} sheets are reserved for orders; ${fields.sheetsOnHand} would not do. Move the orders to another lot first.`,
          ),
        );
      const changes = changesOf(lot, fields);
      if (Object.keys(changes).length === 0) return { ok: true };
      if (!(await changeLotRow(tx, { id: lotId, version, change: fields }))) throw new Refused(STALE);
      await recordAct(tx, {
        actorId: actor.id,
        act: "lot.change",
        subject: { kind: "lot", id: lotId },
        detail: { code: lot.code, changes },
      });
      return { ok: true };
    }),
  );
}
