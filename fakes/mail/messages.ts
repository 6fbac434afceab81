/** Caught mails: parsed, kept in order of arrival, in one JSON file when there is a data directory. */
import { randomUUID } from "node:crypto";
import { type AddressObject, simpleParser } from "mailparser";
import type { JsonFile } from "../json-file";

export interface CaughtAttachment {
  filename: string;
  contentType: string;
  /** Bytes, in base64. */
  content: string;
}

export interface CaughtMail {
  id: string;
  /** ISO instant. */
  receivedAt: string;
  /** Envelope addresses, in lower case: who it was really given to. */
  from: string;
  to: string[];
  /** The From header as it reads. */
  sender: string;
  subject: string;
  messageId: string;
  /** Header names in lower case with their values as sent. */
  headers: Record<string, string>;
  text: string;
  html: string;
  attachments: CaughtAttachment[];
}

export class Mailbox {
  private readonly file: JsonFile<CaughtMail[]>;
  private mails: CaughtMail[];

  constructor(file: JsonFile<CaughtMail[]>) {
    this.file = file;
    this.mails = file.read() ?? [];
  }

  async take(raw: Buffer, envelope: { from: string; to: string[] }): Promise<CaughtMail> {
    const parsed = await simpleParser(raw, { skipHtmlToText: true, skipTextToHtml: true });
    const headers: Record<string, string> = {};
    for (const { key, line } of parsed.headerLines) headers[key] = line.slice(line.indexOf(":") + 1).trim();
    const mail: CaughtMail = {
      id: randomUUID(),
      receivedAt: new Date().toISOString(),
      from: envelope.from.toLowerCase(),
      to: envelope.to.map((address) => address.toLowerCase()),
      sender: addressText(parsed.from),
      subject: parsed.subject ?? "",
      messageId: parsed.messageId ?? "",
      headers,
      text: parsed.text ?? "",
      html: parsed.html || "",
      attachments: parsed.attachments.map(({ filename, contentType, content }) => ({
        filename: filename ?? "",
        contentType,
        content: content.toString("base64"),
      })),
    };
    this.mails.push(mail);
    this.file.write(this.mails);
    return mail;
  }

  /** Oldest first; with an address only the mails given to it. */
  list(to?: string): CaughtMail[] {
    const address = to?.toLowerCase();
    return this.mails.filter((mail) => !address || mail.to.includes(address));
  }

  find(id: string): CaughtMail | undefined {
    return this.mails.find((mail) => mail.id === id);
  }

  clear() {
    this.mails = [];
    this.file.write(this.mails);
  }
}

function addressText(address: AddressObject | undefined): string {
  return address?.text ?? "";
}
