import { db } from "~/db/client.server";
import { takeToken } from "~/models/rate-limits.server";
import { CLIENT_ADDRESS_HEADER } from "./auth.server";

interface Limit {
  readonly limit: number;
  readonly windowSeconds: number;
}

const MINUTE = 60;
const HOUR = 60 * MINUTE;

/** What one network address, and what one account or mailbox, may try. */
const LIMITS = {
  "sign-in": {
    place: { limit: 40, windowSeconds: 10 * MINUTE },
    account: { limit: 10, windowSeconds: 10 * MINUTE },
  },
  "sign-up": { place: { limit: 20, windowSeconds: HOUR }, account: { limit: 5, windowSeconds: HOUR } },
  "forgot-password": {
    place: { limit: 20, windowSeconds: HOUR },
    account: { limit: 4, windowSeconds: HOUR },
  },
  "reset-password": {
    place: { limit: 20, windowSeconds: HOUR },
    account: { limit: 10, windowSeconds: HOUR },
  },
  "verify-email": { place: { limit: 30, windowSeconds: HOUR }, account: { limit: 5, windowSeconds: HOUR } },
  invitation: { place: { limit: 20, windowSeconds: HOUR }, account: { limit: 10, windowSeconds: HOUR } },
  "change-password": {
    place: { limit: 20, windowSeconds: HOUR },
    account: { limit: 10, windowSeconds: HOUR },
  },
} as const satisfies Record<string, { place: Limit; account: Limit }>;

export type Attempt = keyof typeof LIMITS;

/** Counts a try; a sentence when there were too many from this place or for this account. Shared by all processes. */
export async function tooMany(attempt: Attempt, request: Request, account: string): Promise<string | null> {
  const place = request.headers.get(CLIENT_ADDRESS_HEADER) ?? "unknown";
  const { place: perPlace, account: perAccount } = LIMITS[attempt];
  const tokens = [
    await takeToken(db, `${attempt}:place:${place}`, perPlace.limit, perPlace.windowSeconds),
    await takeToken(db, `${attempt}:account:${account}`, perAccount.limit, perAccount.windowSeconds),
  ];
  const wait = Math.max(0, ...tokens.map((token) => (token.ok ? 0 : token.retryAfterSeconds)));
  if (wait === 0) return null;
  const minutes = Math.ceil(wait / MINUTE);
  return `Too many tries. Wait ${minutes} ${minutes === 1 ? "minute" : "minutes"}, then try again.`;
}
