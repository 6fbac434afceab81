import { createHmac, timingSafeEqual } from "node:crypto";
import { isOptionalMail, type OptionalMail } from "~/documents/mails/kinds";
import { environment } from "~/server/environment.server";

/**
 * What a link in a mail is signed with: it turns off one kind of mail of one person, whoever presses it, for as long
 * as the mail is kept. It lets nobody in.
 */
export interface Unsubscribing {
  readonly userId: string;
  readonly kind: OptionalMail;
}

const signature = (words: string): Buffer =>
  createHmac("sha256", environment.AUTH_SECRET).update(`unsubscribe:${words}`).digest();

export function unsubscribeToken({ userId, kind }: Unsubscribing): string {
  const words = `${userId}.${kind}`;
  return `${words}.${signature(words).toString("base64url")}`;
}

/** Null for a token that was not signed here. */
export function readUnsubscribeToken(token: string): Unsubscribing | null {
  const [, userId, kind, signed] = /^([^.]{1,100})\.([a-z]{1,20})\.([\w-]{43})$/.exec(token) ?? [];
  if (!userId || !kind || !signed || !isOptionalMail(kind)) return null;
  const given = Buffer.from(signed, "base64url");
  const right = signature(`${userId}.${kind}`);
  return given.length === right.length && timingSafeEqual(given, right) ? { userId, kind } : null;
}

export const unsubscribeUrl = (of: Unsubscribing): string =>
  `${environment.APP_URL}/unsubscribe?token=${encodeURIComponent(unsubscribeToken(of))}`;
