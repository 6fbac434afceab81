import { describe, expect, it } from "vitest";
import { dateWords, relativeWords } from "~/components/date-words";

const at = new Date("2026-12-05T01:20:00Z");

describe("dates in words", () => {
  it("are in the shop's zone, not the reader's", () => {
    // New York is five hours behind UTC in December.
    expect(dateWords(at, "America/New_York", "day")).toBe("Fri 4 Dec");
    expect(dateWords(at, "America/New_York", "day-time")).toBe("Fri 4 Dec 20:20");
    expect(dateWords(at, "UTC", "full")).toBe("5 Dec 2026 01:20");
    expect(dateWords(at, "UTC", "time")).toBe("01:20");
  });

  it("count whole days, hours and minutes from the given now", () => {
    const earlier = (seconds: number) => new Date(at.getTime() - seconds * 1000);
    expect(relativeWords(at, earlier(2.9 * 86_400))).toBe("in 2 days");
    expect(relativeWords(at, earlier(-3 * 3600))).toBe("3 hours ago");
    expect(relativeWords(at, earlier(90))).toBe("in 1 minute");
    expect(relativeWords(at, earlier(20))).toBe("now");
  });
});
