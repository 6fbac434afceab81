import { hashPassword } from "better-auth/crypto";
import { transact } from "~/db/client.server";
import { findIdByEmail, insertAccount, markVerified } from "~/models/accounts.server";
import { recordAct } from "~/models/audit.server";
import { findOpenInvitation, type Invitation, markAccepted } from "~/models/invitations.server";
import { grantRole } from "~/models/user-roles.server";
import { hashToken } from "./invite-staff.server";
import { answering, Refused, refuse, type Verdict } from "./verdict";

const OVER = refuse(
  "expired",
  "This invitation was used, called back or has run out. Ask the owner for another.",
);

export interface AcceptInvitationOptions {
  readonly token: string;
  /** Somebody new, or the person who is signed in and takes the roles on top of their own. */
  readonly as:
    | { readonly name: string; readonly password: string }
    | { readonly userId: string; readonly email: string };
  readonly now?: Date;
}

/**
 * Takes an invitation, once. Its address counts as confirmed: the link came by mail. Who has an account under that
 * address signs in first; who is signed in under another one is refused.
 */
export async function acceptInvitation({
  token,
  as,
  now = new Date(),
}: AcceptInvitationOptions): Promise<Verdict<{ email: string }>> {
  const passwordHash = "password" in as ? await hashPassword(as.password) : "";
  return answering(() =>
    transact(async (tx): Promise<Verdict<{ email: string }>> => {
      const invitation = await findOpenInvitation(tx, hashToken(token), now);
      if (!invitation || !(await markAccepted(tx, invitation.id, now))) return OVER;
      const userId =
        "password" in as
          ? await insertAccount(tx, {
              name: as.name,
              email: invitation.email,
              passwordHash,
              emailVerified: true,
              roles: invitation.roles,
              grantedBy: invitation.invitedBy,
            })
          : await takeOn(tx, invitation, as);
      if (!userId)
        throw new Refused(refuse("changed", "This address has an account already: sign in with it first."));
      await recordAct(tx, {
        actorId: userId,
        act: "staff.accept",
        subject: { kind: "invitation", id: invitation.id },
        detail: { roles: invitation.roles },
      });
      return { ok: true, email: invitation.email };
    }),
  );
}

type Tx = Parameters<Parameters<typeof transact>[0]>[0];

async function takeOn(
  tx: Tx,
  invitation: Invitation,
  person: { readonly userId: string; readonly email: string },
): Promise<string> {
  if ((await findIdByEmail(tx, invitation.email)) !== person.userId)
    throw new Refused(
      refuse(
        "not-allowed",
        `This invitation is for ${invitation.email}; you are signed in as ${person.email}.`,
      ),
    );
  await markVerified(tx, person.userId);
  for (const role of invitation.roles)
    await grantRole(tx, { userId: person.userId, role, grantedBy: invitation.invitedBy });
  return person.userId;
}
