/**
 * What a flow answers. A refusal has a code for the program and words for the person; the route turns the code
 * into a status.
 */
export const REFUSAL_STATUS = {
  "not-found": 404,
  "not-allowed": 403,
  /** Somebody else changed it since it was read. */
  changed: 409,
  "wrong-stage": 409,
  /** Something must be said or chosen first. */
  incomplete: 422,
  invalid: 422,
  "open-findings": 422,
  unverified: 403,
  "out-of-stock": 409,
  expired: 410,
  "already-paid": 409,
  unpaid: 402,
  "too-much": 422,
  /** A hosted service does not answer; trying again later is right. */
  unavailable: 503,
  "no-room": 409,
} as const;
export type RefusalReason = keyof typeof REFUSAL_STATUS;

export interface Refusal {
  readonly ok: false;
  readonly reason: RefusalReason;
  readonly words: string;
}
export type Verdict<Value extends object = object> = ({ readonly ok: true } & Value) | Refusal;

export const refuse = (reason: RefusalReason, words: string): Refusal => ({ ok: false, reason, words });

export const CHANGED = refuse(
  "changed",
  "Somebody changed this order while you were looking at it. Nothing was done; look at it again.",
);
export const NO_ORDER = refuse("not-found", "There is no such order.");

/** Thrown inside a transaction so that it is rolled back and the refusal is still the flow's answer. */
export class Refused extends Error {
  readonly refusal: Refusal;
  constructor(refusal: Refusal) {
    super(refusal.words);
    this.refusal = refusal;
  }
}

/** Ends the transaction with a refusal when the inner verdict is one. */
export function orRollBack<Value extends object>(verdict: Verdict<Value>): { readonly ok: true } & Value {
  if (!verdict.ok) throw new Refused(verdict);
  return verdict;
}

/** Turns a rolled-back refusal into the flow's answer. */
export async function answering<Value extends object>(
  work: () => Promise<Verdict<Value>>,
): Promise<Verdict<Value>> {
  try {
    return await work();
  } catch (error) {
    if (error instanceof Refused) return error.refusal;
    throw error;
  }
}
