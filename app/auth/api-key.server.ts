import { createHash, randomBytes } from "node:crypto";

const BEGINS = "kp_";
/** 256 random bits: so many that a plain hash keeps a key, where a password would need a slow one. */
const SECRET_BYTES = 32;
const FORM = /^kp_[A-Za-z0-9_-]{43}$/;
const SHOWN_CHARACTERS = 10;

/** A new bearer key, and what is kept of it. */
export function newApiKey(): { readonly secret: string; readonly prefix: string; readonly keyHash: string } {
  const secret = `${BEGINS}${randomBytes(SECRET_BYTES).toString("base64url")}`;
  return { secret, prefix: secret.slice(0, SHOWN_CHARACTERS), keyHash: hashApiKey(secret) };
}

/** SHA-256 in hex. */
export const hashApiKey = (secret: string): string => createHash("sha256").update(secret).digest("hex");

/** The credentials after `Authorization: Bearer` (RFC 6750, section 2.1); null when the header says nothing of it. */
export function bearerOf(headers: Headers): string | null {
  const [, given] = /^Bearer +(\S+) *$/i.exec(headers.get("Authorization") ?? "") ?? [];
  return given ?? null;
}

/** Whether it can be a key at all; what cannot is not looked for. */
export const looksLikeApiKey = (given: string): boolean => FORM.test(given);
