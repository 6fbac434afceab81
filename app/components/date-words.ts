type Shown = "day" | "time" | "day-time" | "full";

const OPTIONS: Readonly<Record<Shown, Intl.DateTimeFormatOptions>> = {
  day: { weekday: "short", day: "numeric", month: "short" },
  time: { hour: "2-digit", minute: "2-digit", hourCycle: "h23" },
  "day-time": {
    weekday: "short",
    day: "numeric",
    month: "short",
    hour: "2-digit",
    minute: "2-digit",
    hourCycle: "h23",
  },
  full: {
    day: "numeric",
    month: "short",
    year: "numeric",
    hour: "2-digit",
    minute: "2-digit",
    hourCycle: "h23",
  },
};

/** An instant in the shop's zone: `Fri 4 Dec`, `13:20`, `Fri 4 Dec 13:20`, `4 Dec 2026 13:20`. */
export function dateWords(at: Date, zone: string, shown: Shown = "day"): string {
  const format = new Intl.DateTimeFormat("en-GB", { ...OPTIONS[shown], timeZone: zone });
  const parts = Object.fromEntries(format.formatToParts(at).map((part) => [part.type, part.value]));
  const time = parts.hour ? `${parts.hour}:${parts.minute}` : undefined;
  return [parts.weekday, parts.day, parts.month, parts.year, time]
    .filter((part) => part !== undefined)
    .join(" ");
}

const STEPS: readonly (readonly [Intl.RelativeTimeFormatUnit, number])[] = [
  ["day", 86_400],
  ["hour", 3600],
  ["minute", 60],
];

/** How far `at` lies from `now`: `in 2 days`, `3 hours ago`, `now` within a minute. */
export function relativeWords(at: Date, now: Date): string {
  const seconds = (at.getTime() - now.getTime()) / 1000;
  for (const [unit, length] of STEPS) {
    if (Math.abs(seconds) >= length) {
      return new Intl.RelativeTimeFormat("en-GB", { numeric: "auto" }).format(
        Math.trunc(seconds / length),
        unit,
      );
    }
  }
  return "now";
}
