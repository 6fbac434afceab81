import { silhouetteOf } from "~/components/drawing-viewer/view-geometry-of";
import type { QueueItem } from "~/components/shop/queue-row";
import { waitingWords } from "~/components/shop/waiting-words";
import { db } from "~/db/client.server";
import { SHOP_STAGES, STAGES, type Stage } from "~/domain/orders";
import { addDays, dayOf, instantAt, minutesOn, shownDay, weekdayOf } from "~/domain/scheduling";
import { findLargestPart } from "~/flows/find-largest-part.server";
import { listMachines } from "~/models/machines.server";
import { listMaterials } from "~/models/materials.server";
import { countUnread, listUnreadOrders } from "~/models/messages.server";
import { countByStage } from "~/models/order-list.server";
import { countShippedSince, pageOfQueue, type QueuedOrder } from "~/models/queue.server";
import { listRuns } from "~/models/runs.server";
import { currentSettings } from "~/models/settings.server";

/** What the shop owes: everything between the money and the door. */
const OWED = ["paid", "received", "nested", "cut", "tabs-removed"] as const satisfies readonly Stage[];
const ANSWERS = ["needs-review", "on-hold"] as const satisfies readonly Stage[];

/** The views of the queue, in the order of their tabs. */
export const VIEWS = {
  owed: OWED,
  received: ["received"],
  nested: ["nested"],
  cut: ["cut"],
  "tabs-removed": ["tabs-removed"],
  shipped: ["shipped"],
  answer: ANSWERS,
  /** Whatever its stage: a builder may ask before there is a quote. */
  unread: STAGES,
} as const satisfies Record<string, readonly Stage[]>;
export type QueueViewName = keyof typeof VIEWS;

export const PAGE_SIZE = 25;

export interface QueueQuery {
  readonly view: QueueViewName;
  readonly material?: string | undefined;
  readonly words?: string | undefined;
  readonly page: number;
}

/** The page of the queue that was asked for, with its counts, the machines' day, and what the reader has not read. */
export async function queueView(query: QueueQuery, readerId: string, now = new Date()) {
  const { shop, review } = await currentSettings(db);
  const today = dayOf(now, shop.timeZone);
  /* A week of the shop begins on Monday. */
  const monday = addDays(today, -((weekdayOf(today) + 6) % 7));
  const weekBegan = instantAt(monday, "00:00", shop.timeZone);
  const waiting = await listUnreadOrders(db, { userId: readerId, scope: { kind: "staff" } });
  const { rows, found } = await pageOfQueue(db, {
    ids: query.view === "unread" ? waiting : undefined,
    stages: VIEWS[query.view],
    materialId: query.material,
    words: query.words,
    shippedSince: query.view === "shipped" ? weekBegan : undefined,
    page: query.page,
    size: PAGE_SIZE,
  });
  const counts = await countByStage(db, { kind: "staff" });
  const countOf = (stages: readonly Stage[]) =>
    stages.reduce((total, stage) => total + (counts.get(stage) ?? 0), 0);
  const unread = await countUnread(db, {
    userId: readerId,
    reader: "staff",
    orderIds: rows.map(({ order }) => order.id),
  });
  const facts = { today, zone: shop.timeZone, cap: review.cap, unread };
  const items = await Promise.all(rows.map((row) => queueItem(row, facts)));
  return {
    today: shownDay(today),
    machines: await bookedToday(today),
    items,
    found,
    pages: Math.max(1, Math.ceil(found / PAGE_SIZE)),
    counts: {
      owed: countOf(OWED),
      received: countOf(["received"]),
      nested: countOf(["nested"]),
      cut: countOf(["cut"]),
      "tabs-removed": countOf(["tabs-removed"]),
      shipped: await countShippedSince(db, weekBegan),
      answer: countOf(ANSWERS),
      unread: waiting.length,
    } satisfies Record<QueueViewName, number>,
    materials: (await listMaterials(db)).map(({ id, name }) => ({ id, name })),
    requestId: crypto.randomUUID(),
  };
}

async function bookedToday(today: string) {
  const runs = await listRuns(db, { from: today, to: today });
  return (await listMachines(db)).map(({ id, name, calendar }) => ({
    name,
    booked: runs
      .filter(({ machine }) => machine.id === id)
      .reduce((total, { run }) => total + run.plannedMinutes, 0),
    open: minutesOn(today, calendar),
  }));
}

interface Shop {
  readonly today: string;
  readonly zone: string;
  readonly cap: number;
  readonly unread: ReadonlyMap<string, number>;
}

async function queueItem(row: QueuedOrder, shop: Shop): Promise<QueueItem> {
  const { order, builder, quote } = row;
  const part = await findLargestPart(order);
  const due = order.stage === "shipped" ? order.shippedAt : order.promisedFor;
  return {
    id: order.id,
    reference: order.reference,
    name: order.name,
    builder,
    stage: order.stage,
    heldFrom: order.heldFrom,
    version: order.version,
    kinds: row.kinds,
    parts: row.parts,
    materials: row.materials,
    minutes: quote?.machineMinutes ?? null,
    late:
      order.promisedFor !== null &&
      order.paidAt !== null &&
      order.shippedAt === null &&
      dayOf(order.promisedFor, shop.zone) < shop.today,
    waiting: waitingWords({
      stage: order.stage,
      holdReason: order.holdReason,
      reviewAsked: order.reviewAsked,
      overCap: quote !== null && quote.total > shop.cap,
      pieces: row.pieces,
      sheets: row.sheets,
      today: shop.today,
      dayWords: shownDay,
    }),
    further: furtherShare(row),
    unread: shop.unread.get(order.id) ?? 0,
    shape: part ? silhouetteOf(part) : null,
    day: due ? dayWords(dayOf(due, shop.zone)) : null,
  };
}

/** Share of the good pieces that are past the order's own stage. */
function furtherShare({ order, pieces }: QueuedOrder): number {
  const good = pieces.filter(({ state }) => state === "good");
  const standing = SHOP_STAGES.findIndex((stage) => stage === (order.heldFrom ?? order.stage));
  const all = good.reduce((total, { count }) => total + count, 0);
  const further = good
    .filter(({ stage }) => SHOP_STAGES.indexOf(stage) > standing)
    .reduce((total, { count }) => total + count, 0);
  return all === 0 || standing < 0 ? 0 : further / all;
}

function dayWords(day: string): NonNullable<QueueItem["day"]> {
  const [weekday = "", number = "", month = ""] = shownDay(day).split(" ");
  return { weekday, number, month };
}
