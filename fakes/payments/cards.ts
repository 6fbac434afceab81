/** The service's published test card numbers, as far as the pay page knows them. */
export type CardOutcome =
  | { kind: "succeeds" }
  | { kind: "asks-confirmation" }
  | { kind: "declined"; code: string; declineCode?: string; message: string };

const DECLINED = "Your card was declined.";

const CARDS: Record<string, CardOutcome> = {
  "4242424242424242": { kind: "succeeds" },
  "5555555555554444": { kind: "succeeds" },
  "4000002500003155": { kind: "asks-confirmation" },
  "4000000000000002": {
    kind: "declined",
    code: "card_declined",
    declineCode: "generic_decline",
    message: DECLINED,
  },
  "4000000000009995": {
    kind: "declined",
    code: "card_declined",
    declineCode: "insufficient_funds",
    message: "Your card has insufficient funds.",
  },
  "4000000000000069": { kind: "declined", code: "expired_card", message: "Your card has expired." },
  "4000000000000127": {
    kind: "declined",
    code: "incorrect_cvc",
    message: "Your card's security code is incorrect.",
  },
};

export interface Card {
  number: string;
  expMonth: number;
  expYear: number;
  outcome: CardOutcome;
}

export interface CardFields {
  email: string;
  number: string;
  /** MM/YY. */
  expiry: string;
  cvc: string;
}

export type CardCheck =
  | { ok: true; card: Card; email: string }
  | { ok: false; field: keyof CardFields; message: string };

/** Checks the pay page's fields as its browser side would, before anything is charged. `now` in seconds. */
export function checkCard(fields: CardFields, now: number): CardCheck {
  const email = fields.email.trim();
  if (!/^[^@\s]+@[^@\s]+$/.test(email))
    return { ok: false, field: "email", message: "Your email is invalid." };
  const number = fields.number.replace(/[\s-]/g, "");
  const outcome = CARDS[number];
  if (!outcome)
    return { ok: false, field: "number", message: "This is not one of the test card numbers below." };
  const expiry = /^(\d{1,2})\s*\/\s*(\d{2})$/.exec(fields.expiry.trim());
  const expMonth = Number(expiry?.[1]);
  const expYear = 2000 + Number(expiry?.[2]);
  if (!expiry || expMonth < 1 || expMonth > 12)
    return { ok: false, field: "expiry", message: "Your card's expiration date is incomplete." };
  if (Date.UTC(expYear, expMonth) <= now * 1000)
    return { ok: false, field: "expiry", message: "Your card's expiration date is in the past." };
  if (!/^\d{3,4}$/.test(fields.cvc.trim()))
    return { ok: false, field: "cvc", message: "Your card's security code is incomplete." };
  return { ok: true, email, card: { number, expMonth, expYear, outcome } };
}

export function brandOf(number: string): string {
  return number.startsWith("5") ? "mastercard" : "visa";
}
