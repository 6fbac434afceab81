import { type Mail, mailTime, type OrderMailFacts, orderMail } from "./order-mail";

export interface MailedMessage {
  readonly authorName: string;
  readonly writtenAt: Date;
  /** May be empty when files came alone. */
  readonly body: string;
  readonly partLabel: string | null;
  /** A spot on the drawing, millimetres. */
  readonly spot: { readonly x: number; readonly y: number } | null;
  readonly files: readonly string[];
}

export interface MessageMailFacts extends OrderMailFacts {
  /** Oldest first, at least one. */
  readonly messages: readonly MailedMessage[];
  /** There are older ones that are not told here. */
  readonly earlier: boolean;
}

/** What the other side wrote in an order's thread; several that came close together in one mail. */
export function messageMail(facts: MessageMailFacts): Mail {
  const { messages, earlier, reference, orderName } = facts;
  const names = [...new Set(messages.map(({ authorName }) => authorName))].join(" and ");
  const one = messages.length === 1;
  return orderMail(facts, {
    subject: one
      ? `${names} wrote on ${reference}`
      : `${earlier ? "More than " : ""}${messages.length} messages on ${reference} from ${names}`,
    paragraphs: [
      `In the thread of ${reference} (${orderName}${earlier ? "; the earlier ones stand there" : ""}):`,
    ],
    quotes: messages.map((message) => ({
      from: `${message.authorName}, ${mailTime(message.writtenAt, facts.timeZone)}`,
      words: message.body,
      notes: notesOf(message),
    })),
    action: "Answer on the order's page",
    foot: "Answers to this mail reach nobody: write on the order's page.",
  });
}

function notesOf({ partLabel, spot, files }: MailedMessage): string[] {
  const place = spot ? ` at ${spot.x.toFixed(1)}, ${spot.y.toFixed(1)} mm` : "";
  const points = partLabel ? `About part ${partLabel}${place}.` : spot ? `About the drawing${place}.` : null;
  return [
    ...(points ? [points] : []),
    ...(files.length > 0
      ? [`With ${files.length === 1 ? "the file" : "the files"} ${files.join(", ")}.`]
      : []),
  ];
}
