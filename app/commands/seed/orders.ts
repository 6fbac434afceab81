import type { DemoOrder } from "./carry";
import type { SeededPeople } from "./people";

/** An order of the demonstration, how many days ago it was made, and what happens to it beyond the usual. */
export interface SeededOrder extends DemoOrder {
  readonly daysAgo: number;
  readonly aftermath?: "hold" | "cancel" | "remake" | "refund";
}

/** A first dozen orders in several stages; galleys, a library trailer and a tea kiosk. */
export function demoOrders({
  builder,
  library,
  kiosk,
  trailer,
  chandler,
}: SeededPeople): readonly SeededOrder[] {
  return [
    {
      builder: kiosk,
      drawing: "serving-tray",
      name: "Serving trays, first dozen",
      to: "shipped",
      sets: 3,
      sanding: "grit-150",
      daysAgo: 12,
      aftermath: "refund",
    },
    {
      builder: chandler,
      drawing: "chart-table-drawers",
      name: "Chart table drawers",
      to: "shipped",
      daysAgo: 10,
      pickUp: true,
    },
    {
      builder: library,
      drawing: "library-shelves",
      name: "Library trailer, shelf run",
      to: "tabs-removed",
      daysAgo: 9,
    },
    {
      builder: kiosk,
      drawing: "menu-frame",
      name: "Kiosk menu frame",
      to: "tabs-removed",
      daysAgo: 8,
      sanding: "grit-150",
      aftermath: "remake",
    },
    {
      builder: chandler,
      drawing: "locker-doors",
      name: "Cockpit locker doors",
      to: "cut",
      daysAgo: 6,
      sanding: "grit-150",
    },
    { builder: builder, drawing: "fan-panel", name: "Roof fan panel", to: "scheduled", daysAgo: 4 },
    { builder: library, drawing: "light-panels", name: "Light locker panels", to: "scheduled", daysAgo: 4 },
    { builder: kiosk, drawing: "drawer-fronts", name: "Counter drawer fronts", to: "received", daysAgo: 2 },
    {
      builder: trailer,
      drawing: "bunk-side",
      name: "Bunk side, pair",
      to: "received",
      daysAgo: 2,
      sets: 2,
      aftermath: "hold",
    },
    {
      builder: builder,
      drawing: "galley-carcass",
      name: "Galley carcass, port side",
      to: "paid",
      daysAgo: 1,
    },
    {
      builder: chandler,
      drawing: "bench-lid",
      name: "Bench lid from the old boat",
      to: "quoted",
      daysAgo: 1,
    },
    {
      builder: library,
      drawing: "galley-carcass",
      name: "Reading room counter",
      to: "quoted",
      sets: 2,
      daysAgo: 1,
      askReview: true,
    },
    {
      builder: builder,
      drawing: "trial-box",
      name: "Trial box, bowtie corner",
      to: "quoted",
      daysAgo: 0,
      trial: true,
      sanding: "none",
      leaveTabs: true,
      pickUp: true,
    },
    { builder: trailer, drawing: "lamp-shelf", name: "Lamp shelf", to: "draft", daysAgo: 0, unitOpen: true },
    { builder: builder, drawing: "locker-doors", name: "Galley doors, starboard", to: "draft", daysAgo: 0 },
    {
      builder: trailer,
      drawing: "menu-frame",
      name: "Window frame, not needed",
      to: "received",
      daysAgo: 3,
      aftermath: "cancel",
    },
  ];
}
