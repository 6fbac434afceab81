/** Kinds of mail a person may turn off, with what each tells. Every other kind is necessary and always sent. */
export const OPTIONAL_MAILS = {
  stage: {
    label: "Stages",
    tells: "An order can be paid, is in the shop, nested, cut, ready, or has shipped.",
  },
  quote: { label: "Quotes", tells: "A firm price for an order, how long it holds, and what it waits for." },
  message: { label: "Messages", tells: "Somebody wrote in the thread of an order." },
} as const;

export type OptionalMail = keyof typeof OPTIONAL_MAILS;
export const OPTIONAL_MAIL_KINDS = Object.keys(OPTIONAL_MAILS) as readonly OptionalMail[];

export const isOptionalMail = (kind: string): kind is OptionalMail => Object.hasOwn(OPTIONAL_MAILS, kind);

/** Mails with a link that lets whoever has it in: their words are shown to nobody and they are not sent again. */
const SECRET_MAILS: ReadonlySet<string> = new Set(["verification", "reset", "invitation"]);
export const isSecretMail = (kind: string): boolean => SECRET_MAILS.has(kind);
