import { existsSync } from "node:fs";
import { z } from "zod";

const url = (standard: string) => z.url().default(standard);

/** Every setting of the process. The defaults run the product on one machine with the local stand-ins. */
const environmentSchema = z
  .object({
    NODE_ENV: z.enum(["development", "test", "production"]).default("development"),
    LOG_LEVEL: z.enum(["silent", "fatal", "error", "warn", "info", "debug"]).default("info"),
    HOST: z.string().min(1).default("127.0.0.1"),
    PORT: z.coerce.number().int().min(0).max(65_535).default(4700),
    /** What people type; links in mails and the origin of forms are made from it. */
    APP_URL: z.url().optional(),
    /** How many proxies stand in front and add to X-Forwarded-For. */
    TRUSTED_PROXIES: z.coerce.number().int().min(0).max(5).default(0),
    AUTH_SECRET: z.string().min(32).default("local-only-secret-do-not-use-in-production"),
    DATABASE_URL: z
      .string()
      .regex(/^(file:|libsql:\/\/|https?:\/\/)/, "starts with file:, libsql:// or http(s)://")
      .default("file:.data/kerfpost.db"),
    DATABASE_AUTH_TOKEN: z.string().min(1).optional(),
    S3_ENDPOINT: url("http://127.0.0.1:4701"),
    S3_REGION: z.string().default("us-east-1"),
    S3_BUCKET: z.string().default("kerfpost"),
    S3_ACCESS_KEY_ID: z.string().default("S3RVER"),
    S3_SECRET_ACCESS_KEY: z.string().default("S3RVER"),
    STRIPE_API_URL: url("http://127.0.0.1:4702"),
    STRIPE_SECRET_KEY: z.string().min(1).default("sk_test_kerfpost_local"),
    STRIPE_WEBHOOK_SECRET: z.string().min(1).default("whsec_kerfpost_local"),
    SMTP_URL: z
      .string()
      .regex(/^smtps?:\/\//, "starts with smtp:// or smtps://")
      .default("smtp://127.0.0.1:4703"),
    MAIL_FROM: z.string().default("Alder Ferry Panelworks <desk@alder-ferry.example>"),
    CARRIER_URL: url("http://127.0.0.1:4705"),
    CARRIER_KEY: z.string().min(1).default("towpath_local_key"),
    /** Whether this process also runs jobs and sends mail; `npm run worker` does it elsewhere. */
    RUN_JOBS: z.stringbool().default(true),
  })
  .transform((given) => ({ ...given, APP_URL: given.APP_URL ?? `http://${given.HOST}:${given.PORT}` }))
  .refine(
    (given) =>
      given.NODE_ENV !== "production" ||
      isLocal(given.APP_URL) ||
      !given.AUTH_SECRET.startsWith("local-only"),
    {
      path: ["AUTH_SECRET"],
      message: "set a secret of your own when the product is reached from other machines",
    },
  );

export type Environment = z.infer<typeof environmentSchema>;

function isLocal(address: string): boolean {
  return ["127.0.0.1", "localhost", "[::1]"].includes(new URL(address).hostname);
}

/** Reads the process's settings; throws one sentence for each that cannot be used. */
export function readEnvironment(source: Readonly<Record<string, string | undefined>>): Environment {
  const given = Object.fromEntries(Object.entries(source).filter(([, value]) => value !== ""));
  const parsed = environmentSchema.safeParse(given);
  if (parsed.success) return parsed.data;
  const faults = parsed.error.issues.map(({ path, message }) => `  ${path.join(".")}: ${message}`);
  throw new Error(`The environment cannot be used:\n${faults.join("\n")}`);
}

if (existsSync(".env")) process.loadEnvFile(".env");

export const environment: Environment = readEnvironment(process.env);
