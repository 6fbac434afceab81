export interface Mail {
  readonly subject: string;
  readonly text: string;
  readonly html: string;
}

export interface MailContent {
  readonly shopName: string;
  readonly recipientName: string;
  readonly subject: string;
  readonly paragraphs: readonly string[];
  readonly action?: { readonly label: string; readonly url: string };
  /** Measures and amounts, set in columns of equal digits. */
  readonly rows?: readonly { readonly label: string; readonly value: string }[];
  /** Words of people, each under who wrote them and when; their line breaks are kept. */
  readonly quotes?: readonly {
    readonly from: string;
    readonly words: string;
    readonly notes: readonly string[];
  }[];
  /** Small print under the rule. */
  readonly foot?: string;
  /** For mails that the recipient may turn off: what is turned off, and where. */
  readonly unsubscribe?: Unsubscribe | undefined;
}

export interface Unsubscribe {
  readonly what: string;
  readonly url: string;
}

const INK = "#1c1e1a";
const SOFT = "#5d594f";
const BLUE = "#1d3fb8";
const LINE = "#d8cfbd";
const GROUND = "#f4eee2";
const SHEET = "#fffdf8";
const SANS = "'Public Sans','Helvetica Neue',Arial,sans-serif";
const MONO = "'Roboto Mono',Menlo,Consolas,monospace";

/** One look for every mail, readable without pictures; the plain text says the same. */
export function mailLayout(content: MailContent): Mail {
  return { subject: content.subject, text: plainText(content), html: html(content) };
}

function plainText({
  shopName,
  recipientName,
  paragraphs,
  quotes = [],
  action,
  rows = [],
  foot,
  unsubscribe,
}: MailContent): string {
  const widest = Math.max(0, ...rows.map(({ label }) => label.length));
  return [
    `${recipientName},`,
    ...paragraphs,
    ...quotes.map(({ from, words, notes }) =>
      [from, ...words.split("\n").map((line) => `> ${line}`.trimEnd()), ...notes].join("\n"),
    ),
    ...(rows.length > 0
      ? [rows.map(({ label, value }) => `${label.padEnd(widest)}  ${value}`).join("\n")]
      : []),
    ...(action ? [`${action.label}:\n${action.url}`] : []),
    `${shopName}`,
    ...(foot ? [foot] : []),
    ...(unsubscribe ? [`${turnOff(unsubscribe)}:\n${unsubscribe.url}`] : []),
  ].join("\n\n");
}

const turnOff = ({ what }: Unsubscribe): string => `Turn off mails about ${what}`;

function html({
  shopName,
  recipientName,
  subject,
  paragraphs,
  quotes = [],
  action,
  rows = [],
  foot,
  unsubscribe,
}: MailContent): string {
  const paragraph = (words: string) => `<p style="margin:0 0 14px">${escapeHtml(words)}</p>`;
  const row = ({ label, value }: { label: string; value: string }) =>
    `<div style="border-bottom:1px solid ${LINE};padding:6px 0;overflow:hidden"><span>${escapeHtml(label)}</span><span style="float:right;font-family:${MONO}">${escapeHtml(value)}</span></div>`;
  const quote = ({ from, words, notes }: NonNullable<MailContent["quotes"]>[number]) =>
    `<div style="margin:0 0 16px;padding:2px 0 2px 14px;border-left:3px solid ${BLUE}"><div style="color:${SOFT};font-size:13px">${escapeHtml(from)}</div>${words === "" ? "" : `<div>${escapeHtml(words).replaceAll("\n", "<br>")}</div>`}${notes.map((note) => `<div style="color:${SOFT};font-size:13px">${escapeHtml(note)}</div>`).join("")}</div>`;
  return `<!doctype html>
<html lang="en">
<head><meta charset="utf-8"><meta name="viewport" content="width=device-width"><meta name="color-scheme" content="light"><title>${escapeHtml(subject)}</title></head>
<body style="margin:0;padding:24px 12px;background:${GROUND};color:${INK};font:15px/1.5 ${SANS}">
<div style="max-width:560px;margin:0 auto;background:${SHEET};border:1px solid ${LINE};border-radius:3px;padding:28px">
<div style="font-family:${MONO};font-weight:600;font-size:17px;margin-bottom:20px">kerf<span style="color:${BLUE}">|</span>post</div>
<h1 style="font-size:20px;line-height:1.3;margin:0 0 16px">${escapeHtml(subject)}</h1>
${paragraph(`${recipientName},`)}
${paragraphs.map(paragraph).join("\n")}
${quotes.map(quote).join("\n")}
${rows.length > 0 ? `<div style="margin:0 0 18px;border-top:1px solid ${LINE}">${rows.map(row).join("")}</div>` : ""}
${action ? `<p style="margin:20px 0"><a href="${escapeHtml(action.url)}" style="display:inline-block;background:${BLUE};color:#ffffff;text-decoration:none;font-weight:600;padding:10px 18px;border-radius:3px">${escapeHtml(action.label)}</a></p><p style="margin:0 0 14px;color:${SOFT};font-size:13px;word-break:break-all">${escapeHtml(action.url)}</p>` : ""}
<p style="margin:18px 0 0;padding-top:14px;border-top:1px solid ${LINE};color:${SOFT};font-size:13px">${escapeHtml(shopName)}${foot ? `<br>${escapeHtml(foot)}` : ""}${unsubscribe ? `<br><a href="${escapeHtml(unsubscribe.url)}" style="color:${SOFT}">${escapeHtml(turnOff(unsubscribe))}</a>` : ""}</p>
</div>
</body>
</html>`;
}

const ENTITIES: Readonly<Record<string, string>> = {
  "&": "&amp;",
  "<": "&lt;",
  ">": "&gt;",
  '"': "&quot;",
  "'": "&#39;",
};
const escapeHtml = (words: string): string => words.replace(/[&<>"']/g, (sign) => ENTITIES[sign] ?? sign);
