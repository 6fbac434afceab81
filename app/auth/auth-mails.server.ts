import { db } from "~/db/client.server";
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

const shopName = async (): Promise<string> => (await findSettings(db))?.content.shop.name ?? PRODUCT;

export async function mailVerification({ name, email }: Recipient, token: string): Promise<void> {
  const url = `${environment.APP_URL}/verify-email?token=${encodeURIComponent(token)}`;
  const mail = verificationMail({ shopName: await shopName(), recipientName: name, url });
  await queueMail(db, { recipient: email, template: "verification", ...mail });
}

export async function mailReset({ name, email }: Recipient, token: string): Promise<void> {
  const url = `${environment.APP_URL}/reset-password?token=${encodeURIComponent(token)}`;
  const mail = resetMail({ shopName: await shopName(), recipientName: name, url });
  await queueMail(db, { recipient: email, template: "reset", ...mail });
}
