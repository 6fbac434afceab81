/** The fakes for tests: on free ports, one set for a test file, and none of them may be asked what it does not know. */
import { afterAll, afterEach, beforeAll, expect } from "vitest";
import { createCarrier } from "~/services/carrier.server";
import { createMail } from "~/services/mail.server";
import { createPayments } from "~/services/payments.server";
import { createStorage } from "~/services/storage.server";
import { type Fakes, FREE_PORTS, startFakes } from "~fakes/all";

/** Short waits, so that a retried event comes within a test. */
const RETRY_DELAYS = [20, 40, 80, 160];

/** Starts fakes on free ports for the callers that manage their life themselves. */
export function startTestFakes(webhookUrl?: string): Promise<Fakes> {
  return startFakes({ ports: FREE_PORTS, webhookUrl, retryDelays: RETRY_DELAYS });
}

/** Configurations of the four services for a set of fakes. */
export function serviceConfigs({ storage, payments, mail, carrier }: Fakes) {
  return {
    storage: {
      endpoint: storage.url,
      region: storage.region,
      bucket: storage.bucket,
      accessKeyId: storage.accessKeyId,
      secretAccessKey: storage.secretAccessKey,
    },
    payments: {
      secretKey: payments.secretKey,
      webhookSecret: payments.webhookSecret,
      apiUrl: payments.url,
    },
    mail: { smtpUrl: mail.smtpUrl, from: "Alder Ferry Panelworks <orders@alder-ferry.example>" },
    carrier: { apiUrl: carrier.url, key: carrier.key },
  };
}

/** The four typed clients for a set of fakes; `close` ends their idle connections. */
export function servicesFor(fakes: Fakes) {
  const configs = serviceConfigs(fakes);
  const storage = createStorage(configs.storage);
  const mail = createMail(configs.mail);
  return {
    storage,
    mail,
    payments: createPayments(configs.payments),
    carrier: createCarrier(configs.carrier),
    close() {
      storage.close();
      mail.close();
    },
  };
}

/** Requests that the fakes did not know since the last call; a test that provokes one takes it from here. */
export function takeUnexpected(fakes: Fakes) {
  return [fakes.storage, fakes.payments, fakes.mail, fakes.carrier].flatMap(({ unexpected }) =>
    unexpected.splice(0),
  );
}

/**
 * Fakes and clients for the tests of one file, started before and stopped after them. A request unknown to a
 * fake fails the test that made it.
 */
export function fakesForTests() {
  let running: { fakes: Fakes; services: ReturnType<typeof servicesFor> } | undefined;
  const current = () => {
    if (!running) throw new Error("The fakes run only inside tests and their hooks.");
    return running;
  };
  beforeAll(async () => {
    const fakes = await startTestFakes();
    running = { fakes, services: servicesFor(fakes) };
  });
  afterEach(() => {
    expect(takeUnexpected(current().fakes), "requests unknown to a fake").toEqual([]);
  });
  afterAll(async () => {
    const { fakes, services } = current();
    services.close();
    await fakes.stop();
  });
  return {
    get fakes() {
      return current().fakes;
    },
    get services() {
      return current().services;
    },
  };
}
