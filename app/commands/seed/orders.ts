import type { DemoDrawingName } from "~/db/seed/drawings";
import type { Carried, DemoOrder } from "./carry";
import type { SeededPeople } from "./people";
import type { DemoMessage } from "./talk";
import { THREADS } from "./threads";

/** An order of the demonstration: when it was made, when it is due, and what happens to it beyond the usual. */
export interface SeededOrder extends DemoOrder {
  readonly daysAgo: number;
  /** Days from today; late when negative and not shipped. Without it the quote's own promise stands. */
  readonly dueIn?: number;
  /** By how many days a shipped order missed its day. */
  readonly late?: number;
  readonly aftermath?: "hold" | "cancel" | "cancel-late" | "remake" | "refund" | "undo";
  readonly talk?: readonly DemoMessage[];
}

type Extras = Partial<Omit<SeededOrder, "builder" | "drawing" | "name" | "to" | "daysAgo">>;

/** More than forty orders in every stage: galleys, a library trailer, a tea kiosk and their neighbours. */
export function demoOrders(people: SeededPeople): readonly SeededOrder[] {
  const { builder, library, kiosk, trailer, chandler } = people;
  const order = (
    who: DemoOrder["builder"],
    drawing: DemoDrawingName,
    name: string,
    to: Carried,
    daysAgo: number,
    extras: Extras = {},
  ): SeededOrder => ({
    builder: who,
    drawing,
    name,
    to,
    daysAgo,
    ...(THREADS[name] ? { talk: THREADS[name] } : {}),
    ...extras,
  });
  return [
    order(kiosk, "serving-tray", "Serving trays, first dozen", "shipped", 26, {
      sets: 3,
      sanding: "grit-150",
      dueIn: -18,
      aftermath: "refund",
    }),
    order(chandler, "chart-table-drawers", "Chart table drawers", "shipped", 24, {
      pickUp: true,
      dueIn: -15,
    }),
    order(library, "lamp-shelf", "Reading lamp shelves", "shipped", 22, { sets: 4, dueIn: -14 }),
    order(builder, "trial-box", "Trial box, galley corner", "shipped", 21, {
      trial: true,
      sanding: "none",
      leaveTabs: true,
      dueIn: -16,
    }),
    order(trailer, "bunk-side", "Bunk sides for the first trailer", "shipped", 20, { sets: 2, dueIn: -13 }),
    order(kiosk, "drawer-fronts", "Tea drawer fronts", "shipped", 19, { sanding: "grit-150", dueIn: -15 }),
    order(chandler, "locker-doors", "Lazarette doors", "shipped", 18, { sets: 2, late: 2, dueIn: -11 }),
    order(library, "light-panels", "Light panels, reading nook", "shipped", 16, { dueIn: -9 }),
    order(builder, "fan-panel", "Fan panel, heads compartment", "shipped", 15, { dueIn: -8 }),
    order(trailer, "menu-frame", "Window frame, kitchen", "shipped", 14, { material: "BB-12", dueIn: -7 }),
    order(chandler, "bench-lid", "Anchor locker lid", "shipped", 13, { dueIn: -8 }),
    order(kiosk, "serving-tray", "Serving trays, second dozen", "shipped", 12, {
      sets: 3,
      sanding: "grit-150",
      dueIn: -5,
      pickUp: true,
    }),
    order(library, "library-shelves", "Shelf run for the children's side", "shipped", 11, { dueIn: -4 }),
    order(builder, "chart-table-drawers", "Instrument drawers", "shipped", 10, { dueIn: -3 }),
    order(library, "library-shelves", "Library trailer, shelf run", "tabs-removed", 9, { dueIn: 0 }),
    order(kiosk, "menu-frame", "Kiosk menu frame", "tabs-removed", 8, {
      sanding: "grit-150",
      dueIn: -1,
      aftermath: "remake",
    }),
    order(trailer, "lamp-shelf", "Bunk lamp shelves", "tabs-removed", 7, { sets: 2, dueIn: 1, pickUp: true }),
    order(chandler, "fan-panel", "Engine room vent", "tabs-removed", 7, { material: "HD-19", dueIn: 1 }),
    order(chandler, "locker-doors", "Cockpit locker doors", "cut", 6, { sanding: "grit-150", dueIn: 1 }),
    order(builder, "galley-carcass", "Galley carcass, forward", "cut", 6, { dueIn: 1 }),
    order(kiosk, "drawer-fronts", "Cash drawer fronts", "cut", 5, { dueIn: 2 }),
    order(library, "lamp-shelf", "Map shelf", "cut", 5, { material: "BB-18", dueIn: 2, aftermath: "undo" }),
    order(builder, "fan-panel", "Roof fan panel", "scheduled", 4, { dueIn: 2 }),
    order(library, "light-panels", "Light locker panels", "scheduled", 4, { dueIn: 2 }),
    order(trailer, "chart-table-drawers", "Tool drawers", "scheduled", 4, { dueIn: 3 }),
    order(chandler, "galley-carcass", "Workbench carcass", "scheduled", 3, { dueIn: 3 }),
    order(kiosk, "serving-tray", "Cake boards", "scheduled", 3, { material: "BB-12", sets: 2, dueIn: 3 }),
    order(builder, "bench-lid", "Settee lid", "nested", 3, { dueIn: 3 }),
    order(library, "menu-frame", "Notice board frame", "nested", 3, { dueIn: 4 }),
    order(trailer, "bunk-side", "Bunk side, single", "nested", 3, { dueIn: 4 }),
    order(trailer, "menu-frame", "Window frame, not needed", "received", 3, { aftermath: "cancel" }),
    order(kiosk, "fan-panel", "Kettle vent panel", "nested", 3, { aftermath: "cancel-late" }),
    order(kiosk, "drawer-fronts", "Counter drawer fronts", "received", 2, { dueIn: 4 }),
    order(trailer, "bunk-side", "Bunk side, pair", "received", 2, { sets: 2, aftermath: "hold", dueIn: 5 }),
    order(library, "library-shelves", "Atlas shelves", "received", 2, { dueIn: 5 }),
    order(chandler, "trial-box", "Hatch box, trial", "received", 2, {
      trial: true,
      sanding: "none",
      leaveTabs: true,
      dueIn: 4,
    }),
    order(builder, "chart-table-drawers", "Cutlery drawers", "received", 1, { dueIn: 6 }),
    order(builder, "galley-carcass", "Galley carcass, port side", "paid", 1),
    order(kiosk, "light-panels", "Awning light panels", "paid", 1),
    order(chandler, "lamp-shelf", "Lantern brackets", "approved", 1),
    order(chandler, "bench-lid", "Bench lid from the old boat", "quoted", 1),
    order(library, "galley-carcass", "Reading room counter", "quoted", 1, { sets: 2, askReview: true }),
    order(trailer, "locker-doors", "Wardrobe doors", "quoted", 1),
    order(builder, "trial-box", "Trial box, bowtie corner", "quoted", 0, {
      trial: true,
      sanding: "none",
      leaveTabs: true,
      pickUp: true,
    }),
    order(trailer, "lamp-shelf", "Lamp shelf", "draft", 0, { unitOpen: true }),
    order(builder, "locker-doors", "Galley doors, starboard", "draft", 0),
  ];
}
