import { transact } from "~/db/client.server";
import { mayDo, type ShopSettings } from "~/domain/orders";
import { recordAct } from "~/models/audit.server";
import { changeSettings, findSettings } from "~/models/settings.server";
import type { Actor } from "./actor";
import { changesOf } from "./changes";
import { answering, Refused, refuse, type Verdict } from "./verdict";

export interface SaveSettingsOptions {
  readonly actor: Actor;
  readonly version: number;
  readonly content: ShopSettings;
  readonly now?: Date;
}

/** The owner's settings, for quotes and dates from now on. A second owner's earlier change is not written over. */
export async function saveSettings(options: SaveSettingsOptions): Promise<Verdict> {
  const { actor, version, content, now = new Date() } = options;
  if (!mayDo(actor.roles, "settings.edit")) return refuse("not-allowed", "Settings are the owner's.");
  return answering(() =>
    transact(async (tx): Promise<Verdict> => {
      const was = await findSettings(tx);
      if (!was) throw new Refused(refuse("not-found", "The shop is not set up yet."));
      if (!(await changeSettings(tx, { content, version, by: actor.id, now })))
        throw new Refused(
          refuse(
            "changed",
            "Somebody saved other settings while you were writing. Yours are still in the form, not saved: open the page anew beside this one and take over what is missing.",
          ),
        );
      const changes = changesOf(was.content, content);
      if (Object.keys(changes).length > 0)
        await recordAct(tx, {
          actorId: actor.id,
          act: "settings.change",
          subject: { kind: "settings", id: "shop" },
          detail: { changes },
        });
      return { ok: true };
    }),
  );
}
