import type { WeekCalendar } from "~/domain/scheduling";

const week = (shifts: readonly (readonly [from: string, to: string])[]): WeekCalendar["shifts"] =>
  [1, 2, 3, 4, 5].flatMap((weekday) => shifts.map(([from, to]) => ({ weekday, from, to })));

/** Feeds are the shop's own proven ones, well under the chip loads that cutter makers print. Millimetres, minutes. */
export const DEMO_TOOLS = [
  {
    number: 1,
    name: "9.5 mm compression",
    kind: "compression",
    nominalDiameter: 9.525,
    measuredDiameter: 9.46,
    flutes: 2,
    feed: 10_000,
    plunge: 3000,
    rpm: 18_000,
    maxPassDepth: 9.5,
  },
  {
    number: 2,
    name: "6.35 mm compression",
    kind: "compression",
    nominalDiameter: 6.35,
    measuredDiameter: 6.31,
    flutes: 2,
    feed: 7000,
    plunge: 2000,
    rpm: 18_000,
    maxPassDepth: 6.4,
  },
  {
    number: 3,
    name: "3.2 mm down-cut",
    kind: "down-cut",
    nominalDiameter: 3.175,
    measuredDiameter: 3.16,
    flutes: 2,
    feed: 3000,
    plunge: 800,
    rpm: 18_000,
    maxPassDepth: 3.2,
  },
  {
    number: 4,
    name: "5 mm drill",
    kind: "drill",
    nominalDiameter: 5,
    measuredDiameter: 5.02,
    flutes: 2,
    feed: 1500,
    plunge: 1500,
    rpm: 6000,
    maxPassDepth: 25,
  },
  {
    number: 5,
    name: "35 mm boring bit",
    kind: "boring",
    nominalDiameter: 35,
    measuredDiameter: 35.05,
    flutes: 2,
    feed: 600,
    plunge: 600,
    rpm: 4000,
    maxPassDepth: 15,
  },
  {
    number: 6,
    name: "60 degree engraver",
    kind: "engraver",
    nominalDiameter: 6,
    measuredDiameter: 6,
    flutes: 1,
    feed: 4000,
    plunge: 1000,
    rpm: 18_000,
    maxPassDepth: 1,
  },
] as const;

/** Two routers; North takes 5 × 10 ft sheets. Rapids and feeds in mm/min, acceleration in mm/s². */
export const DEMO_MACHINES = [
  {
    name: "North",
    bedLength: 3100,
    bedWidth: 1570,
    rapid: 45_000,
    acceleration: 2000,
    toolChangeMinutes: 0.25,
    sheetHandlingMinutes: 6,
    calendar: {
      shifts: week([
        ["07:00", "11:30"],
        ["12:00", "15:30"],
      ]),
      closed: ["2026-12-24"],
    },
  },
  {
    name: "South",
    bedLength: 2600,
    bedWidth: 1300,
    rapid: 30_000,
    acceleration: 1200,
    toolChangeMinutes: 0.3,
    sheetHandlingMinutes: 5,
    calendar: {
      shifts: week([
        ["08:00", "12:00"],
        ["12:30", "16:30"],
      ]),
      closed: ["2026-12-11", "2026-12-24"],
    },
  },
] as const satisfies readonly { readonly calendar: WeekCalendar; readonly [field: string]: unknown }[];
