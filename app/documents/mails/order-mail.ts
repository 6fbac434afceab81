import { type Mail, type MailContent, mailLayout, type Unsubscribe } from "./layout";

export type { Mail } from "./layout";

/** What every mail about an order says. */
export interface OrderMailFacts {
  readonly shopName: string;
  readonly recipientName: string;
  readonly reference: string;
  readonly orderName: string;
  readonly url: string;
  readonly timeZone: string;
  /** Only for kinds that may be turned off. */
  readonly unsubscribe?: Unsubscribe | undefined;
}

/** A mail about an order, with a link to it. */
export const orderMail = (
  facts: OrderMailFacts,
  content: Pick<MailContent, "subject" | "paragraphs" | "rows" | "quotes" | "foot"> & {
    readonly action: string;
  },
): Mail =>
  mailLayout({
    ...content,
    shopName: facts.shopName,
    recipientName: facts.recipientName,
    action: { label: content.action, url: facts.url },
    unsubscribe: facts.unsubscribe,
  });

/** `Thursday, December 3` in the shop's zone. */
export const mailDay = (instant: Date, timeZone: string): string =>
  instant.toLocaleDateString("en-US", { weekday: "long", month: "long", day: "numeric", timeZone });

/** `Thursday, December 3, 2:05 PM` in the shop's zone. */
export const mailTime = (instant: Date, timeZone: string): string =>
  instant.toLocaleString("en-US", {
    weekday: "long",
    month: "long",
    day: "numeric",
    hour: "numeric",
    minute: "2-digit",
    timeZone,
  });
