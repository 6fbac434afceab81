import type { OrderView } from "~/routes/builder/order-view.server";
import { DateTime } from "../date-time";

type Move = OrderView["moves"][number];

const ACTS: Readonly<Record<string, string>> = {
  quote: "Priced and frozen",
  revise: "Taken back to draft",
  "ask-review": "Sent to the shop for a look",
  "accept-review": "Looked at and accepted by the shop",
  "send-back": "Sent back by the shop",
  pay: "Paid",
  receive: "Taken in by the shop",
  nest: "Laid out on sheets",
  "drop-nest": "Taken off its sheets again",
  cut: "Cut",
  "remove-tabs": "Tabs off, edges done",
  remake: "A piece is made again",
  ship: "Handed over",
  hold: "Put on hold",
  release: "Goes on again",
  cancel: "Cancelled",
  "cancel-late": "Cancelled by the shop",
  undo: "One step taken back by the shop",
  "undo-ship": "Handing over taken back by the shop",
};
const BY: Readonly<Record<string, string>> = {
  builder: "you",
  operator: "the shop",
  clerk: "the shop",
  owner: "the shop",
};

/** Everything that happened to the order, newest first, in plain words. */
export function OrderHistory({ moves }: { readonly moves: readonly Move[] }) {
  return (
    <ol className="divide-y divide-line text-small">
      {[...moves].reverse().map((move) => (
        <li key={move.id} className="grid gap-x-4 py-2 sm:grid-cols-[10rem_minmax(0,1fr)]">
          <span className="text-soft">
            <DateTime at={move.at} show="day-time" />
          </span>
          <span>
            {ACTS[move.act] ?? move.act}
            {BY[move.by] && <span className="text-soft">, {BY[move.by]}</span>}
            {move.reason && <span className="block text-soft">{move.reason}</span>}
          </span>
        </li>
      ))}
    </ol>
  );
}
