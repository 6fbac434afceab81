/** The hosted pay page, its confirm step and receipts: plain HTML with a look of its own. */
import type { IncomingMessage, ServerResponse } from "node:http";
import { escapeHtml, readBody, redirect, sendHtml } from "../local-server";
import { type Card, type CardFields, checkCard } from "./cards";
import type { Desk, PayResult } from "./desk";
import { PaymentsFailure } from "./errors";
import type { CheckoutSession } from "./objects";

export interface PayPageParts {
  desk: Desk;
  /** Seconds since 1970. */
  now(): number;
  /** Called before and after an act, so that events name no request and state is kept. */
  acting(): void;
  changed(): void;
}

export type PayPage = ReturnType<typeof createPayPage>;

const EMPTY: CardFields = { email: "", number: "", expiry: "", cvc: "" };

/** The pages of one started fake; cards that wait for confirmation are kept in memory only. */
export function createPayPage(parts: PayPageParts) {
  const waiting = new Map<string, { card: Card; email: string }>();

  /** One attempt with the fields of the form; the same path serves the browser and tests. */
  function submit(
    sessionId: string,
    fields: CardFields,
  ): PayResult | { kind: "invalid"; field: string; message: string } {
    parts.acting();
    const session = parts.desk.session(sessionId);
    if (session.status !== "open") return { kind: "closed", session };
    const check = checkCard(fields, parts.now());
    if (!check.ok) return { kind: "invalid", field: check.field, message: check.message };
    const result = parts.desk.pay(sessionId, check.card, check.email);
    if (result.kind === "confirm") waiting.set(sessionId, { card: check.card, email: check.email });
    parts.changed();
    return result;
  }

  /** The answer to the confirm step. */
  function confirm(sessionId: string, confirmed: boolean): PayResult {
    parts.acting();
    const entry = waiting.get(sessionId);
    if (!entry) return { kind: "closed", session: parts.desk.session(sessionId) };
    waiting.delete(sessionId);
    const result = parts.desk.confirm(sessionId, entry.card, entry.email, confirmed);
    parts.changed();
    return result;
  }

  async function answerPay(
    request: IncomingMessage,
    response: ServerResponse,
    sessionId: string,
    step: string,
  ) {
    const session = parts.desk.session(sessionId);
    if (request.method === "GET") return showSession(response, session);
    const form = new URLSearchParams(await readBody(request));
    if (step === "confirm")
      return showResult(response, session, confirm(sessionId, form.get("answer") === "yes"), EMPTY);
    const fields = {
      email: form.get("email") ?? session.customer_email ?? "",
      number: form.get("number") ?? "",
      expiry: form.get("expiry") ?? "",
      cvc: form.get("cvc") ?? "",
    };
    showResult(response, session, submit(sessionId, fields), fields);
  }

  function showSession(response: ServerResponse, session: CheckoutSession) {
    if (session.status === "open")
      return sendHtml(
        response,
        200,
        payForm(session, lines(session), { ...EMPTY, email: session.customer_email ?? "" }),
      );
    sendHtml(response, session.status === "expired" ? 410 : 200, closedPage(session));
  }

  function showResult(
    response: ServerResponse,
    session: CheckoutSession,
    result: ReturnType<typeof submit>,
    fields: CardFields,
  ) {
    if (result.kind === "paid") return redirect(response, successUrl(result.session));
    if (result.kind === "confirm") return sendHtml(response, 200, confirmPage(session));
    if (result.kind === "closed" && result.session.status === "complete")
      return redirect(response, successUrl(result.session));
    if (result.kind === "closed") return showSession(response, result.session);
    const page = payForm(session, lines(session), fields, {
      message: result.message,
      field: result.kind === "invalid" ? result.field : "number",
    });
    sendHtml(response, result.kind === "declined" ? 402 : 400, page);
  }

  const lines = (session: CheckoutSession) =>
    parts.desk.sessionDetails(session.id).lineItems.map(({ description, amount_total, currency }) => ({
      description,
      amount: money(amount_total, currency),
    }));

  return {
    submit,
    confirm,
    /** Answers /pay/:id, /pay/:id/confirm and /receipts/:id; false when the path is none of them. */
    async answer(request: IncomingMessage, response: ServerResponse, path: string): Promise<boolean> {
      const pay = /^\/pay\/(\w+)(?:\/(confirm))?$/.exec(path);
      const receipt = /^\/receipts\/(\w+)$/.exec(path);
      if (!pay && !receipt) return false;
      try {
        if (pay) await answerPay(request, response, pay[1] ?? "", pay[2] ?? "pay");
        else sendHtml(response, 200, receiptPage(parts.desk, receipt?.[1] ?? ""));
      } catch (error) {
        if (!(error instanceof PaymentsFailure)) throw error;
        sendHtml(
          response,
          404,
          frame("Not found", `<h1>Nothing here</h1><p>${escapeHtml(error.message)}</p>`),
        );
      }
      return true;
    },
  };
}

/** The success address with the session's id put in, as the real service does. */
export function successUrl(session: CheckoutSession): string {
  return session.success_url.replaceAll("{CHECKOUT_SESSION_ID}", session.id);
}

function money(amount: number, currency: string): string {
  return new Intl.NumberFormat("en-US", { style: "currency", currency: currency.toUpperCase() }).format(
    amount / 100,
  );
}

function payForm(
  session: CheckoutSession,
  lines: { description: string; amount: string }[],
  fields: CardFields,
  problem?: { message: string; field: string },
): string {
  const amount = money(session.amount_total, session.currency);
  const field = (name: keyof CardFields, label: string, attributes: string) => {
    const wrong = problem?.field === name;
    return `<label>${label}<input name="${name}" id="${name}" value="${escapeHtml(fields[name])}" required ${attributes}${
      wrong ? ' aria-invalid="true" aria-describedby="problem" autofocus' : ""
    }></label>`;
  };
  return frame(
    `Pay ${amount}`,
    `<h1><small>To pay</small> ${amount}</h1>
<ul class="lines">${lines
      .map(
        ({ description, amount: price }) =>
          `<li><span>${escapeHtml(description)}</span><span>${price}</span></li>`,
      )
      .join("")}</ul>
${problem ? `<p id="problem" role="alert">${escapeHtml(problem.message)}</p>` : ""}
<form method="post" action="/pay/${session.id}">
${field("email", "E-mail", `type="email" autocomplete="email"${session.customer_email ? " readonly" : ""}`)}
${field("number", "Card number", 'inputmode="numeric" autocomplete="cc-number" placeholder="4242 4242 4242 4242"')}
<div class="pair">${field("expiry", "Expiry (MM/YY)", 'autocomplete="cc-exp" placeholder="12/34"')}
${field("cvc", "CVC", 'inputmode="numeric" autocomplete="cc-csc" placeholder="123"')}</div>
<button>Pay ${amount}</button>
</form>
${session.cancel_url ? `<p><a href="${escapeHtml(session.cancel_url)}">Cancel and go back</a></p>` : ""}
<details><summary>Test cards</summary><dl>
<dt>4242 4242 4242 4242</dt><dd>is charged</dd>
<dt>4000 0025 0000 3155</dt><dd>asks for a confirmation first</dd>
<dt>4000 0000 0000 0002</dt><dd>is declined</dd>
<dt>4000 0000 0000 9995</dt><dd>lacks funds</dd>
<dt>4000 0000 0000 0069</dt><dd>has expired</dd>
<dt>4000 0000 0000 0127</dt><dd>has a wrong security code</dd>
</dl></details>`,
  );
}

function confirmPage(session: CheckoutSession): string {
  return frame(
    "Confirm the payment",
    `<h1>Your bank asks</h1><p>Is this payment of <b>${money(session.amount_total, session.currency)}</b> yours?</p>
<form method="post" action="/pay/${session.id}/confirm">
<button name="answer" value="yes">Yes, confirm</button> <button name="answer" value="no" class="quiet">No, refuse</button>
</form>`,
  );
}

function closedPage(session: CheckoutSession): string {
  const paid = session.status === "complete";
  const back = paid ? successUrl(session) : session.cancel_url;
  return frame(
    paid ? "Paid" : "Expired",
    `<h1>${paid ? "This is already paid" : "This payment page has expired"}</h1>
<p>${paid ? "Nothing more was charged." : "Nothing was charged. Go back and start the payment again."}</p>
${back ? `<p><a href="${escapeHtml(back)}">Go back</a></p>` : ""}`,
  );
}

function receiptPage(desk: Desk, chargeId: string): string {
  const charge = desk.charge(chargeId);
  const { brand, last4 } = charge.payment_method_details.card;
  return frame(
    "Receipt",
    `<h1><small>Receipt</small> ${money(charge.amount, charge.currency)}</h1>
<dl><dt>For</dt><dd>${escapeHtml(charge.description ?? "")}</dd><dt>Card</dt><dd>${brand} ending in ${last4}</dd>
<dt>Paid</dt><dd>${new Date(charge.created * 1000).toISOString().slice(0, 10)}</dd>
<dt>Refunded</dt><dd>${money(charge.amount_refunded, charge.currency)}</dd></dl>`,
  );
}

function frame(title: string, body: string): string {
  return `<!doctype html><html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width">
<title>${escapeHtml(title)}</title><style>
body{margin:0;background:#e9edf0;color:#16202a;font:16px/1.5 system-ui,sans-serif}
main{max-width:26rem;margin:2rem auto;padding:1.5rem;background:#fff;border-top:.5rem solid #2f5d62}
header{font-size:.85rem;color:#46535f}h1{font-size:1.7rem;margin:.5rem 0}h1 small{display:block;font-size:.9rem;font-weight:400}
label{display:block;margin:.8rem 0;font-size:.9rem}input{display:block;box-sizing:border-box;width:100%;padding:.6rem;font:inherit;border:1px solid #76838f}
input[aria-invalid]{border:2px solid #a3262a}#problem{color:#a3262a;font-weight:600}.pair{display:grid;grid-template-columns:1fr 1fr;gap:1rem}
button{padding:.7rem 1.2rem;font:inherit;font-weight:600;color:#fff;background:#2f5d62;border:2px solid #2f5d62}button.quiet{color:#2f5d62;background:#fff}
.lines{list-style:none;margin:0;padding:0}.lines li{display:flex;justify-content:space-between;gap:1rem}dt{font-family:monospace}a{color:#1d4d52}
:focus-visible{outline:3px solid #d98e04;outline-offset:2px}
</style></head><body><main><header>Local payment stand-in. No money moves, no real card is taken.</header>
${body}
</main></body></html>`;
}
