import { dateWords, relativeWords } from "./date-words";
import { useShopZone } from "./shop-zone";

interface DateTimeProps {
  /** An instant: a Date, an ISO string, or milliseconds since 1970. */
  readonly at: Date | string | number;
  readonly show?: "day" | "time" | "day-time" | "full" | "relative";
  /** What `relative` counts from; given by the loader, so that server and browser print the same. */
  readonly now?: Date | string | number;
}

/** A date or time in the shop's zone, in mono; the full instant is in its title. */
export function DateTime({ at, show = "day", now }: DateTimeProps) {
  const zone = useShopZone();
  const instant = new Date(at);
  const words =
    show === "relative"
      ? now === undefined
        ? dateWords(instant, zone, "day-time")
        : relativeWords(instant, new Date(now))
      : dateWords(instant, zone, show);
  return (
    <time
      dateTime={instant.toISOString()}
      title={`${dateWords(instant, zone, "full")} ${zone}`}
      className={show === "relative" ? "whitespace-nowrap" : "measure whitespace-nowrap"}
    >
      {words}
    </time>
  );
}
