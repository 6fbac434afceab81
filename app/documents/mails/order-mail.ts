import { type Mail, mailLayout } from "./layout";

export type { Mail } from "./layout";

/** What every mail about an order says. */
export interface OrderMailFacts {
  readonly shopName: string;
  readonly recipientName: string;
  readonly reference: string;
  readonly orderName: string;
  readonly url: string;
  readonly timeZone: string;
}

/** A mail about an order, with a link to it. */
export const orderMail = (
  facts: OrderMailFacts,
  content: { readonly subject: string; readonly paragraphs: readonly string[]; readonly action: string },
): Mail =>
  mailLayout({
    shopName: facts.shopName,
    recipientName: facts.recipientName,
    subject: content.subject,
    paragraphs: content.paragraphs,
    action: { label: content.action, url: facts.url },
  });

/** `Thursday, December 3` in the shop's zone. */
export const mailDay = (instant: Date, timeZone: string): string =>
  instant.toLocaleDateString("en-US", { weekday: "long", month: "long", day: "numeric", timeZone });
