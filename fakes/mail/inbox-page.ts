/** The inbox: a list of caught mails, one mail with its HTML and plain parts, and JSON for tests. */
import type { IncomingMessage, ServerResponse } from "node:http";
import { escapeHtml, sendHtml, sendJson, type Unexpected } from "../local-server";
import type { CaughtMail, Mailbox } from "./messages";

/** Answers the inbox's requests: `/`, `/messages/:id`, `/messages/:id/html`, `/api/messages`, `/api/messages/:id`. */
export async function answerInbox(
  request: IncomingMessage,
  response: ServerResponse,
  mailbox: Mailbox,
  unexpected: Unexpected[],
) {
  const address = new URL(request.url ?? "/", "http://inbox");
  const method = request.method ?? "GET";
  const to = address.searchParams.get("to") ?? undefined;
  if (address.pathname === "/api/messages" && method === "DELETE") {
    mailbox.clear();
    response.writeHead(204).end();
    return;
  }
  if (method === "GET") {
    if (address.pathname === "/") return sendHtml(response, 200, listPage(mailbox.list(to)));
    if (address.pathname === "/api/messages") return sendJson(response, 200, mailbox.list(to));
    if (address.pathname === "/_fake/unexpected") return sendJson(response, 200, unexpected);
    const single = /^\/(api\/messages|messages)\/([\w-]+)(\/html)?$/.exec(address.pathname);
    const mail = single ? mailbox.find(single[2] ?? "") : undefined;
    if (single && !mail) return sendJson(response, 404, { error: "There is no such mail." });
    if (mail && single?.[1] === "api/messages" && !single[3]) return sendJson(response, 200, mail);
    if (mail && single?.[1] === "messages") {
      if (single[3]) return sendHtml(response, 200, withBase(mail.html));
      return sendHtml(response, 200, mailPage(mail));
    }
  }
  unexpected.push({ method, path: address.pathname, why: "the inbox has no such request" });
  sendJson(response, 501, { error: `The local mail stand-in does not know ${method} ${address.pathname}.` });
}

function listPage(mails: CaughtMail[]): string {
  const rows = mails
    .toReversed()
    .map(
      (mail) => `<tr><td>${escapeHtml(mail.receivedAt.slice(0, 19).replace("T", " "))}</td>
<td>${escapeHtml(mail.to.join(", "))}</td><td><a href="/messages/${mail.id}">${escapeHtml(mail.subject || "(no subject)")}</a></td></tr>`,
    )
    .join("");
  return frame(
    "Inbox",
    `<h1>Inbox</h1><p>Every mail the application sent. Nothing leaves this machine.</p>
<form><label>Sent to <input type="email" name="to"></label> <button>Show</button></form>
${rows ? `<table><thead><tr><th>Received (UTC)</th><th>To</th><th>Subject</th></tr></thead><tbody>${rows}</tbody></table>` : "<p>No mail yet.</p>"}`,
  );
}

function mailPage(mail: CaughtMail): string {
  const attachments = mail.attachments
    .map(
      ({ filename, contentType, content }) =>
        `<li><a download="${escapeHtml(filename)}" href="data:${escapeHtml(contentType)};base64,${content}">${escapeHtml(filename)}</a></li>`,
    )
    .join("");
  return frame(
    mail.subject,
    `<p><a href="/">Inbox</a></p><h1>${escapeHtml(mail.subject)}</h1>
<dl><dt>From</dt><dd>${escapeHtml(mail.sender)}</dd><dt>To</dt><dd>${escapeHtml(mail.to.join(", "))}</dd></dl>
${attachments ? `<ul>${attachments}</ul>` : ""}
${mail.html ? `<h2>As HTML</h2><iframe title="The mail as HTML" sandbox="allow-popups allow-top-navigation-by-user-activation" src="/messages/${mail.id}/html"></iframe>` : ""}
<h2>As plain text</h2><pre>${withLinks(mail.text)}</pre>`,
  );
}

/** Links of the mail leave the frame that shows it. */
function withBase(html: string): string {
  return `<base target="_top">${html}`;
}

function withLinks(text: string): string {
  return text
    .split(/(https?:\/\/[^\s<>"]+)/)
    .map((piece, index) => {
      const safe = escapeHtml(piece);
      return index % 2 === 1 ? `<a href="${safe}">${safe}</a>` : safe;
    })
    .join("");
}

function frame(title: string, body: string): string {
  return `<!doctype html><html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width">
<title>${escapeHtml(title)}</title><style>
body{max-width:60rem;margin:2rem auto;padding:0 1rem;font:16px/1.5 system-ui,sans-serif;color:#16202a;background:#fff}
table{width:100%;border-collapse:collapse}td,th{padding:.4rem .6rem .4rem 0;text-align:left;border-bottom:1px solid #ccd3d9}
iframe{width:100%;height:24rem;border:1px solid #76838f}pre{white-space:pre-wrap;background:#f3f5f6;padding:1rem}
dt{float:left;width:4rem;font-weight:600}a{color:#1d4d52}:focus-visible{outline:3px solid #d98e04}
</style></head><body>${body}</body></html>`;
}
