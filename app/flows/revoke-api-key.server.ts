import { transact } from "~/db/client.server";
import { revokeApiKey as revoke } from "~/models/api-keys.server";
import { recordAct } from "~/models/audit.server";
import type { Actor } from "./actor";
import { refuse, type Verdict } from "./verdict";

interface RevokeApiKeyOptions {
  readonly actor: Actor;
  readonly keyId: string;
  readonly now?: Date;
}

/** Ends one of the actor's own keys, from the next request on. It is never taken back. */
export function revokeApiKey(options: RevokeApiKeyOptions): Promise<Verdict<{ name: string }>> {
  const { actor, keyId, now = new Date() } = options;
  return transact(async (tx) => {
    const name = await revoke(tx, { userId: actor.id, keyId, at: now });
    if (name === undefined) return refuse("not-found", "You have no such key, or it is revoked already.");
    await recordAct(tx, {
      actorId: actor.id,
      act: "api-key.revoke",
      subject: { kind: "api-key", id: keyId },
      detail: { name },
    });
    return { ok: true, name };
  });
}
