import { useQuery } from "@tanstack/react-query";
import { useRef, useState } from "react";
import type { BenchPiece, BenchView } from "~/routes/shop/bench-view.server";
import { Button } from "../button";
import { Notice } from "../notice";
import { Sheet } from "../sheet";
import { Silhouette } from "../silhouette";
import { LostPiece, type LostWords } from "./lost-piece";
import { matchScan } from "./match-scan";
import { ScanField } from "./scan-field";
import { type BenchSend, useBenchQueue } from "./use-bench-queue";

const nameOf = ({ reference, label, number, of }: BenchPiece): string =>
  `${reference} ${label} ${number} of ${of}`;
const isGood = ({ state }: BenchPiece): boolean => state === "good";

type Shown = "waits" | "sent" | "off" | "lost" | "not-here";

/** How a piece stands once what is still on its way has arrived. */
function shownAs(piece: BenchPiece, waiting: readonly BenchSend[]): Shown {
  const touching = waiting.findLast((act) =>
    act.kind === "good" ? act.pieceIds.includes(piece.id) : act.kind === "lost" && act.pieceId === piece.id,
  );
  if (touching?.kind === "lost" || !isGood(piece)) return "lost";
  if (touching) return "sent";
  if (piece.stage === "tabs-removed" || piece.stage === "shipped") return "off";
  return piece.stage === "cut" ? "waits" : "not-here";
}

type BenchOf = { readonly orderId: string } | { readonly sheetId: string };

interface BenchBoardProps {
  readonly of: BenchOf;
  /** As the page was loaded. */
  readonly bench: BenchView;
  /** Several orders lie here: each piece says whose it is. */
  readonly mixed: boolean;
}

/** The pieces as they stand. Without a line what was known stays, and is asked for again when there is one. */
function useBench(of: BenchOf, loaded: BenchView) {
  return useQuery({
    queryKey: ["bench", of],
    queryFn: async (): Promise<BenchView> => {
      const answer = await fetch(`/shop/bench/acts?${new URLSearchParams({ ...of })}`);
      if (!answer.ok) throw new Error(`The bench answered ${answer.status}.`);
      return answer.json();
    },
    initialData: loaded,
    staleTime: Number.POSITIVE_INFINITY,
    gcTime: 0,
  });
}

/** The tabs-off bench: "all good, except ...", or piece by piece with a scanner or a finger. */
export function BenchBoard({ of, bench: loaded, mixed }: BenchBoardProps) {
  const { data: bench, refetch } = useBench(of, loaded);
  const [said, setSaid] = useState<string | null>(null);
  const [marking, setMarking] = useState<BenchPiece | null>(null);
  const [lastGood, setLastGood] = useState<{ readonly id: string; readonly words: string } | null>(null);
  const names = useRef(new Map<string, string>());
  const queue = useBenchQueue({
    done: (act) => {
      if (act.kind === "good")
        setLastGood({ id: act.requestId, words: names.current.get(act.requestId) ?? "the last ones" });
      if (act.kind === "undo") setLastGood(null);
      void refetch();
    },
    refused: (act, words) => {
      setSaid(`${names.current.get(act.requestId) ?? "An act"}: ${words}`);
      if (act.kind === "undo") setLastGood(null);
      void refetch();
    },
  });
  const shown = bench.pieces.map((piece) => ({ piece, as: shownAs(piece, queue.waiting) }));
  const waits = shown.filter(({ as }) => as === "waits").map(({ piece }) => piece);
  const off = shown.filter(({ as }) => as === "off" || as === "sent").length;
  const lost = shown.filter(({ as }) => as === "lost").length;
  const send = (act: BenchSend, words: string) => {
    names.current.set(act.requestId, words);
    setSaid(null);
    queue.send(act);
  };
  const good = (pieces: readonly BenchPiece[], words: string) =>
    send({ kind: "good", requestId: crypto.randomUUID(), pieceIds: pieces.map(({ id }) => id) }, words);
  const scan = (typed: string): string => {
    const piece = matchScan(bench.pieces, typed, (one) => waits.some(({ id }) => id === one.id));
    if (!piece) return `${typed}: not on this page.`;
    const as = shownAs(piece, queue.waiting);
    if (as === "waits") {
      good([piece], nameOf(piece));
      return `${nameOf(piece)}: good.`;
    }
    return as === "off" || as === "sent"
      ? `${nameOf(piece)} is off already.`
      : `${nameOf(piece)} is ${isGood(piece) ? piece.stage : piece.state}.`;
  };
  const mark = (piece: BenchPiece, words: LostWords) => {
    send(
      { kind: "lost", requestId: crypto.randomUUID(), pieceId: piece.id, ...words },
      `${nameOf(piece)} ${words.state}`,
    );
    setMarking(null);
  };
  return (
    <div className="space-y-5 text-floor">
      {queue.waiting.length > 0 && (queue.offline || queue.waiting.length > 1) && (
        <Notice
          live
          title={`${queue.waiting.length} ${queue.waiting.length === 1 ? "act waits" : "acts wait"} for the line`}
        >
          <span className="text-floor">
            Go on working: they are kept here and sent as soon as the server answers.
          </span>
        </Notice>
      )}
      {said && (
        <Notice live title="Not done">
          <span className="text-floor">{said}</span>
        </Notice>
      )}
      <Sheet label="Bench" padded>
        <div className="grid gap-5 lg:grid-cols-[auto_minmax(0,1fr)_auto] lg:items-end">
          <p>
            <span className="measure block text-far leading-none font-semibold">
              {off} of {bench.pieces.filter(isGood).length}
            </span>
            tabs off{lost > 0 && <span className="text-amber">, {lost} lost</span>}
          </p>
          {bench.mayAct && (
            <ScanField size="floor" label="Scan a label" hint="Or type what it says: A 2" onScan={scan} />
          )}
          {bench.mayAct && (
            <div className="flex flex-wrap gap-3">
              {lastGood && (
                <Button
                  type="button"
                  size="floor"
                  onClick={() =>
                    send(
                      { kind: "undo", requestId: crypto.randomUUID(), of: lastGood.id },
                      `Taking back ${lastGood.words}`,
                    )
                  }
                >
                  Take back {lastGood.words}
                </Button>
              )}
              {waits.length > 0 && (
                <Button
                  type="button"
                  variant="primary"
                  size="floor"
                  onClick={() => good(waits, `${waits.length} at once`)}
                >
                  {lost > 0 || off > 0 ? `All the other ${waits.length} good` : `All ${waits.length} good`}
                </Button>
              )}
            </div>
          )}
        </div>
      </Sheet>
      <ul className="grid items-start gap-3 sm:grid-cols-2 xl:grid-cols-3">
        {shown.map(({ piece, as }) => (
          <li
            key={piece.id}
            className={`grid grid-cols-[6rem_minmax(0,1fr)] items-center gap-x-4 gap-y-3 rounded-sheet border bg-sheet p-4 ${as === "off" || as === "sent" ? "border-blue" : "border-line"}`}
          >
            <Silhouette shape={bench.shapes[piece.partId] ?? null} width={96} height={72} />
            <p className="min-w-0">
              <span className="measure font-semibold">
                {piece.label} {piece.number}
              </span>{" "}
              of {piece.of}
              <span className={`block ${as === "lost" ? "text-amber" : ""}`}>
                {wordsOf(piece, as)}
                {mixed && ` · ${piece.reference}`}
              </span>
            </p>
            {bench.mayAct && as === "waits" && (
              <div className="col-span-2 grid grid-cols-2 gap-3">
                <Button type="button" size="floor" onClick={() => good([piece], nameOf(piece))}>
                  Good<span className="sr-only"> {nameOf(piece)}</span>
                </Button>
                <Button type="button" size="floor" variant="danger" onClick={() => setMarking(piece)}>
                  Not good<span className="sr-only"> {nameOf(piece)}</span>
                </Button>
              </div>
            )}
            {marking?.id === piece.id && (
              <div className="col-span-2">
                <LostPiece
                  name={nameOf(piece)}
                  onMark={(words) => mark(piece, words)}
                  onLeave={() => setMarking(null)}
                />
              </div>
            )}
          </li>
        ))}
      </ul>
    </div>
  );
}

function wordsOf(piece: BenchPiece, as: Shown): string {
  if (as === "lost") return isGood(piece) ? "on its way to a remake" : `${piece.state}: a remake is ordered`;
  if (as === "sent") return "good, being sent";
  if (as === "off") return "good, tabs off";
  if (as === "waits") return piece.remake ? "remake, tabs on" : "tabs on";
  return piece.remake ? `remake, ${piece.stage}` : piece.stage;
}
