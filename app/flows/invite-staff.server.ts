import { createHash, randomBytes } from "node:crypto";
import { shopName } from "~/auth/auth-mails.server";
import { transact } from "~/db/client.server";
import { invitationMail } from "~/documents/mails/account";
import { mayDo, type Role, STAFF_ROLES } from "~/domain/orders";
import { recordAct } from "~/models/audit.server";
import { insertInvitation, revokeInvitations } from "~/models/invitations.server";
import { queueMail } from "~/models/outbox.server";
import { environment } from "~/server/environment.server";
import type { Actor } from "./actor";
import { refuse, type Verdict } from "./verdict";

const INVITATION_DAYS = 7;
const DAY_MS = 86_400_000;

/** Only the hash of a mailed token is kept. */
export const hashToken = (token: string): string => createHash("sha256").update(token).digest("hex");

export interface InviteStaffOptions {
  readonly actor: Actor & { readonly name: string };
  readonly email: string;
  readonly roles: readonly Role[];
  readonly now?: Date;
}

/** The owner invites somebody to the shop by mail. A newer invitation to the same address replaces an older one. */
export async function inviteStaff(options: InviteStaffOptions): Promise<Verdict<{ invitationId: string }>> {
  const { actor, roles, now = new Date() } = options;
  if (!mayDo(actor.roles, "staff.invite")) return refuse("not-allowed", "Only the owner invites staff.");
  if (roles.length === 0 || !roles.every((role) => STAFF_ROLES.some((staff) => staff === role)))
    return refuse("invalid", "Choose at least one role in the shop.");
  const email = options.email.toLowerCase();
  const token = randomBytes(32).toString("base64url");
  return transact(async (tx) => {
    await revokeInvitations(tx, { email }, now);
    const invitationId = await insertInvitation(tx, {
      email,
      roles,
      tokenHash: hashToken(token),
      invitedBy: actor.id,
      expiresAt: new Date(now.getTime() + INVITATION_DAYS * DAY_MS),
    });
    const mail = invitationMail({
      shopName: await shopName(tx),
      recipientName: "Hello",
      invitedBy: actor.name,
      roles,
      url: `${environment.APP_URL}/invitation/${token}`,
    });
    await queueMail(tx, { recipient: email, template: "invitation", ...mail });
    await recordAct(tx, {
      actorId: actor.id,
      act: "staff.invite",
      subject: { kind: "invitation", id: invitationId },
      detail: { email, roles },
    });
    return { ok: true, invitationId };
  });
}
