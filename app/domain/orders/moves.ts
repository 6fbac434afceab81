import { allReached, type PieceFacts, stageFromPieces } from "./pieces";
import type { Role } from "./role";
import type { Stage } from "./stage";

/** What a move is decided on, as read in the transaction that makes it. */
export interface OrderFacts {
  readonly stage: Stage;
  readonly heldFrom: Stage | null;
  readonly unitsConfirmed: boolean;
  readonly stockChosen: boolean;
  readonly deliveryChosen: boolean;
  /** Findings that nobody may pass, and those the builder has not answered. */
  readonly openStops: number;
  readonly unansweredAsks: number;
  readonly quote: { readonly open: boolean; readonly expired: boolean; readonly approved: boolean } | null;
  /** A person has to look before it can be paid, and has not. */
  readonly reviewOpen: boolean;
  /** Integer cents still owed; zero or less is paid. */
  readonly owed: number;
  readonly pieces: readonly PieceFacts[];
  /** A locked nest holds pieces of it; the router has begun on one. */
  readonly nestLocked: boolean;
  readonly cuttingBegun: boolean;
}

type Mover = Role | "system";

const NEEDS = {
  units: (facts) => facts.unitsConfirmed || "Confirm the size of each drawing first.",
  stock: (facts) => facts.stockChosen || "Choose the stock of each drawing first.",
  delivery: (facts) => facts.deliveryChosen || "Say where it goes: an address, or pick-up.",
  "no-stops": (facts) =>
    facts.openStops === 0 ||
    `${count(facts.openStops, "finding")} must be mended before this order can go on.`,
  "asks-answered": (facts) =>
    facts.unansweredAsks === 0 ||
    `${count(facts.unansweredAsks, "finding")} still ${facts.unansweredAsks === 1 ? "waits" : "wait"} for the builder's answer.`,
  "quote-open": (facts) =>
    facts.quote === null
      ? "There is no quote yet."
      : facts.quote.expired
        ? "The quote has expired; price it again."
        : facts.quote.open || "The quote is no longer open.",
  approved: (facts) => facts.quote?.approved || "The builder has not approved the part list and sizes.",
  reviewed: (facts) => !facts.reviewOpen || "A person in the shop looks at this order first.",
  "paid-in-full": (facts) => facts.owed <= 0 || "The order is not paid in full.",
  "pieces-ready": (facts) =>
    allReached(facts.pieces, "tabs-removed") || "Not every piece has its tabs off; remakes count too.",
  "nothing-nested": (facts) =>
    !facts.nestLocked || "Its parts lie on a locked nest: the shop has to cancel it.",
  "nothing-cut": (facts) => !facts.cuttingBegun || "The router has begun on it.",
  "held-from-known": (facts) => facts.heldFrom !== null || "Nobody wrote down where it was held.",
} as const satisfies Record<string, (facts: OrderFacts) => true | string>;
export type Need = keyof typeof NEEDS;

interface Move {
  readonly from: readonly Stage[];
  /** A stage; or what its pieces say after the act; or where it was held. */
  readonly to: Stage | "as-pieces-say" | "where-it-was-held" | "one-step-back";
  readonly by: readonly Mover[];
  readonly needs: readonly Need[];
  /** Staff write down why. */
  readonly reason?: true;
}

const FLOOR: readonly Mover[] = ["operator", "owner"];
const STAFF: readonly Mover[] = ["operator", "clerk", "owner"];

/** Every way an order's stage can change. */
export const MOVES = {
  quote: {
    from: ["draft"],
    to: "quoted",
    by: ["builder"],
    needs: ["units", "stock", "delivery", "no-stops"],
  },
  revise: { from: ["quoted", "needs-review"], to: "draft", by: ["builder"], needs: [] },
  "ask-review": { from: ["quoted"], to: "needs-review", by: ["builder", "system"], needs: ["quote-open"] },
  /** By the system when the last question is answered and nobody else has to look. */
  "accept-review": { from: ["needs-review"], to: "quoted", by: [...FLOOR, "system"], needs: ["no-stops"] },
  "send-back": { from: ["needs-review"], to: "draft", by: FLOOR, needs: [], reason: true },
  pay: {
    from: ["quoted"],
    to: "paid",
    by: ["system"],
    needs: ["no-stops", "asks-answered", "approved", "reviewed", "paid-in-full"],
  },
  receive: { from: ["paid"], to: "received", by: FLOOR, needs: ["paid-in-full"] },
  nest: { from: ["received", "nested", "cut", "tabs-removed"], to: "as-pieces-say", by: FLOOR, needs: [] },
  "drop-nest": {
    from: ["received", "nested", "cut", "tabs-removed"],
    to: "as-pieces-say",
    by: FLOOR,
    needs: [],
    reason: true,
  },
  cut: { from: ["received", "nested", "cut", "tabs-removed"], to: "as-pieces-say", by: FLOOR, needs: [] },
  "remove-tabs": { from: ["nested", "cut", "tabs-removed"], to: "as-pieces-say", by: FLOOR, needs: [] },
  remake: {
    from: ["nested", "cut", "tabs-removed"],
    to: "as-pieces-say",
    by: STAFF,
    needs: [],
    reason: true,
  },
  ship: {
    from: ["tabs-removed"],
    to: "as-pieces-say",
    by: ["clerk", "owner"],
    needs: ["paid-in-full", "pieces-ready"],
  },
  hold: {
    from: ["quoted", "needs-review", "paid", "received", "nested", "cut", "tabs-removed"],
    to: "on-hold",
    by: STAFF,
    needs: [],
    reason: true,
  },
  release: { from: ["on-hold"], to: "where-it-was-held", by: STAFF, needs: ["held-from-known"] },
  cancel: {
    from: ["draft", "quoted", "needs-review", "paid", "received"],
    to: "cancelled",
    by: ["builder", ...FLOOR],
    needs: ["nothing-nested"],
  },
  "cancel-late": {
    from: ["paid", "received", "nested", "cut", "tabs-removed", "on-hold"],
    to: "cancelled",
    by: FLOOR,
    needs: [],
    reason: true,
  },
  undo: {
    from: ["received", "nested", "cut", "tabs-removed"],
    to: "one-step-back",
    by: STAFF,
    needs: [],
    reason: true,
  },
  "undo-ship": { from: ["shipped"], to: "one-step-back", by: ["owner"], needs: [], reason: true },
} as const satisfies Record<string, Move>;
export type MoveName = keyof typeof MOVES;
export const MOVE_NAMES = Object.keys(MOVES) as readonly MoveName[];

/** Where `undo` leads from each stage when the order moved as a whole. */
export const STEP_BACK: Partial<Record<Stage, Stage>> = {
  received: "paid",
  nested: "received",
  cut: "nested",
  "tabs-removed": "cut",
  shipped: "tabs-removed",
};

export type MoveVerdict =
  | { readonly ok: true; readonly to: Stage }
  | {
      readonly ok: false;
      readonly why: "unknown" | "not-allowed" | "wrong-stage" | "reason" | Need;
      /** Plain words for the person who tried. */
      readonly words: string;
    };

/**
 * Whether a person with these roles (or the system) may make the move now, and where it leads. For a move that
 * follows from pieces, `to` is what the pieces say as given: ask again with them as they stand after the act.
 */
export function checkMove(
  name: string,
  facts: OrderFacts,
  by: readonly Role[] | "system",
  reason?: string | null,
): MoveVerdict {
  if (!Object.hasOwn(MOVES, name)) return { ok: false, why: "unknown", words: "There is no such act." };
  const move: Move = MOVES[name as MoveName];
  const movers: readonly Mover[] = by === "system" ? ["system"] : by;
  if (!movers.some((mover) => move.by.includes(mover)))
    return { ok: false, why: "not-allowed", words: "This is not yours to do." };
  if (!move.from.includes(facts.stage))
    return { ok: false, why: "wrong-stage", words: `The order is ${facts.stage}: this cannot be done now.` };
  for (const need of move.needs) {
    const met = NEEDS[need](facts);
    if (met !== true) return { ok: false, why: need, words: met || "Something is missing." };
  }
  if (move.reason && !reason?.trim()) return { ok: false, why: "reason", words: "Write down why." };
  return { ok: true, to: destination(move, facts) };
}

function destination(move: Move, facts: OrderFacts): Stage {
  switch (move.to) {
    case "as-pieces-say":
      return stageFromPieces(facts.pieces) ?? facts.stage;
    case "where-it-was-held":
      return facts.heldFrom ?? facts.stage;
    case "one-step-back":
      return STEP_BACK[facts.stage] ?? facts.stage;
    default:
      return move.to;
  }
}

const count = (number: number, noun: string): string => `${number} ${noun}${number === 1 ? "" : "s"}`;
