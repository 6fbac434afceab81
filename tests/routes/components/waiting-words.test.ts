import { describe, expect, it } from "vitest";
import { type WaitingFacts, waitingWords } from "~/components/shop/waiting-words";

const NESTED: WaitingFacts = {
  stage: "nested",
  holdReason: null,
  reviewAsked: false,
  overCap: false,
  pieces: [{ stage: "nested", state: "good", remake: false, count: 12 }],
  sheets: [],
  today: "2026-12-01",
  dayWords: (day) => day,
};
const run = (day: string) => ({ machine: "North", day });

describe("what an order of the queue waits for", () => {
  it("blocks while it is held, unreceived or unlooked at, with the reason", () => {
    expect(waitingWords({ ...NESTED, stage: "on-hold", holdReason: "The lot is warped" })).toEqual({
      words: "held: The lot is warped",
      blocked: true,
    });
    expect(waitingWords({ ...NESTED, stage: "paid" }).blocked).toBe(true);
    expect(waitingWords({ ...NESTED, stage: "needs-review", reviewAsked: true }).words).toContain("asks");
    expect(waitingWords({ ...NESTED, stage: "needs-review", overCap: true }).words).toContain("cap");
    expect(waitingWords({ ...NESTED, stage: "needs-review" }).words).toContain("questions");
  });

  it("counts the sheets that no router has on a day", () => {
    const sheets = [
      { status: "planned", run: null },
      { status: "planned", run: null },
      { status: "cut", run: run("2026-11-30") },
    ] as const;
    expect(waitingWords({ ...NESTED, sheets })).toEqual({ words: "2 sheets to schedule", blocked: true });
  });

  it("names the next run, and says when its day is over", () => {
    const sheets = [
      { status: "cut", run: run("2026-11-30") },
      { status: "planned", run: run("2026-12-03") },
      { status: "planned", run: run("2026-12-02") },
    ] as const;
    expect(waitingWords({ ...NESTED, sheets })).toEqual({
      words: "run 2 of 3, router North, 2026-12-02",
      blocked: false,
    });
    const overdue = [{ status: "planned", run: run("2026-11-30") }] as const;
    expect(waitingWords({ ...NESTED, sheets: overdue })).toEqual({
      words: "run 1 of 1, router North, 2026-11-30: overdue",
      blocked: true,
    });
  });

  it("is short of remakes before anything else, and of those not yet ready before it is packed", () => {
    const remake = { state: "good", remake: true, count: 2 } as const;
    const received = { ...NESTED, pieces: [...NESTED.pieces, { ...remake, stage: "received" as const }] };
    expect(waitingWords(received)).toEqual({
      words: "2 parts short: remake on the next sheet",
      blocked: true,
    });
    const cut = {
      ...received,
      pieces: [{ ...remake, stage: "cut" as const }],
      stage: "tabs-removed" as const,
    };
    expect(waitingWords(cut).words).toBe("2 parts short: remake under way");
    expect(waitingWords({ ...NESTED, stage: "tabs-removed", pieces: [] })).toEqual({
      words: "ready to pack",
      blocked: false,
    });
  });
});
