import type { Executor } from "~/db/client.server";
import { resetMail, verificationMail } from "~/documents/mails/account";
import { queueMail } from "~/models/outbox.server";
import { findSettings } from "~/models/settings.server";
import { environment } from "~/server/environment.server";

interface Recipient {
  readonly name: string;
  readonly email: string;
}

/** What mails sign with before the shop is set up. */
const PRODUCT = "Kerfpost";

/** The shop's name, as mails sign. */
export const shopName = async (executor: Executor): Promise<string> =>
  (await findSettings(executor))?.content.shop.name ?? PRODUCT;

export async function mailVerification(
  executor: Executor,
  { name, email }: Recipient,
  token: string,
): Promise<void> {
  const url = `${environment.APP_URL}/verify-email?token=${encodeURIComponent(token)}`;
  const mail = verificationMail({ shopName: await shopName(executor), recipientName: name, url });
  await queueMail(executor, { recipient: email, template: "verification", ...mail });
}

export async function mailReset(
  executor: Executor,
  { name, email }: Recipient,
  token: string,
): Promise<void> {
  const url = `${environment.APP_URL}/reset-password?token=${encodeURIComponent(token)}`;
  const mail = resetMail({ shopName: await shopName(executor), recipientName: name, url });
  await queueMail(executor, { recipient: email, template: "reset", ...mail });
}
