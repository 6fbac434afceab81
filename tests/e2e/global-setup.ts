import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { freePorts, startProduct } from "../../app/commands/product.mjs";

/** The built product with the demonstration's data, on free ports, for all browser tests; stopped after them. */
export default async function globalSetup(): Promise<() => Promise<void>> {
  const directory = mkdtempSync(path.join(tmpdir(), "kerfpost-e2e-"));
  const product = await startProduct({
    directory,
    ports: await freePorts(),
    say: (words) => process.stdout.write(`${words}\n`),
  });
  process.env.KERFPOST_URL = product.url;
  process.env.KERFPOST_DATABASE_URL = product.environment.DATABASE_URL;
  process.env.KERFPOST_INBOX_URL = product.inboxUrl;
  process.env.KERFPOST_PAYMENTS_URL = product.paymentsUrl;
  process.env.KERFPOST_CARRIER_URL = product.carrierUrl;
  return async () => {
    await product.stop();
    rmSync(directory, { recursive: true, force: true });
  };
}
