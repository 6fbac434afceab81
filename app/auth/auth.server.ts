import { betterAuth } from "better-auth";
import { drizzleAdapter } from "better-auth/adapters/drizzle";
import { createEmailVerificationToken } from "better-auth/api";
import { db } from "~/db/client.server";
import * as schema from "~/db/schema";
import { environment } from "~/server/environment.server";
import { mailReset, mailVerification } from "./auth-mails.server";
import { PASSWORD_MAX, PASSWORD_MIN } from "./password-rules";

/** The header the server sets itself from the connection; what a client sends under this name is overwritten. */
export const CLIENT_ADDRESS_HEADER = "x-kerfpost-client";
const DAY = 24 * 60 * 60;

function createAuth() {
  return betterAuth({
    baseURL: environment.APP_URL,
    basePath: "/auth-service",
    secret: environment.AUTH_SECRET,
    database: drizzleAdapter(db, {
      provider: "sqlite",
      usePlural: true,
      schema: {
        users: schema.users,
        sessions: schema.sessions,
        accounts: schema.accounts,
        verifications: schema.verifications,
      },
    }),
    emailAndPassword: {
      enabled: true,
      minPasswordLength: PASSWORD_MIN,
      maxPasswordLength: PASSWORD_MAX,
      autoSignIn: false,
      revokeSessionsOnPasswordReset: true,
      resetPasswordTokenExpiresIn: 60 * 60,
      sendResetPassword: ({ user, token }) => mailReset(db, user, token),
    },
    emailVerification: {
      expiresIn: DAY,
      sendVerificationEmail: ({ user, token }) => mailVerification(db, user, token),
    },
    session: { expiresIn: 30 * DAY, updateAge: DAY },
    advanced: {
      cookiePrefix: "kerfpost",
      useSecureCookies: environment.APP_URL.startsWith("https:"),
      ipAddress: { ipAddressHeaders: [CLIENT_ADDRESS_HEADER] },
      database: { generateId: () => schema.newId() },
    },
    /** Actions call it without its own HTTP handler, where its limits do not act: see `sign-in-limits.server.ts`. */
    rateLimit: { enabled: false },
    telemetry: { enabled: false },
    logger: { level: "error" },
  });
}

const shelf = globalThis as { kerfpostAuth?: ReturnType<typeof createAuth> };

/** Sign-in by e-mail and password, sessions in the database. */
export function auth(): ReturnType<typeof createAuth> {
  shelf.kerfpostAuth ??= createAuth();
  return shelf.kerfpostAuth;
}

/** What the mailed link that confirms an address carries; good for one day. */
export const verificationToken = (email: string): Promise<string> =>
  createEmailVerificationToken(environment.AUTH_SECRET, email, undefined, DAY);
