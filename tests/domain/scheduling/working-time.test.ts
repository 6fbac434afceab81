import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  addDays,
  addWorkingDays,
  finishOf,
  instantAt,
  isWorkingDay,
  localTime,
  minutesOn,
  shownDay,
  type WeekCalendar,
  workingDayFrom,
} from "~/domain/scheduling";

const timeZone = "America/Los_Angeles";
/** 08:00 to 16:30 with half an hour's break, Monday to Friday. */
const calendar: WeekCalendar = {
  shifts: [1, 2, 3, 4, 5].flatMap((weekday) => [
    { weekday, from: "12:30", to: "16:30" },
    { weekday, from: "08:00", to: "12:00" },
  ]),
  closed: ["2026-07-03"],
};
const finish = (day: string, clock: string, minutes: number) => {
  const end = finishOf({ start: instantAt(day, clock, timeZone), minutes, calendar, timeZone });
  return end && localTime(end, timeZone);
};

describe("working days", () => {
  it("leave out weekends and holidays", () => {
    expect(isWorkingDay("2026-12-24", ["2026-12-25"])).toBe(true);
    expect(isWorkingDay("2026-12-25", ["2026-12-25"])).toBe(false);
    expect(isWorkingDay("2026-12-26", [])).toBe(false);
    expect(isWorkingDay("2026-12-27", [])).toBe(false);
    expect(workingDayFrom("2026-12-25", ["2026-12-25"])).toBe("2026-12-28");
  });

  it("count on without the first day", () => {
    expect(addWorkingDays("2026-12-18", 0, [])).toBe("2026-12-18");
    expect(addWorkingDays("2026-12-19", 0, [])).toBe("2026-12-21");
    expect(addWorkingDays("2026-12-18", 1, [])).toBe("2026-12-21");
    expect(addWorkingDays("2026-12-19", 1, [])).toBe("2026-12-21");
  });

  it("pass leap days and years", () => {
    expect(addDays("2028-02-28", 1)).toBe("2028-02-29");
    expect(addDays("2027-01-01", -1)).toBe("2026-12-31");
  });

  it("are shown short", () => {
    expect(shownDay("2026-12-04")).toBe("Fri 4 Dec");
  });
});

describe("working time", () => {
  it("that ends with the shift stays on that day: 480 min from 08:00 end at 16:30 (arithmetic)", () => {
    expect(finish("2026-07-06", "08:00", 480)).toEqual({ day: "2026-07-06", clock: "16:30" });
  });

  it("goes over to the next shift by the minute", () => {
    expect(finish("2026-07-06", "08:00", 481)).toEqual({ day: "2026-07-07", clock: "08:01" });
    expect(finish("2026-07-06", "11:30", 60)).toEqual({ day: "2026-07-06", clock: "13:00" });
  });

  it("waits for the first shift, over closed days and weekends", () => {
    expect(finish("2026-07-02", "17:00", 30)).toEqual({ day: "2026-07-06", clock: "08:30" });
  });

  it("has no end without a shift", () => {
    const start = instantAt("2026-07-06", "08:00", timeZone);
    expect(finishOf({ start, minutes: 1, calendar: { shifts: [], closed: [] }, timeZone })).toBeNull();
  });

  it("is counted by day", () => {
    expect(minutesOn("2026-07-06", calendar)).toBe(480);
    expect(minutesOn("2026-07-03", calendar)).toBe(0);
    expect(minutesOn("2026-07-05", calendar)).toBe(0);
  });

  it("done in two parts ends when it would in one", () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 0, max: 365 * 24 * 60 }),
        fc.integer({ min: 1, max: 4000 }),
        fc.integer({ min: 1, max: 4000 }),
        (offset, first, second) => {
          const start = new Date(Date.UTC(2026, 0, 1) + offset * 60_000);
          const middle = finishOf({ start, minutes: first, calendar, timeZone });
          if (!middle) throw new Error("no end");
          const inTwo = finishOf({ start: middle, minutes: second, calendar, timeZone });
          expect(inTwo).toEqual(finishOf({ start, minutes: first + second, calendar, timeZone }));
        },
      ),
      { numRuns: 50 },
    );
  });
});
