import { environment } from "~/server/environment.server";
import { type Carrier, createCarrier } from "./carrier.server";
import { createMail, type Mail } from "./mail.server";
import { createPayments, type Payments } from "./payments.server";
import { createStorage, type Storage } from "./storage.server";

export interface Clients {
  readonly storage: Storage;
  readonly payments: Payments;
  readonly mail: Mail;
  readonly carrier: Carrier;
}

/** One of each a process, kept where a reload of this module in development finds them again. */
const shelf = globalThis as { kerfpostClients?: Partial<Clients> };

/** Puts other clients in place of the environment's, for tests; the caller closes them. */
export function putClients(clients: Clients | undefined): void {
  if (clients) shelf.kerfpostClients = clients;
  else delete shelf.kerfpostClients;
}

const makers: { readonly [Name in keyof Clients]: () => Clients[Name] } = {
  storage: () =>
    createStorage({
      endpoint: environment.S3_ENDPOINT,
      region: environment.S3_REGION,
      bucket: environment.S3_BUCKET,
      accessKeyId: environment.S3_ACCESS_KEY_ID,
      secretAccessKey: environment.S3_SECRET_ACCESS_KEY,
    }),
  payments: () =>
    createPayments({
      secretKey: environment.STRIPE_SECRET_KEY,
      webhookSecret: environment.STRIPE_WEBHOOK_SECRET,
      apiUrl: environment.STRIPE_API_URL,
    }),
  mail: () => createMail({ smtpUrl: environment.SMTP_URL, from: environment.MAIL_FROM }),
  carrier: () => createCarrier({ apiUrl: environment.CARRIER_URL, key: environment.CARRIER_KEY }),
};

/** A client made from the environment at its first use. */
function client<Name extends keyof Clients>(name: Name): Clients[Name] {
  return new Proxy({} as Clients[Name], {
    get(_, property) {
      shelf.kerfpostClients ??= {};
      const clients: Partial<Clients> = shelf.kerfpostClients;
      clients[name] ??= makers[name]();
      return Reflect.get(clients[name] as object, property);
    },
  });
}

export const storage = client("storage");
export const payments = client("payments");
export const mail = client("mail");
export const carrier = client("carrier");
