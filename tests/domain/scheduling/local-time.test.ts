import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { instantAt, localTime } from "~/domain/scheduling";

const newYork = "America/New_York";
const HOUR = 3_600_000;

describe("the clock on the wall", () => {
  it("shows 07:00 after 8 hours from 22:00 across the spring change in New York (time-zone database)", () => {
    const start = instantAt("2026-03-07", "22:00", newYork);
    expect(localTime(new Date(start.getTime() + 8 * HOUR), newYork)).toEqual({
      day: "2026-03-08",
      clock: "07:00",
    });
  });

  it("takes a time that the spring change skips as that much past the change", () => {
    expect(instantAt("2026-03-08", "02:30", newYork).toISOString()).toBe("2026-03-08T07:30:00.000Z");
  });

  it("takes the earlier of two when the clocks go back, west and east of Greenwich", () => {
    expect(instantAt("2026-11-01", "01:30", newYork).toISOString()).toBe("2026-11-01T05:30:00.000Z");
    expect(instantAt("2026-10-25", "02:30", "Europe/Berlin").toISOString()).toBe("2026-10-25T00:30:00.000Z");
  });

  it("gives back every instant that it shows, to the minute, but for the hour that comes twice", () => {
    const instant = fc
      .integer({ min: Date.UTC(2020, 0), max: Date.UTC(2040, 0) })
      .map((at) => new Date(Math.floor(at / 60_000) * 60_000));
    const zone = fc.constantFrom(
      newYork,
      "America/Los_Angeles",
      "Europe/Berlin",
      "Asia/Kolkata",
      "Pacific/Auckland",
      "UTC",
    );
    fc.assert(
      fc.property(instant, zone, (at, timeZone) => {
        const { day, clock } = localTime(at, timeZone);
        const back = instantAt(day, clock, timeZone);
        expect([0, HOUR]).toContain(at.getTime() - back.getTime());
        expect(localTime(back, timeZone)).toEqual({ day, clock });
      }),
    );
  });
});
