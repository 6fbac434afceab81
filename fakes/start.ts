/**
 * Starts all fakes from a terminal, prints where they are and stops them on SIGINT or SIGTERM. Keys and secrets are
 * those the application is set to use.
 */
import { existsSync } from "node:fs";
import { z } from "zod";
import { FAKE_PORTS, startFakes } from "./all";

if (existsSync(".env")) process.loadEnvFile(".env");

const port = (standard: number) => z.coerce.number().int().min(0).max(65_535).default(standard);

const environment = z
  .object({
    FAKE_STORAGE_PORT: port(FAKE_PORTS.storage),
    FAKE_PAYMENTS_PORT: port(FAKE_PORTS.payments),
    FAKE_SMTP_PORT: port(FAKE_PORTS.smtp),
    FAKE_INBOX_PORT: port(FAKE_PORTS.inbox),
    FAKE_CARRIER_PORT: port(FAKE_PORTS.carrier),
    FAKE_DATA_DIRECTORY: z.string().default(".data/fakes"),
    FAKE_WEBHOOK_URL: z.url().optional(),
    PORT: port(4700),
    STRIPE_SECRET_KEY: z.string().optional(),
    STRIPE_WEBHOOK_SECRET: z.string().optional(),
    CARRIER_KEY: z.string().optional(),
  })
  .parse(process.env);

const webhookUrl = environment.FAKE_WEBHOOK_URL ?? `http://127.0.0.1:${environment.PORT}/webhooks/payments`;

const fakes = await startFakes({
  ports: {
    storage: environment.FAKE_STORAGE_PORT,
    payments: environment.FAKE_PAYMENTS_PORT,
    smtp: environment.FAKE_SMTP_PORT,
    inbox: environment.FAKE_INBOX_PORT,
    carrier: environment.FAKE_CARRIER_PORT,
  },
  dataDirectory: environment.FAKE_DATA_DIRECTORY,
  webhookUrl,
  webhookSecret: environment.STRIPE_WEBHOOK_SECRET,
  paymentsKey: environment.STRIPE_SECRET_KEY,
  carrierKey: environment.CARRIER_KEY,
}).catch((error: NodeJS.ErrnoException & { port?: number }) => {
  if (error.code !== "EADDRINUSE") throw error;
  console.error(`Port ${error.port} is taken: are the local stand-ins running already?`);
  process.exit(1);
});

process.stdout.write(
  `Local stand-ins, kept in ${environment.FAKE_DATA_DIRECTORY}:
  storage   ${fakes.storage.url}
  payments  ${fakes.payments.url}  (events to ${webhookUrl})
  mail      ${fakes.mail.smtpUrl}
  inbox     ${fakes.mail.url}
  carrier   ${fakes.carrier.url}
`,
);

let stopping = false;
async function stop() {
  if (stopping) return;
  stopping = true;
  await fakes.stop();
  for (const { method, path, why } of fakes.unexpected())
    console.warn(`Unknown request: ${method} ${path}: ${why}`);
  process.exit(0);
}
process.once("SIGINT", stop);
process.once("SIGTERM", stop);
