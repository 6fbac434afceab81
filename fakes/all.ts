/** All fakes together, for development, the demo, tests and browser tests alike. */
import { join } from "node:path";
import { type CarrierFake, startCarrier } from "./carrier";
import type { Unexpected } from "./local-server";
import { type MailFake, startMail } from "./mail";
import { type PaymentsFake, startPayments } from "./payments";
import { type StorageFake, startStorage } from "./storage";

export interface FakePorts {
  storage: number;
  payments: number;
  smtp: number;
  inbox: number;
  carrier: number;
}

/** Ports of development and the demo. */
export const FAKE_PORTS: FakePorts = {
  storage: 4701,
  payments: 4702,
  smtp: 4703,
  inbox: 4704,
  carrier: 4705,
};

/** 0 everywhere: any free port. */
export const FREE_PORTS: FakePorts = { storage: 0, payments: 0, smtp: 0, inbox: 0, carrier: 0 };

export interface FakesOptions {
  ports: FakePorts;
  /** What the fakes hold outlives a restart there; without it nothing is kept. */
  dataDirectory?: string | undefined;
  /** Where payment events go. */
  webhookUrl?: string | undefined;
  webhookSecret?: string | undefined;
  /** Keys the callers use; the defaults are those of the application's own settings. */
  paymentsKey?: string | undefined;
  carrierKey?: string | undefined;
  /** Milliseconds before each further attempt at a payment event that was not taken. */
  retryDelays?: number[] | undefined;
}

export interface Fakes {
  storage: StorageFake;
  payments: PaymentsFake;
  mail: MailFake;
  carrier: CarrierFake;
  /** Every request that some fake did not know. */
  unexpected(): Unexpected[];
  stop(): Promise<void>;
}

/** Starts all fakes; when one fails to start, those already running are stopped and the error is thrown. */
export async function startFakes(options: FakesOptions): Promise<Fakes> {
  const { ports, dataDirectory } = options;
  const started = await Promise.allSettled([
    startStorage({ port: ports.storage, dataDirectory: dataDirectory && join(dataDirectory, "storage") }),
    startPayments({
      port: ports.payments,
      dataDirectory,
      secretKey: options.paymentsKey,
      webhookUrl: options.webhookUrl,
      webhookSecret: options.webhookSecret,
      retryDelays: options.retryDelays,
    }),
    startMail({ port: ports.smtp, inboxPort: ports.inbox, dataDirectory }),
    startCarrier({ port: ports.carrier, dataDirectory, key: options.carrierKey }),
  ]);
  const [storage, payments, mail, carrier] = started;
  if (
    storage.status === "rejected" ||
    payments.status === "rejected" ||
    mail.status === "rejected" ||
    carrier.status === "rejected"
  ) {
    await Promise.all(started.map((fake) => (fake.status === "fulfilled" ? fake.value.stop() : undefined)));
    throw started.find((fake) => fake.status === "rejected")?.reason;
  }
  const fakes = {
    storage: storage.value,
    payments: payments.value,
    mail: mail.value,
    carrier: carrier.value,
  };
  return {
    ...fakes,
    unexpected: () => Object.values(fakes).flatMap((fake) => fake.unexpected),
    async stop() {
      await Promise.all(Object.values(fakes).map((fake) => fake.stop()));
    },
  };
}
