import { useCallback, useEffect, useRef, useState } from "react";
import { z } from "zod";

/** What the bench's page sends, with the words it is known by. */
export type BenchSend =
  | { readonly kind: "good"; readonly requestId: string; readonly pieceIds: readonly string[] }
  | {
      readonly kind: "lost";
      readonly requestId: string;
      readonly pieceId: string;
      readonly state: "spoiled" | "missing";
      readonly cause: string;
      readonly payer: string;
    }
  | { readonly kind: "undo"; readonly requestId: string; readonly of: string };

const STORE = "kerfpost.bench";
/** Milliseconds between tries while the line is broken. */
const AGAIN_AFTER = 3_000;
const TIMEOUT = 10_000;

const answerSchema = z.object({ ok: z.boolean(), words: z.string().optional() });
const storedSchema = z.array(
  z.looseObject({ kind: z.enum(["good", "lost", "undo"]), requestId: z.string() }),
);

interface Queue {
  /** Acts that have not arrived yet, the oldest first. */
  readonly waiting: readonly BenchSend[];
  readonly offline: boolean;
  send(act: BenchSend): void;
}

/**
 * Sends the bench's acts one after another and keeps them in the browser until each has been answered, so that a
 * broken line or a closed page loses none; each carries its own id, so that one sent twice is done once.
 */
export function useBenchQueue(on: {
  readonly done: (act: BenchSend) => void;
  readonly refused: (act: BenchSend, words: string) => void;
}): Queue {
  const [waiting, setWaiting] = useState<readonly BenchSend[]>([]);
  const [offline, setOffline] = useState(false);
  const [tick, setTick] = useState(0);
  const latest = useRef(on);
  latest.current = on;
  const busy = useRef(false);

  useEffect(() => setWaiting(stored()), []);
  useEffect(() => {
    const online = () => setTick((count) => count + 1);
    window.addEventListener("online", online);
    return () => window.removeEventListener("online", online);
  }, []);

  const [first] = waiting;
  useEffect(() => {
    if (!first || busy.current) return;
    busy.current = true;
    let timer: number | undefined;
    void post(first).then((answer) => {
      busy.current = false;
      if (answer === "unreached") {
        setOffline(true);
        timer = window.setTimeout(() => setTick(tick + 1), AGAIN_AFTER);
        return;
      }
      setOffline(false);
      setWaiting((acts) => keep(acts.filter(({ requestId }) => requestId !== first.requestId)));
      if (answer.ok) latest.current.done(first);
      else latest.current.refused(first, answer.words ?? "It was not done.");
    });
    return () => window.clearTimeout(timer);
  }, [first, tick]);

  const send = useCallback((act: BenchSend) => setWaiting((acts) => keep([...acts, act])), []);
  return { waiting, offline, send };
}

function keep(acts: readonly BenchSend[]): readonly BenchSend[] {
  localStorage.setItem(STORE, JSON.stringify(acts));
  return acts;
}

function stored(): readonly BenchSend[] {
  try {
    const acts = storedSchema.safeParse(JSON.parse(localStorage.getItem(STORE) ?? "[]"));
    return acts.success ? (acts.data as unknown as readonly BenchSend[]) : [];
  } catch {
    return [];
  }
}

/** A server that fails or is away is asked again; any other answer is an answer. */
async function post(act: BenchSend): Promise<z.output<typeof answerSchema> | "unreached"> {
  try {
    const response = await fetch("/shop/bench/acts", {
      method: "POST",
      headers: { "Content-Type": "application/json" },
      body: JSON.stringify(act),
      signal: AbortSignal.timeout(TIMEOUT),
    });
    if (response.status >= 500) return "unreached";
    const answer = answerSchema.safeParse(await response.json());
    return answer.success ? answer.data : { ok: false, words: `The server answered ${response.status}.` };
  } catch {
    return "unreached";
  }
}
