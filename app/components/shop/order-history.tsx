import type { StaffOrderView } from "~/routes/shop/order-view.server";
import { DateTime } from "../date-time";
import { RailSection } from "../rail";

type Move = StaffOrderView["moves"][number];

/** What was done, as the shop says it. */
const ACT_WORDS: Readonly<Record<string, string>> = {
  quote: "quoted",
  revise: "taken back to draft",
  "ask-review": "asked for a look",
  "accept-review": "accepted as quoted",
  "send-back": "sent back",
  pay: "paid",
  receive: "received",
  nest: "nested",
  "drop-nest": "nest dropped",
  cut: "cut",
  "remove-tabs": "tabs off",
  remake: "marked for a remake",
  ship: "handed over",
  hold: "held",
  release: "released",
  cancel: "cancelled",
  "cancel-late": "cancelled",
  undo: "step taken back",
  "undo-ship": "hand-over taken back",
};

/** One move in words: `nested, 12 pieces by Osker Brennick`. */
export function moveWords({ act, pieces, by, role }: Move): string {
  const what = `${ACT_WORDS[act] ?? act}${pieces === null ? "" : `, ${pieces} ${pieces === 1 ? "piece" : "pieces"}`}`;
  return `${what} by ${by ?? (role === "system" ? "the system" : `a ${role}`)}`;
}

/** Every move of the order, newest first, with who made it, when and why. */
export function OrderHistory({ moves }: { readonly moves: readonly Move[] }) {
  return (
    <RailSection title="History">
      {moves.length === 0 && <p className="text-soft">Nothing has happened yet.</p>}
      <ol className="space-y-2.5">
        {moves.map((move) => (
          <li key={move.id}>
            <p className="flex items-baseline justify-between gap-4">
              <span className="min-w-0 break-words">{moveWords(move)}</span>
              <DateTime at={move.at} show="day-time" />
            </p>
            <p className="text-caption text-soft">
              <span className="measure">{move.from === move.to ? move.to : `${move.from} → ${move.to}`}</span>
              {move.reason && <span className="break-words"> · {move.reason}</span>}
            </p>
          </li>
        ))}
      </ol>
    </RailSection>
  );
}
