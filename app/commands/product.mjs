// Starts the local stand-ins, the demonstration's data and the built product as processes of their own; used by the
// demo, by browser tests and by the screenshots. Plain Node, so that it runs before anything is compiled.
import { spawn } from "node:child_process";
import { createWriteStream, mkdirSync } from "node:fs";
import { createServer } from "node:net";
import path from "node:path";
import { setTimeout as pause } from "node:timers/promises";

/** @typedef {{ product: number, storage: number, payments: number, smtp: number, inbox: number, carrier: number }} Ports */
/** @typedef {{ url: string, inboxUrl: string, paymentsUrl: string, carrierUrl: string, environment: Record<string, string>, stop(): Promise<void> }} Product */

/** @type {Ports} */
export const DEMO_PORTS = {
  product: 4700,
  storage: 4701,
  payments: 4702,
  smtp: 4703,
  inbox: 4704,
  carrier: 4705,
};

/** @returns {Promise<Ports>} */
export async function freePorts() {
  const free = await Promise.all(Object.keys(DEMO_PORTS).map(freePort));
  const [product = 0, storage = 0, payments = 0, smtp = 0, inbox = 0, carrier = 0] = free;
  return { product, storage, payments, smtp, inbox, carrier };
}

/** @returns {Promise<number>} */
function freePort() {
  return new Promise((resolve, reject) => {
    const server = createServer();
    server.on("error", reject);
    server.listen(0, "127.0.0.1", () => {
      const address = server.address();
      server.close(() => resolve(typeof address === "object" && address ? address.port : 0));
    });
  });
}

/**
 * @param {{ directory: string, ports: Ports, say?: (words: string) => void, environment?: Record<string, string> }} options
 *   `directory` holds the database, what the stand-ins keep, and the logs.
 * @returns {Promise<Product>}
 */
export async function startProduct({ directory, ports, say = () => undefined, environment: extra = {} }) {
  mkdirSync(directory, { recursive: true });
  const at = (/** @type {number} */ port) => `http://127.0.0.1:${port}`;
  const url = at(ports.product);
  const environment = {
    NODE_ENV: "production",
    NODE_NO_WARNINGS: "1",
    HOST: "127.0.0.1",
    PORT: String(ports.product),
    APP_URL: url,
    DATABASE_URL: `file:${path.resolve(directory, "kerfpost.db")}`,
    S3_ENDPOINT: at(ports.storage),
    STRIPE_API_URL: at(ports.payments),
    SMTP_URL: `smtp://127.0.0.1:${ports.smtp}`,
    CARRIER_URL: at(ports.carrier),
    FAKE_STORAGE_PORT: String(ports.storage),
    FAKE_PAYMENTS_PORT: String(ports.payments),
    FAKE_SMTP_PORT: String(ports.smtp),
    FAKE_INBOX_PORT: String(ports.inbox),
    FAKE_CARRIER_PORT: String(ports.carrier),
    FAKE_DATA_DIRECTORY: path.resolve(directory, "stand-ins"),
    FAKE_WEBHOOK_URL: `${url}/webhooks/payments`,
    ...extra,
  };
  /** @type {import("node:child_process").ChildProcess[]} */
  const children = [];
  const stop = async () => {
    for (const child of children.toReversed()) await end(child);
  };
  const start = (/** @type {string} */ name, /** @type {string[]} */ args) => {
    const log = createWriteStream(path.join(directory, `${name}.log`), { flags: "a" });
    const child = spawn(process.execPath, args, {
      env: { ...process.env, ...environment },
      stdio: ["ignore", "pipe", "pipe"],
    });
    child.stdout.pipe(log);
    child.stderr.pipe(log);
    children.push(child);
    return child;
  };
  try {
    say("Starting the local stand-ins");
    await answers(
      at(ports.inbox),
      start("stand-ins", ["--import", "tsx", "fakes/start.ts"]),
      directory,
      "stand-ins",
    );
    say("Filling the shop, if it is empty");
    await ends(start("seed", ["--import", "tsx", "app/commands/seed.ts"]), directory, "seed");
    say("Starting the product");
    await answers(`${url}/healthz`, start("product", ["app/server/launch.mjs"]), directory, "product");
  } catch (error) {
    await stop();
    throw error;
  }
  return {
    url,
    inboxUrl: at(ports.inbox),
    paymentsUrl: at(ports.payments),
    carrierUrl: at(ports.carrier),
    environment,
    stop,
  };
}

const PATIENCE_MS = 60_000;

/** @param {string} url @param {import("node:child_process").ChildProcess} child @param {string} directory @param {string} name */
async function answers(url, child, directory, name) {
  const until = Date.now() + PATIENCE_MS;
  while (Date.now() < until) {
    if (child.exitCode !== null)
      throw new Error(`It ended at once: see ${path.join(directory, `${name}.log`)}`);
    if (
      await fetch(url).then(
        ({ ok }) => ok,
        () => false,
      )
    )
      return;
    await pause(150);
  }
  throw new Error(`No answer at ${url}: see ${path.join(directory, `${name}.log`)}`);
}

/** @param {import("node:child_process").ChildProcess} child @param {string} directory @param {string} name @returns {Promise<void>} */
function ends(child, directory, name) {
  return new Promise((resolve, reject) => {
    child.once("exit", (code) =>
      code === 0 ? resolve() : reject(new Error(`It failed: see ${path.join(directory, `${name}.log`)}`)),
    );
  });
}

/** @param {import("node:child_process").ChildProcess} child @returns {Promise<void>} */
async function end(child) {
  if (child.exitCode !== null || child.signalCode !== null) return;
  const gone = new Promise((resolve) => child.once("exit", resolve));
  child.kill("SIGTERM");
  const timer = setTimeout(() => child.kill("SIGKILL"), 8_000);
  await gone;
  clearTimeout(timer);
}
