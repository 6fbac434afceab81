import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  instantAt,
  isWorkingDay,
  type PromiseRequest,
  promiseDate,
  type WeekCalendar,
} from "~/domain/scheduling";

const timeZone = "America/Los_Angeles";
const calendar: WeekCalendar = {
  shifts: [1, 2, 3, 4, 5].map((weekday) => ({ weekday, from: "08:00", to: "16:00" })),
  closed: [],
};
/** One day of cutting and four of buffer: five working days. */
const request: PromiseRequest = {
  approvedAt: instantAt("2026-12-18", "13:15", timeZone),
  timeZone,
  lead: { cutOffHour: 12, bufferDays: 4, transitDays: 2, holidays: ["2026-12-25", "2027-01-01"] },
  calendars: [calendar],
  load: {},
  minutes: 60,
};
const promised = (changes: Partial<PromiseRequest>) => {
  const result = promiseDate({ ...request, ...changes });
  if (!result.ok) throw new Error(result.reason);
  return result.promise;
};

describe("the promise", () => {
  // Approved Fri 18 Dec 2026, noon cut-off, 5 working days, 25 Dec and 1 Jan closed (arithmetic).
  it("is 29 Dec for an approval at 13:15", () => {
    expect(promised({})).toMatchObject({
      countedFrom: "2026-12-21",
      cutBy: "2026-12-22",
      shipsOn: "2026-12-29",
    });
  });

  it("is 28 Dec for an approval at 11:45", () => {
    expect(promised({ approvedAt: instantAt("2026-12-18", "11:45", timeZone) })).toMatchObject({
      countedFrom: "2026-12-18",
      shipsOn: "2026-12-28",
      arrivesOn: "2026-12-30",
    });
  });

  it("counts from Monday when approved on a Saturday morning", () => {
    expect(promised({ approvedAt: instantAt("2026-12-19", "09:00", timeZone) }).countedFrom).toBe(
      "2026-12-21",
    );
  });

  it("waits for machine time behind the load", () => {
    const load = { "2026-12-22": 480, "2026-12-23": 450 };
    expect(promised({ load }).cutBy).toBe("2026-12-24");
    expect(promised({ load, minutes: 30 }).cutBy).toBe("2026-12-23");
    expect(promised({ load, calendars: [calendar, calendar] }).cutBy).toBe("2026-12-22");
  });

  it("spreads long work over days", () => {
    expect(promised({ minutes: 480 }).cutBy).toBe("2026-12-22");
    expect(promised({ minutes: 481 }).cutBy).toBe("2026-12-23");
  });

  it("says how it came about", () => {
    expect(promised({}).how).toBe(
      "Approved after 12:00 it counts from Mon 21 Dec; the machines have 60 min free by Tue 22 Dec; " +
        "4 working days for tabs, sanding and packing.",
    );
  });

  it("is refused when no machine works", () => {
    expect(promiseDate({ ...request, calendars: [] })).toEqual({
      ok: false,
      reason: "No machine has the time for this order within a year.",
    });
  });

  it("is a working day, and no earlier for more work, more load or a later approval", () => {
    const hours = fc.integer({ min: 0, max: 24 * 90 });
    fc.assert(
      fc.property(
        hours,
        hours,
        fc.integer({ min: 0, max: 3000 }),
        fc.integer({ min: 0, max: 3000 }),
        (at, later, minutes, more) => {
          const approvedAt = new Date(Date.UTC(2026, 9, 1) + at * 3_600_000);
          const first = promised({ approvedAt, minutes });
          expect(isWorkingDay(first.shipsOn, request.lead.holidays)).toBe(true);
          expect(promised({ approvedAt, minutes: minutes + more }).shipsOn >= first.shipsOn).toBe(true);
          expect(
            promised({ approvedAt, minutes, load: { [first.cutBy]: more } }).shipsOn >= first.shipsOn,
          ).toBe(true);
          const then = new Date(approvedAt.getTime() + later * 3_600_000);
          expect(promised({ approvedAt: then, minutes }).shipsOn >= first.shipsOn).toBe(true);
        },
      ),
      { numRuns: 50 },
    );
  });
});
