import { hashPassword } from "better-auth/crypto";
import { verificationToken } from "~/auth/auth.server";
import { mailVerification } from "~/auth/auth-mails.server";
import { transact } from "~/db/client.server";
import { insertAccount } from "~/models/accounts.server";
import { refuse, type Verdict } from "./verdict";

export interface SignUpOptions {
  readonly name: string;
  readonly email: string;
  readonly password: string;
}

/**
 * A new builder: account, role and the mail that confirms the address, in one transaction. The page says when an
 * address has an account already: it lets nobody in, and its tries are limited.
 */
export async function signUp({ name, email, password }: SignUpOptions): Promise<Verdict<{ userId: string }>> {
  const address = email.toLowerCase();
  const passwordHash = await hashPassword(password);
  const token = await verificationToken(address);
  return transact(async (tx): Promise<Verdict<{ userId: string }>> => {
    const userId = await insertAccount(tx, {
      name,
      email: address,
      passwordHash,
      emailVerified: false,
      roles: ["builder"],
      grantedBy: null,
    });
    if (!userId) return refuse("changed", "This address has an account already: sign in with it.");
    await mailVerification(tx, { name, email: address }, token);
    return { ok: true, userId };
  });
}
