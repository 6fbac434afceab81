import { type QueueItem, QueueRow } from "./queue-row";

interface QueueDaysProps {
  readonly items: readonly QueueItem[];
  /** Null where the reader may not receive orders. */
  readonly requestId: string | null;
}

interface DayGroup {
  readonly key: string;
  readonly items: QueueItem[];
}

const keyOf = ({ stage, day }: QueueItem): string =>
  stage === "paid" ? "paid" : day ? `${day.number} ${day.month}` : "no day";

/** Orders in their order, those of one day together. */
function byDay(items: readonly QueueItem[]): DayGroup[] {
  const groups: DayGroup[] = [];
  for (const item of items) {
    const last = groups.at(-1);
    if (last?.key === keyOf(item)) last.items.push(item);
    else groups.push({ key: keyOf(item), items: [item] });
  }
  return groups;
}

/** The queue on its sheet: a strip of due days at the left, under each its orders. */
export function QueueDays({ items, requestId }: QueueDaysProps) {
  return (
    <ol className="rounded-sheet border border-line bg-sheet">
      {byDay(items).map((group) => (
        <li
          key={`${group.key} ${group.items[0]?.id}`}
          className="border-t-2 border-line first:border-t-0 sm:grid sm:grid-cols-[6.5rem_minmax(0,1fr)]"
        >
          <DayHead group={group} />
          <ol className="min-w-0 sm:border-l sm:border-line">
            {group.items.map((item) => (
              <QueueRow
                key={item.id}
                item={item}
                requestId={item.stage === "paid" && requestId ? `${requestId}:${item.id}` : null}
              />
            ))}
          </ol>
        </li>
      ))}
    </ol>
  );
}

function DayHead({ group }: { readonly group: DayGroup }) {
  const [first] = group.items;
  const late = group.items.some((item) => item.late) && first?.stage !== "shipped";
  const ink = late ? "text-amber" : "text-ink";
  const look =
    "measure flex items-baseline gap-2 border-b border-line px-4 py-2 sm:block sm:border-b-0 sm:px-3 sm:py-4 sm:text-right";
  if (group.key === "paid")
    return (
      <h2 className={`${look} text-small text-amber`}>
        to
        <br className="hidden sm:block" /> receive
      </h2>
    );
  if (!first?.day) return <h2 className={`${look} text-small text-soft`}>no day yet</h2>;
  return (
    <h2 className={look}>
      <span className={`text-small ${late ? "text-amber" : "text-soft"}`}>{first.day.weekday}</span>
      <span className={`text-lead font-semibold sm:block ${ink}`}>{first.day.number}</span>
      <span className={`text-caption ${late ? "text-amber" : "text-soft"}`}>
        {late ? `${first.day.month}, late` : first.day.month}
      </span>
    </h2>
  );
}
