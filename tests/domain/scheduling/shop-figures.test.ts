import { expect, test } from "vitest";
import { minutesByMachine, onTimeShare } from "~/domain/scheduling";

test("planned and actual minutes add up for each machine", () => {
  const runs = [
    { machine: "South", plannedMinutes: 40, actualMinutes: 50 },
    { machine: "North", plannedMinutes: 20, actualMinutes: 18 },
    { machine: "South", plannedMinutes: 60, actualMinutes: 60 },
    { machine: "Old", plannedMinutes: 0, actualMinutes: 3 },
  ];
  expect(minutesByMachine(runs)).toEqual([
    { machine: "North", runs: 1, planned: 20, actual: 18, ratio: 0.9 },
    { machine: "Old", runs: 1, planned: 0, actual: 3, ratio: null },
    { machine: "South", runs: 2, planned: 100, actual: 110, ratio: 1.1 },
  ]);
});

test("an order is in time until midnight of its day on the shop's wall", () => {
  const promisedFor = new Date("2026-12-04T20:00:00Z");
  const orders = [
    /* 23:30 of Friday the 4th in Los Angeles (UTC−8 in winter), then half an hour into Saturday. */
    { shippedAt: new Date("2026-12-05T07:30:00Z"), promisedFor },
    { shippedAt: new Date("2026-12-05T08:30:00Z"), promisedFor },
    { shippedAt: new Date("2026-12-01T18:00:00Z"), promisedFor },
  ];
  expect(onTimeShare(orders, "America/Los_Angeles")).toEqual({ shipped: 3, onTime: 2 });
  expect(onTimeShare(orders, "UTC")).toEqual({ shipped: 3, onTime: 1 });
  expect(onTimeShare([], "UTC")).toEqual({ shipped: 0, onTime: 0 });
});
