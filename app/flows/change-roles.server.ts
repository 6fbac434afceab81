import { transact } from "~/db/client.server";
import { mayDo, type Role, STAFF_ROLES } from "~/domain/orders";
import { recordAct } from "~/models/audit.server";
import { countWithRole, grantRole, listRoles, revokeRole } from "~/models/user-roles.server";
import type { Actor } from "./actor";
import { answering, Refused, refuse, type Verdict } from "./verdict";

export interface ChangeRolesOptions {
  readonly actor: Actor;
  readonly userId: string;
  /** The staff roles the person has afterwards; a builder's role is not touched. */
  readonly roles: readonly Role[];
}

/** The owner gives and takes roles in the shop. The last owner stays owner. */
export async function changeRoles({ actor, userId, roles }: ChangeRolesOptions): Promise<Verdict> {
  if (!mayDo(actor.roles, "staff.invite")) return refuse("not-allowed", "Only the owner changes roles.");
  return answering(() =>
    transact(async (tx): Promise<Verdict> => {
      const had = (await listRoles(tx, userId)).roles;
      if (!STAFF_ROLES.some((role) => had.includes(role)))
        return refuse("not-found", "This person does not work in the shop: invite them instead.");
      const given = STAFF_ROLES.filter((role) => roles.includes(role) && !had.includes(role));
      const taken = STAFF_ROLES.filter((role) => !roles.includes(role) && had.includes(role));
      for (const role of given) await grantRole(tx, { userId, role, grantedBy: actor.id });
      for (const role of taken) await revokeRole(tx, userId, role);
      if ((await countWithRole(tx, "owner")) === 0)
        throw new Refused(
          refuse("invalid", "The shop needs an owner: make somebody else owner before this one stops."),
        );
      if (given.length + taken.length > 0)
        await recordAct(tx, {
          actorId: actor.id,
          act: "staff.roles",
          subject: { kind: "user", id: userId },
          detail: { given, taken },
        });
      return { ok: true };
    }),
  );
}
