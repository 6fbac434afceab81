/**
 * Mail: a real SMTP server that keeps what it is given, with an inbox page to read it.
 *
 * Where it departs from a real mail host:
 * - No TLS, and any sign-in is accepted.
 * - Recipients whose local part starts with `bounce` are refused with 550, those starting with `later` with 451.
 * - Nothing is relayed and nothing bounces after it was accepted.
 */
import type { AddressInfo } from "node:net";
import { join } from "node:path";
import { SMTPServer } from "smtp-server";
import { jsonFile } from "../json-file";
import { listen, type RunningFake, type Unexpected } from "../local-server";
import { answerInbox } from "./inbox-page";
import { type CaughtMail, Mailbox } from "./messages";

export type { CaughtMail } from "./messages";

export interface MailFakeOptions {
  /** SMTP port; 0 takes any free one. */
  port: number;
  /** Port of the inbox page; 0 takes any free one. */
  inboxPort: number;
  host?: "127.0.0.1" | undefined;
  /** Mails are kept in `mail.json` there; without it in memory. */
  dataDirectory?: string | undefined;
}

export interface MailFake extends RunningFake {
  /** `port` and `smtpUrl` are the SMTP side, `url` is the inbox page. */
  smtpUrl: string;
  /** Caught mails, oldest first; with an address only those given to it. */
  messages(to?: string): CaughtMail[];
  /** Waits until a mail to `to` that fits has come; rejects after `timeout` milliseconds (5,000). */
  waitFor(to: string, fits?: (mail: CaughtMail) => boolean, timeout?: number): Promise<CaughtMail>;
  clear(): void;
  /** The next `count` mails are refused with 451 after their data, as by a host in trouble. */
  failNext(count: number): void;
}

/** Longest mail taken, in bytes; announced to the sender by the SIZE extension. */
const LARGEST_MAIL = 25 * 1024 * 1024;

/** Starts the mail fake. */
export async function startMail(options: MailFakeOptions): Promise<MailFake> {
  const host = options.host ?? "127.0.0.1";
  const mailbox = new Mailbox(jsonFile(options.dataDirectory && join(options.dataDirectory, "mail.json")));
  const unexpected: Unexpected[] = [];
  let failures = 0;
  const smtp = new SMTPServer({
    disabledCommands: ["STARTTLS"],
    authOptional: true,
    allowInsecureAuth: true,
    disableReverseLookup: true,
    size: LARGEST_MAIL,
    onAuth: (auth, _session, done) => done(null, { user: auth.username ?? "anyone" }),
    onRcptTo({ address }, _session, done) {
      if (/^bounce/i.test(address)) return done(refusal(550, `<${address}>: no such mailbox`));
      if (/^later/i.test(address)) return done(refusal(451, `<${address}>: mailbox busy, try again later`));
      done();
    },
    onData(stream, { envelope }, done) {
      const chunks: Buffer[] = [];
      stream.on("data", (chunk: Buffer) => chunks.push(chunk));
      stream.on("end", () => {
        if (stream.sizeExceeded) return done(refusal(552, "message exceeds the size limit"));
        if (failures > 0) {
          failures -= 1;
          return done(refusal(451, "local error in processing"));
        }
        const from = envelope.mailFrom ? envelope.mailFrom.address : "";
        mailbox
          .take(Buffer.concat(chunks), { from, to: envelope.rcptTo.map(({ address }) => address) })
          .then(() => done(), done);
      });
    },
  });
  // A client that breaks its connection is no failure of the server.
  smtp.on("error", () => undefined);
  await new Promise<void>((resolve, reject) => {
    smtp.server.once("error", reject);
    smtp.listen(options.port, host, resolve);
  });
  const { port } = smtp.server.address() as AddressInfo;
  const inbox = await listen((request, response) => answerInbox(request, response, mailbox, unexpected), {
    port: options.inboxPort,
    host,
  });
  return {
    url: inbox.url,
    port,
    smtpUrl: `smtp://${host}:${port}`,
    unexpected,
    messages: (to) => mailbox.list(to),
    async waitFor(to, fits = () => true, timeout = 5_000) {
      const end = Date.now() + timeout;
      for (;;) {
        const found = mailbox.list(to).findLast(fits);
        if (found) return found;
        if (Date.now() > end) throw new Error(`No such mail to ${to} within ${timeout} ms.`);
        await new Promise((resolve) => setTimeout(resolve, 10));
      }
    },
    clear: () => mailbox.clear(),
    failNext(count) {
      failures = count;
    },
    async stop() {
      await inbox.stop();
      await new Promise<void>((resolve) => smtp.close(() => resolve()));
    },
  };
}

function refusal(responseCode: number, message: string): Error {
  return Object.assign(new Error(message), { responseCode });
}
