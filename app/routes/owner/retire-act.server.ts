import { z } from "zod";
import type { Actor } from "~/flows/actor";
import { type Retirable, retire } from "~/flows/retire.server";
import { refuse, type Verdict } from "~/flows/verdict";

const retireSchema = z.object({
  intent: z.enum(["retire", "restore"]),
  id: z.string().min(1).max(64),
  version: z.coerce.number().int(),
});

/** A sent retire form, done; null when the form sent is another. */
export async function retireAct(actor: Actor, kind: Retirable, sent: FormData): Promise<Verdict | null> {
  const intent = sent.get("intent");
  if (intent !== "retire" && intent !== "restore") return null;
  const asked = retireSchema.safeParse(Object.fromEntries(sent));
  if (!asked.success) return refuse("invalid", "Say which.");
  const { id, version } = asked.data;
  return retire({ actor, kind, id, version, active: asked.data.intent === "restore" });
}
