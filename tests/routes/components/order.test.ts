import { parseWithZod } from "@conform-to/zod/v4";
import { describe, expect, it } from "vitest";
import {
  cancelSchema,
  layersSchema,
  newAddressSchema,
  paySchema,
  rulesOfLines,
} from "~/components/order/order-acts";
import { isLate, placeOnLine, ruleOf } from "~/components/order/order-rule";
import { mustBeSettled, type ShownFinding } from "~/components/order/order-view";
import { sizeInWords } from "~/components/order/size-in-words";
import { stockLabel } from "~/components/order/stock-label";
import { waitsFor } from "~/components/order/waits-for";
import { STAGES } from "~/domain/orders";

const SHA = "a".repeat(64);

function form(fields: Readonly<Record<string, string>>): FormData {
  const data = new FormData();
  for (const [name, value] of Object.entries(fields)) data.append(name, value);
  return data;
}

describe("the form of a drawing's layers", () => {
  const sent = (line: Readonly<Record<string, string>>) =>
    parseWithZod(
      form({
        intent: "layers",
        after: "3",
        sha256: SHA,
        shown: "in",
        "layers[0].layer": "POCKET",
        ...Object.fromEntries(Object.entries(line).map(([name, value]) => [`layers[0].${name}`, value])),
      }),
      { schema: layersSchema },
    );

  it("turns inches into millimetres", () => {
    const submission = sent({ kind: "pocket", how: "leave", value: "0.25" });
    if (submission.status !== "success") throw new Error("It should be right.");
    // 1 in = 25.4 mm exactly.
    expect(rulesOfLines(submission.value)).toEqual([
      { layer: "POCKET", kind: "pocket", depth: { leave: 6.35 } },
    ]);
  });

  it("leaves a layer to its shapes without a rule, and lets no depth onto what goes through", () => {
    expect(
      rulesOfLines({
        shown: "mm",
        layers: [
          { layer: "0", kind: "by-shape", how: "through" },
          { layer: "1", kind: "cut-through", how: "depth", value: 4 },
          { layer: "2", kind: "drill", how: "depth", value: 13 },
        ],
      }),
    ).toEqual([
      { layer: "1", kind: "cut-through", depth: null },
      { layer: "2", kind: "drill", depth: { depth: 13 } },
    ]);
  });

  it("asks for the depth that is missing, at its field", () => {
    expect(sent({ kind: "pocket", how: "depth" }).reply().error).toEqual({
      "layers[0].value": ["Say how much."],
    });
    expect(sent({ kind: "pocket", how: "depth", value: "-2" }).reply().error).toEqual({
      "layers[0].value": ["More than nothing."],
    });
  });
});

describe("other forms of the order", () => {
  it("say what an address lacks in words", () => {
    const { error } = parseWithZod(form({ intent: "new-address", version: "1", "shipTo.postcode": "12" }), {
      schema: newAddressSchema,
    }).reply();
    expect(error).toEqual({
      "shipTo.recipient": ["Who receives it?"],
      "shipTo.line1": ["Street and number"],
      "shipTo.city": ["City"],
      "shipTo.region": ["Two letters, like OR"],
      "shipTo.postcode": ["Five digits, or nine with a hyphen"],
    });
  });

  it("do not pay without the approval, nor cancel without a reason", () => {
    const pay = { intent: "pay", version: "1", quoteId: "q", listHash: "h" };
    expect(parseWithZod(form(pay), { schema: paySchema }).reply().error).toHaveProperty("approved");
    expect(parseWithZod(form({ ...pay, approved: "yes" }), { schema: paySchema }).status).toBe("success");
    const cancel = { intent: "cancel", version: "1", requestId: crypto.randomUUID() };
    expect(parseWithZod(form(cancel), { schema: cancelSchema }).reply().error).toEqual({
      reason: ["Say why it is cancelled."],
    });
  });
});

describe("the rule of an order", () => {
  const facts = {
    stage: "nested",
    heldFrom: null,
    reached: { draft: "2026-11-27T18:00:00Z", quoted: "2026-11-27T19:00:00Z" },
    further: 0.5,
    promisedFor: "2026-12-04T01:00:00Z",
    shippedAt: null,
    now: "2026-12-01T18:00:00Z",
  } as const;

  it("stands between the stage and the next by the share of pieces, and dates what was reached", () => {
    const rule = ruleOf(facts, "America/Los_Angeles");
    // draft, quoted, paid, received, nested: the fifth tick, half way to the sixth.
    expect(rule.at).toBe(4.5);
    expect(rule.late).toBe(false);
    expect(rule.stages[1]).toEqual({ name: "quoted", date: "Fri 27 Nov" });
    expect(rule.stages[4]).toEqual({ name: "nested", date: "now" });
    // 01:00 UTC on 4 December is still the 3rd in the shop's zone.
    expect(rule.stages.at(-1)).toEqual({ name: "shipped", date: "Thu 3 Dec" });
  });

  it("shows what came between where it came in", () => {
    expect(placeOnLine({ stage: "needs-review", heldFrom: null, further: 0 })).toBe(1);
    expect(placeOnLine({ stage: "on-hold", heldFrom: "cut", further: 0 })).toBe(5);
    expect(placeOnLine({ stage: "shipped", heldFrom: null, further: 1 })).toBe(7);
  });

  it("is late after its promise, but not while it is nobody's promise yet", () => {
    const past = { ...facts, promisedFor: "2026-11-30T01:00:00Z" };
    expect(isLate(past)).toBe(true);
    expect(isLate({ ...past, stage: "quoted" })).toBe(false);
    expect(isLate({ ...past, stage: "shipped", shippedAt: "2026-12-01T00:00:00Z" })).toBe(false);
  });
});

describe("words of a list", () => {
  it("say for every stage what it waits for, in amber what is the builder's", () => {
    const all = STAGES.map((stage) => waitsFor({ stage, expired: false, holdReason: null, questions: 0 }));
    expect(all.map(({ yours }) => yours)).toEqual(
      STAGES.map((stage) => ["draft", "quoted", "on-hold"].includes(stage)),
    );
    expect(waitsFor({ stage: "needs-review", expired: false, holdReason: null, questions: 2 })).toEqual({
      words: "your answer to 2 questions",
      yours: true,
    });
    expect(waitsFor({ stage: "quoted", expired: true, holdReason: null, questions: 0 }).words).toContain(
      "ran out",
    );
  });

  it("settle a stop never by an answer, a question only by accepting it", () => {
    const finding = (
      severity: ShownFinding["severity"],
      kind: "accept" | "message" | null,
    ): ShownFinding => ({
      number: 1,
      id: null,
      severity,
      words: "",
      fileSha: null,
      label: null,
      at: null,
      answer: kind && { kind, note: null },
    });
    expect(mustBeSettled(finding("stop", "accept"))).toBe(true);
    expect(mustBeSettled(finding("ask", null))).toBe(true);
    expect(mustBeSettled(finding("ask", "message"))).toBe(true);
    expect(mustBeSettled(finding("ask", "accept"))).toBe(false);
    expect(mustBeSettled(finding("note", null))).toBe(false);
  });

  it("print sizes of files and the thickness that was measured", () => {
    expect([842, 12_288, 4_299_162].map(sizeInWords)).toEqual(["842 B", "12 kB", "4.1 MB"]);
    const measured = { lot: "BB-18/7", min: 17.82, mean: 17.93, max: 18.04, free: 3 };
    expect(stockLabel({ id: "1", name: "18 mm birch", nominal: 18, measured })).toBe(
      "18 mm birch: measures 17.82–18.04, lot BB-18/7, 3 free",
    );
    expect(stockLabel({ id: "2", name: "HDPE", nominal: 19.05, measured: null })).toBe(
      "HDPE, 19.05 mm: none on the rack",
    );
  });
});
