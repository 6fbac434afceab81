import { newApiKey } from "~/auth/api-key.server";
import { transact } from "~/db/client.server";
import type { ApiScope } from "~/domain/orders";
import { countLiveApiKeys, insertApiKey } from "~/models/api-keys.server";
import { recordAct } from "~/models/audit.server";
import type { Actor } from "./actor";
import { refuse, type Verdict } from "./verdict";

/** Enough for a program each; more is a sign of keys nobody revokes. */
export const MOST_LIVE_KEYS = 20;

interface MakeApiKeyOptions {
  readonly actor: Actor;
  readonly name: string;
  readonly scopes: readonly ApiScope[];
}

/** Makes a key of the actor's own. The answer is the only place where it is ever shown. */
export function makeApiKey({ actor, name, scopes }: MakeApiKeyOptions): Promise<Verdict<{ secret: string }>> {
  return transact(async (tx) => {
    if (scopes.length === 0) return refuse("incomplete", "Choose what the key may read.");
    if ((await countLiveApiKeys(tx, actor.id)) >= MOST_LIVE_KEYS)
      return refuse("too-much", `You have ${MOST_LIVE_KEYS} keys. Revoke one that is not used.`);
    const { secret, ...kept } = newApiKey();
    const id = await insertApiKey(tx, { userId: actor.id, name, scopes, ...kept });
    await recordAct(tx, {
      actorId: actor.id,
      act: "api-key.make",
      subject: { kind: "api-key", id },
      detail: { name, scopes },
    });
    return { ok: true, secret };
  });
}
