import { describe, expect, test } from "vitest";
import {
  checkMove,
  MOVE_NAMES,
  type MoveName,
  type Need,
  type OrderFacts,
  type PieceFacts,
  type PieceStage,
  ROLES,
  SHOP_STAGES,
  STAGES,
  type Stage,
} from "~/domain/orders";

const WHO = { builder: "b", operator: "o", clerk: "c", owner: "w", system: "s" } as const;
type Who = keyof typeof WHO;
const EVERYBODY: readonly Who[] = [...ROLES, "system"];

/** At which stage who may make a move when nothing else is in the way, and the stage it leads to. */
const TABLE: Record<MoveName, Partial<Record<Stage, readonly [who: string, to: Stage]>>> = {
  quote: { draft: ["b", "quoted"] },
  revise: { quoted: ["b", "draft"], "needs-review": ["b", "draft"] },
  "ask-review": { quoted: ["bs", "needs-review"] },
  "accept-review": { "needs-review": ["ows", "quoted"] },
  "send-back": { "needs-review": ["ow", "draft"] },
  pay: { quoted: ["s", "paid"] },
  receive: { paid: ["ow", "received"] },
  nest: {
    received: ["ow", "received"],
    nested: ["ow", "nested"],
    cut: ["ow", "cut"],
    "tabs-removed": ["ow", "tabs-removed"],
  },
  "drop-nest": {
    received: ["ow", "received"],
    nested: ["ow", "nested"],
    cut: ["ow", "cut"],
    "tabs-removed": ["ow", "tabs-removed"],
  },
  cut: {
    received: ["ow", "received"],
    nested: ["ow", "nested"],
    cut: ["ow", "cut"],
    "tabs-removed": ["ow", "tabs-removed"],
  },
  "remove-tabs": {
    nested: ["ow", "nested"],
    cut: ["ow", "cut"],
    "tabs-removed": ["ow", "tabs-removed"],
  },
  remake: { nested: ["ocw", "nested"], cut: ["ocw", "cut"], "tabs-removed": ["ocw", "tabs-removed"] },
  ship: { "tabs-removed": ["cw", "tabs-removed"] },
  hold: {
    quoted: ["ocw", "on-hold"],
    "needs-review": ["ocw", "on-hold"],
    paid: ["ocw", "on-hold"],
    received: ["ocw", "on-hold"],
    nested: ["ocw", "on-hold"],
    cut: ["ocw", "on-hold"],
    "tabs-removed": ["ocw", "on-hold"],
  },
  release: { "on-hold": ["ocw", "paid"] },
  cancel: {
    draft: ["bow", "cancelled"],
    quoted: ["bow", "cancelled"],
    "needs-review": ["bow", "cancelled"],
    paid: ["bow", "cancelled"],
    received: ["bow", "cancelled"],
  },
  "cancel-late": {
    paid: ["ow", "cancelled"],
    received: ["ow", "cancelled"],
    nested: ["ow", "cancelled"],
    cut: ["ow", "cancelled"],
    "tabs-removed": ["ow", "cancelled"],
    "on-hold": ["ow", "cancelled"],
  },
  undo: {
    received: ["ocw", "paid"],
    nested: ["ocw", "received"],
    cut: ["ocw", "nested"],
    "tabs-removed": ["ocw", "cut"],
  },
  "undo-ship": { shipped: ["w", "tabs-removed"] },
};

/** What each move waits for, and whether staff write down why. */
const WAITS_FOR: Record<MoveName, readonly (Need | "reason")[]> = {
  quote: ["units", "stock", "delivery", "no-stops"],
  revise: [],
  "ask-review": ["quote-open"],
  "accept-review": ["no-stops"],
  "send-back": ["reason"],
  pay: ["no-stops", "asks-answered", "approved", "reviewed", "paid-in-full"],
  receive: ["paid-in-full"],
  nest: [],
  "drop-nest": ["reason"],
  cut: [],
  "remove-tabs": [],
  remake: ["reason"],
  ship: ["paid-in-full", "pieces-ready"],
  hold: ["reason"],
  release: ["held-from-known"],
  cancel: ["nothing-nested"],
  "cancel-late": ["reason"],
  undo: ["reason"],
  "undo-ship": ["reason"],
};

const isShopStage = (stage: Stage): stage is PieceStage => SHOP_STAGES.some((one) => one === stage);
const piecesAt = (stage: PieceStage): PieceFacts[] => [
  { stage, state: "good", remakeOf: null },
  { stage, state: "good", remakeOf: null },
];

/** An order at a stage with everything in place. */
const atEase = (stage: Stage): OrderFacts => ({
  stage,
  heldFrom: "paid",
  unitsConfirmed: true,
  stockChosen: true,
  deliveryChosen: true,
  openStops: 0,
  unansweredAsks: 0,
  quote: { open: true, expired: false, approved: true },
  reviewOpen: false,
  owed: 0,
  pieces: isShopStage(stage) ? piecesAt(stage) : [],
  nestLocked: false,
  cuttingBegun: false,
});

/** What is changed about an order at ease so that a move's need is not met. */
const UNMET: Record<Need, Partial<OrderFacts>> = {
  units: { unitsConfirmed: false },
  stock: { stockChosen: false },
  delivery: { deliveryChosen: false },
  "no-stops": { openStops: 2 },
  "asks-answered": { unansweredAsks: 1 },
  "quote-open": { quote: { open: true, expired: true, approved: true } },
  approved: { quote: { open: true, expired: false, approved: false } },
  reviewed: { reviewOpen: true },
  "paid-in-full": { owed: 1 },
  "pieces-ready": { pieces: piecesAt("cut") },
  "nothing-nested": { nestLocked: true },
  "nothing-cut": { cuttingBegun: true },
  "held-from-known": { heldFrom: null },
};

const asked = (who: Who) => (who === "system" ? ("system" as const) : [who]);

describe.each(MOVE_NAMES)("%s", (move) => {
  describe.each(STAGES)("at %s", (stage) => {
    test.each(EVERYBODY)("by %s", (who) => {
      const verdict = checkMove(move, atEase(stage), asked(who), "a reason");
      const allowed = TABLE[move][stage];
      const mayAtAll = Object.values(TABLE[move]).some(([allowedHere]) => allowedHere.includes(WHO[who]));
      if (allowed?.[0].includes(WHO[who])) expect(verdict).toEqual({ ok: true, to: allowed[1] });
      else expect(verdict).toMatchObject({ ok: false, why: mayAtAll ? "wrong-stage" : "not-allowed" });
    });
  });

  const stage = STAGES.find((one) => TABLE[move][one]) ?? "draft";
  const mover = EVERYBODY.find((who) => TABLE[move][stage]?.[0].includes(WHO[who])) ?? "builder";

  test.each(Object.keys(UNMET) as Need[])("waits for %s only where it must", (need) => {
    const verdict = checkMove(move, { ...atEase(stage), ...UNMET[need] }, asked(mover), "a reason");
    if (!WAITS_FOR[move].includes(need)) return expect(verdict.ok).toBe(true);
    expect(verdict).toMatchObject({ ok: false, why: need });
    expect(verdict.ok ? "" : verdict.words).toMatch(/^[A-Z0-9].{10,}\.$/);
  });

  test.each([undefined, null, "", "  "])("with the reason %j", (reason) => {
    const verdict = checkMove(move, atEase(stage), asked(mover), reason);
    if (WAITS_FOR[move].includes("reason")) expect(verdict).toMatchObject({ ok: false, why: "reason" });
    else expect(verdict.ok).toBe(true);
  });
});

test("what is no move, and who is nobody, is refused", () => {
  expect(checkMove("toString", atEase("draft"), ["owner"])).toMatchObject({ ok: false, why: "unknown" });
  expect(checkMove("ship", atEase("tabs-removed"), [])).toMatchObject({ ok: false, why: "not-allowed" });
});

test("several roles together may make the moves of each", () => {
  expect(checkMove("ship", atEase("tabs-removed"), ["operator", "clerk"])).toMatchObject({ ok: true });
  expect(checkMove("receive", atEase("paid"), ["clerk", "builder"])).toMatchObject({ why: "not-allowed" });
});

test("shipping waits for a remake, and leads to shipped once every piece has left", () => {
  const remake: PieceFacts = { stage: "cut", state: "good", remakeOf: "piece-1" };
  const order = { ...atEase("tabs-removed"), pieces: [...piecesAt("tabs-removed"), remake] };
  expect(checkMove("ship", order, ["clerk"])).toMatchObject({ ok: false, why: "pieces-ready" });
  const gone = { ...atEase("tabs-removed"), pieces: piecesAt("shipped") };
  expect(checkMove("ship", gone, ["clerk"])).toEqual({ ok: true, to: "shipped" });
});

test("counts are said in the words of the sentence", () => {
  const words = (change: Partial<OrderFacts>) => {
    const verdict = checkMove("pay", { ...atEase("quoted"), ...change }, "system");
    return verdict.ok ? null : verdict.words;
  };
  expect(words({ openStops: 1 })).toBe("1 finding must be mended before this order can go on.");
  expect(words({ openStops: 3 })).toBe("3 findings must be mended before this order can go on.");
  expect(words({ unansweredAsks: 1 })).toBe("1 finding still waits for the builder's answer.");
  expect(words({ unansweredAsks: 2 })).toBe("2 findings still wait for the builder's answer.");
  expect(words({ quote: null })).toBe("The builder has not approved the part list and sizes.");
});
