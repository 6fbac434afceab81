import type { PieceStage, Stage } from "~/domain/orders";

/** What an order of the queue is told by. Days are the shop's own, YYYY-MM-DD. */
export interface WaitingFacts {
  readonly stage: Stage;
  readonly holdReason: string | null;
  readonly reviewAsked: boolean;
  /** Above the sum at which a person looks first. */
  readonly overCap: boolean;
  readonly pieces: readonly {
    readonly stage: PieceStage;
    readonly state: "good" | "spoiled" | "missing" | "cancelled";
    readonly remake: boolean;
    readonly count: number;
  }[];
  readonly sheets: readonly {
    readonly status: "planned" | "cutting" | "cut" | "rejected";
    readonly run: { readonly machine: string; readonly day: string } | null;
  }[];
  readonly today: string;
  readonly dayWords: (day: string) => string;
}

export interface Waiting {
  readonly words: string;
  /** It stands still until somebody does something about it. */
  readonly blocked: boolean;
}

const parts = (count: number): string => `${count} part${count === 1 ? "" : "s"}`;
const sheetsWords = (count: number): string => `${count} sheet${count === 1 ? "" : "s"}`;
const blocked = (words: string): Waiting => ({ words, blocked: true });
const goesOn = (words: string): Waiting => ({ words, blocked: false });

/** What an order waits for, or what comes next on it, in a few words. */
export function waitingWords(facts: WaitingFacts): Waiting {
  switch (facts.stage) {
    case "on-hold":
      return blocked(facts.holdReason ? `held: ${facts.holdReason}` : "held");
    case "needs-review":
      if (facts.reviewAsked) return blocked("the builder asks for a look");
      return blocked(facts.overCap ? "over the cap: look it through" : "questions to the builder are open");
    case "paid":
      return blocked("waits to be received");
    case "received":
      return goesOn("waits for a nest");
    case "nested":
      return short(facts) ?? cutting(facts);
    case "cut":
      return short(facts) ?? goesOn("tabs to take off");
    case "tabs-removed":
      return short(facts) ?? goesOn("ready to pack");
    default:
      return goesOn("");
  }
}

/** Remakes that have not caught up: the others go on, shipping waits. */
function short({ pieces, stage }: WaitingFacts): Waiting | null {
  const behind = pieces
    .filter((piece) => piece.state === "good" && piece.remake && piece.stage !== "tabs-removed")
    .filter((piece) => stage === "tabs-removed" || piece.stage === "received");
  const count = behind.reduce((total, piece) => total + piece.count, 0);
  if (count === 0) return null;
  const unplaced = behind.some((piece) => piece.stage === "received");
  return blocked(
    unplaced ? `${parts(count)} short: remake on the next sheet` : `${parts(count)} short: remake under way`,
  );
}

function cutting({ sheets, today, dayWords }: WaitingFacts): Waiting {
  const open = sheets.filter(({ status }) => status === "planned" || status === "cutting");
  const loose = open.filter(({ run }) => run === null).length;
  if (loose > 0) return blocked(`${sheetsWords(loose)} to schedule`);
  if (open.some(({ status }) => status === "cutting")) return goesOn("on the router now");
  const runs = open.flatMap(({ run }) => (run ? [run] : []));
  const next = runs.toSorted((one, other) => one.day.localeCompare(other.day))[0];
  if (!next) return goesOn("cut");
  const done = sheets.length - open.length;
  const words = `run ${done + 1} of ${sheets.length}, router ${next.machine}, ${dayWords(next.day)}`;
  return next.day < today ? blocked(`${words}: overdue`) : goesOn(words);
}
