import { Link } from "react-router";
import { SHOP_STAGES, type Stage } from "~/domain/orders";
import { formatMinutes } from "~/domain/units";
import { ActForm } from "../act-form";
import { Button } from "../button";
import { Silhouette, type SilhouetteShape } from "../silhouette";
import { SteelRule } from "../steel-rule";
import { Unread } from "../thread/unread";
import { ROW_MARK } from "./row-keys";
import type { Waiting } from "./waiting-words";

export interface QueueItem {
  readonly id: string;
  readonly reference: string;
  readonly name: string;
  readonly builder: string;
  readonly stage: Stage;
  readonly heldFrom: Stage | null;
  readonly version: number;
  readonly kinds: number;
  readonly parts: number;
  readonly materials: readonly string[];
  readonly minutes: number | null;
  readonly late: boolean;
  readonly waiting: Waiting;
  /** Share of the pieces that are a stage further. */
  readonly further: number;
  /** Messages that its reader has not read. */
  readonly unread: number;
  readonly shape: SilhouetteShape | null;
  /** The words of the day it is due on or was shipped. */
  readonly day: { readonly weekday: string; readonly number: string; readonly month: string } | null;
}

const LINE = ["paid", ...SHOP_STAGES] as const;
const STAGES = LINE.map((name) => ({ name }));

function place({ stage, heldFrom, further }: QueueItem): number {
  const standing = stage === "on-hold" ? heldFrom : stage;
  const at = STAGES.findIndex(({ name }) => name === standing);
  return at < 0 ? 0 : at + (at < LINE.length - 1 ? Math.min(further, 0.95) : 0);
}

/** The rule's own word for a stage that stands on none of its ticks. */
const ruleWords = (item: QueueItem): typeof STAGES | { name: Stage }[] =>
  LINE.some((name) => name === item.stage)
    ? STAGES
    : STAGES.map((stage, index) => (index === Math.floor(place(item)) ? { name: item.stage } : stage));

const count = (number: number, noun: string): string => `${number} ${noun}${number === 1 ? "" : "s"}`;

interface QueueRowProps {
  readonly item: QueueItem;
  /** Given where the order waits to be received and the reader may receive it. */
  readonly requestId: string | null;
}

/** One order of the queue: what it is, how far it is, what it waits for, how long it takes. */
export function QueueRow({ item, requestId }: QueueRowProps) {
  const facts = [
    item.kinds > 0 && `${count(item.kinds, "kind")}, ${count(item.parts, "part")}`,
    item.materials.join(", "),
  ].filter(Boolean);
  return (
    <li className="relative grid grid-cols-[minmax(0,1fr)_auto] items-start gap-x-5 gap-y-2 border-t border-line px-4 py-4 first:border-t-0 focus-within:bg-blue-wash hover:bg-blue-wash lg:grid-cols-[5.25rem_minmax(12rem,1.25fr)_minmax(10rem,1.4fr)_minmax(10rem,1fr)_6rem] lg:items-center">
      <div className="hidden h-12 lg:block">
        <Silhouette shape={item.shape} />
      </div>
      <div className="min-w-0">
        <p className="measure text-caption text-soft">{item.reference}</p>
        <Link
          {...ROW_MARK}
          to={`/shop/orders/${item.id}`}
          className="font-semibold break-words outline-none before:absolute before:inset-y-0 before:left-0 before:w-1 after:absolute after:inset-0 focus-visible:before:bg-blue focus-visible:after:outline-2 focus-visible:after:-outline-offset-2 focus-visible:after:outline-blue"
        >
          {item.name}
        </Link>
        <p className="text-small text-soft">{facts.join(" · ")}</p>
        <p className="text-caption text-soft">{item.builder}</p>
        <Unread count={item.unread} />
      </div>
      <p className="measure text-right text-small lg:order-last">
        {item.minutes === null ? "" : formatMinutes(item.minutes)}
      </p>
      <div className="col-span-2 min-w-0 lg:col-span-1">
        <SteelRule stages={ruleWords(item)} at={place(item)} late={item.late} size="row" />
      </div>
      <div className="col-span-2 flex min-w-0 flex-wrap items-center justify-between gap-3 text-small lg:col-span-1">
        <p className={`min-w-0 break-words ${item.waiting.blocked ? "text-amber" : ""}`}>
          {item.waiting.words}
        </p>
        {requestId !== null && (
          <div className="relative z-[1]">
            <ActForm
              intent="receive"
              label={`Receive ${item.reference}`}
              fields={{ key: item.id, orderId: item.id, version: item.version, requestId }}
            >
              {(pending) => (
                <Button size="small" variant="plain" pending={pending}>
                  Receive<span className="sr-only"> {item.reference}</span>
                </Button>
              )}
            </ActForm>
          </div>
        )}
      </div>
    </li>
  );
}
