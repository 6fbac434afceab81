import { type Mail, mailLayout } from "./layout";

export interface OwnerAttentionFacts {
  readonly shopName: string;
  readonly name: string;
  readonly subject: string;
  readonly words: string;
  readonly url: string;
}

export const ownerAttentionMail = ({ shopName, name, subject, words, url }: OwnerAttentionFacts): Mail =>
  mailLayout({
    shopName,
    recipientName: name,
    subject,
    paragraphs: [words],
    action: { label: "Look at the order", url },
  });
