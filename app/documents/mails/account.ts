import { type Mail, mailLayout } from "./layout";

interface AccountMailFacts {
  readonly shopName: string;
  readonly recipientName: string;
  readonly url: string;
}

export const verificationMail = ({ url, ...facts }: AccountMailFacts): Mail =>
  mailLayout({
    ...facts,
    subject: "Confirm your e-mail address",
    paragraphs: [
      "Press the button and your address is confirmed. You can upload and price drawings before that; paying waits for it.",
      "The link works for one day.",
    ],
    action: { label: "Confirm my address", url },
    foot: "If you did not make an account here, do nothing.",
  });

export const resetMail = ({ url, ...facts }: AccountMailFacts): Mail =>
  mailLayout({
    ...facts,
    subject: "Choose a new password",
    paragraphs: ["Somebody asked for a new password for this address. The link works for one hour, once."],
    action: { label: "Choose a new password", url },
    foot: "If it was not you, do nothing: the old password stays.",
  });

export const invitationMail = (
  facts: AccountMailFacts & { readonly invitedBy: string; readonly roles: readonly string[] },
): Mail =>
  mailLayout({
    shopName: facts.shopName,
    recipientName: facts.recipientName,
    subject: `Work with us at ${facts.shopName}`,
    paragraphs: [
      `${facts.invitedBy} invites you to the shop's order desk as ${facts.roles.join(" and ")}.`,
      "The link works for seven days, once.",
    ],
    action: { label: "Accept the invitation", url: facts.url },
  });
