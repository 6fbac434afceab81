import { describe, expect, it } from "vitest";
import { byDueDate, maxLateness } from "~/domain/scheduling";

describe("earliest due date first", () => {
  // Jackson 1955; optimum confirmed by brute force.
  it("puts p 6 4 3 8 5, d 8 4 12 24 18 in the order 2-1-3-5-4 with a largest lateness of 2", () => {
    const takes = [6, 4, 3, 8, 5];
    const due = [8, 4, 12, 24, 18];
    const jobs = takes.map((time, i) => ({ id: i + 1, takes: time, due: due[i] }));
    const sequence = byDueDate(jobs);
    expect(sequence.map(({ id }) => id)).toEqual([2, 1, 3, 5, 4]);
    expect(maxLateness(sequence)).toBe(2);
    expect(maxLateness(jobs)).toBeGreaterThan(2);
  });

  it("keeps the order of equal dates", () => {
    expect(
      byDueDate([
        { id: 1, due: 5 },
        { id: 2, due: 5 },
        { id: 3, due: 4 },
      ]).map(({ id }) => id),
    ).toEqual([3, 1, 2]);
  });
});
