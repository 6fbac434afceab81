import { beforeEach, describe, expect, test } from "vitest";
import { db, transact } from "~/db/client.server";
import { lots, materials, newId, outbox, parts, priceBookVersions, quotes, revisions } from "~/db/schema";
import { answerFinding } from "~/flows/answer-finding.server";
import { approveQuote } from "~/flows/approve-quote.server";
import { orderInterpretation } from "~/flows/order-interpretation.server";
import { priceOrder } from "~/flows/price-order.server";
import { quoteOrder } from "~/flows/quote-order.server";
import { requoteOrder } from "~/flows/requote-order.server";
import { acceptReview, askReview, sendBack } from "~/flows/review-order.server";
import { reviseOrder } from "~/flows/revise-order.server";
import { setChoices } from "~/flows/set-choices.server";
import { setDelivery } from "~/flows/set-delivery.server";
import { startCheckout } from "~/flows/start-checkout.server";
import { listFindings } from "~/models/findings.server";
import { owedOnQuote } from "~/models/ledger.server";
import { findQuote, listQuoteLines, listQuotes } from "~/models/quotes.server";
import { changeSettings, currentSettings } from "~/models/settings.server";
import { listStageMoves } from "~/models/stage-moves.server";
import { listStockGroups } from "~/models/stock-groups.server";
import {
  approve,
  asked,
  done,
  makeApproved,
  makeQuoted,
  makeReadyDraft,
  openPayPage,
  refused,
} from "../support/chain";
import { resetDatabase } from "../support/database";
import { dxfBytes, rectangle } from "../support/drawings";
import {
  chooseStock,
  freshScene,
  makeDraftOrder,
  makePerson,
  makeShop,
  orderAsIs,
  PRICE_BOOK,
  type TestPerson,
  type TestShop,
} from "../support/scene";

const running = freshScene();
const DAY = 86_400_000;
let builder: TestPerson;
let operator: TestPerson;
let shop: TestShop;
beforeEach(async () => {
  await resetDatabase();
  builder = await makePerson();
  operator = await makePerson({ roles: ["operator"] });
  shop = await makeShop();
});

const quoteOf = async (orderId: string) => {
  const { quoteId } = await orderAsIs(orderId);
  const quote = quoteId === null ? undefined : await findQuote(db, orderId, quoteId);
  if (!quote) throw new Error("There is no quote.");
  return quote;
};

const contentOf = async (orderId: string) => orderInterpretation(db, await orderAsIs(orderId));

describe("a price", () => {
  test("is of what is saved or of other choices, and saves nothing", async () => {
    const order = await makeReadyDraft(builder, shop);
    const saved = await done(priceOrder({ actor: builder, orderId: order.id }));
    const { content, number } = await contentOf(order.id);
    const doubled = { ...content, files: content.files.map((file) => ({ ...file, sets: 2 })) };
    const other = await done(priceOrder({ actor: builder, orderId: order.id, content: doubled }));
    const pickUp = await done(
      priceOrder({ actor: builder, orderId: order.id, delivery: { delivery: "pick-up", region: null } }),
    );

    expect(saved.quote.total).toBe(saved.quote.lines.reduce((sum, line) => sum + line.amount, 0));
    expect(saved.facts.stocks[0]?.parts.map(({ label, quantity }) => [label, quantity])).toEqual([
      ["A", 1],
      ["B", 2],
    ]);
    expect(other.facts.stocks[0]?.parts.map((part) => part.quantity)).toEqual([2, 4]);
    expect(other.quote.total).toBeGreaterThan(saved.quote.total);
    expect(pickUp.facts.parcels).toEqual([]);
    expect(pickUp.quote.total).toBeLessThan(saved.quote.total);
    expect(await db.$count(quotes)).toBe(0);
    expect((await orderAsIs(order.id)).stage).toBe("draft");
    expect(await contentOf(order.id)).toMatchObject({ number, content });
  });

  test("is taxed where it goes", async () => {
    const order = await makeReadyDraft(builder, shop);
    const taxed = await done(priceOrder({ actor: builder, orderId: order.id }));
    const elsewhere = await done(
      priceOrder({ actor: builder, orderId: order.id, delivery: { delivery: "ship", region: "OR" } }),
    );
    expect(taxed.facts.tax).toEqual({ region: "WA", rate: 0.085, freightTaxable: true });
    expect(taxed.quote.tax).toBeGreaterThan(0);
    expect(elsewhere.facts.tax).toEqual({ region: "OR", rate: 0, freightTaxable: false });
    expect(elsewhere.quote.tax).toBe(0);
  });

  test("is refused for what is missing, and for another builder", async () => {
    const order = await makeDraftOrder(builder);
    expect(await refused(priceOrder({ actor: builder, orderId: order.id }))).toMatchObject({
      reason: "incomplete",
      words: expect.stringContaining("pick it up"),
    });
    await done(
      setDelivery({
        actor: builder,
        orderId: order.id,
        version: order.version,
        delivery: { kind: "pick-up" },
      }),
    );
    expect(await refused(priceOrder({ actor: builder, orderId: order.id }))).toMatchObject({
      reason: "incomplete",
      words: "Choose the stock of shelves.dxf.",
    });
    const other = await makePerson();
    expect(await refused(priceOrder({ actor: other, orderId: order.id }))).toMatchObject({
      reason: "not-found",
    });
  });
});

describe("a quote", () => {
  test("freezes drawings, interpretation, parts, stock and prices in one step", async () => {
    const order = await makeQuoted(builder, shop);
    expect(order).toMatchObject({ stage: "quoted", revisionId: expect.any(String) });
    const quote = await quoteOf(order.id);
    expect(quote).toMatchObject({
      number: 1,
      revisionId: order.revisionId,
      priceBookVersionId: shop.priceBook.id,
      currency: "usd",
      status: "open",
    });
    expect(quote.facts.stocks[0]).toMatchObject({
      lotCode: "L-1801",
      thickness: { min: 17.6, mean: 17.8, max: 18 },
      sheetPrice: 9_800,
    });
    const lines = await listQuoteLines(db, quote.id);
    expect(lines.reduce((sum, line) => sum + line.amount, 0)).toBe(quote.total);
    expect(quote.net + quote.tax).toBe(quote.total);
    expect(quote.expiresAt.getTime() - quote.createdAt.getTime()).toBeGreaterThan(13.9 * DAY);
    expect(order.promisedFor).toEqual(quote.promisedFor);

    const [revision] = await db.select().from(revisions);
    expect(revision).toMatchObject({ orderId: order.id, number: 1, files: [{ fileName: "shelves.dxf" }] });
    expect(await running.services.storage.exists(`geometry/${revision?.geometryKey}`)).toBe(true);
    const list = await db.select().from(parts).orderBy(parts.position);
    // The drawing of the scene: one back 800 x 400 with a cut-out, two shelves 600 x 300 with two holes each.
    expect(
      list.map(({ label, quantity, width, height, holes }) => ({ label, quantity, width, height, holes })),
    ).toMatchObject([
      { label: "A", quantity: 1, width: 800, height: 400 },
      { label: "B", quantity: 2, width: 600, height: 300, holes: 2 },
    ]);
    const groups = await listStockGroups(db, order.id, order.revisionId ?? "");
    expect(groups).toMatchObject([
      { materialId: shop.material.id, lotId: shop.lot.id, sheets: 1, reservedAt: null },
    ]);
    expect(await listStageMoves(db, order.id)).toMatchObject([
      { from: "draft", to: "quoted", act: "quote", actorId: builder.id, actorRole: "builder" },
    ]);
    expect(await db.select().from(outbox)).toMatchObject([
      { recipient: builder.email, template: "quote", orderId: order.id },
    ]);
  });

  test("keeps its figures when prices, stock and the price book change", async () => {
    const order = await makeQuoted(builder, shop);
    const before = await quoteOf(order.id);
    const linesBefore = await listQuoteLines(db, before.id);
    await transact(async (tx) => {
      await tx.update(materials).set({ sheetPrice: 99_900, name: "Other" });
      await tx.update(lots).set({ thicknessMean: 17 });
      await tx.update(priceBookVersions).set({ status: "superseded" });
      await tx
        .insert(priceBookVersions)
        .values({ number: 2, content: { ...PRICE_BOOK, machineHour: 50_000 }, status: "published" });
    });
    expect(await quoteOf(order.id)).toEqual(before);
    expect(await listQuoteLines(db, before.id)).toEqual(linesBefore);
  });

  test("is made once for the same request and refused for an older view of the order", async () => {
    const draft = await makeReadyDraft(builder, shop);
    const request = { actor: builder, orderId: draft.id, version: draft.version, requestId: newId() };
    const both = await Promise.all([quoteOrder(request), quoteOrder({ ...request, requestId: newId() })]);
    expect(both.filter((one) => one.ok)).toHaveLength(1);
    expect(both.find((one) => !one.ok)).toMatchObject({ reason: "changed" });
    expect(await db.$count(quotes)).toBe(1);
    expect(await refused(quoteOrder(request))).toMatchObject({ reason: "wrong-stage" });
  });

  test("needs a confirmed size, a stock on the rack, and no open stop", async () => {
    const order = await makeDraftOrder(builder);
    await done(
      setDelivery({
        actor: builder,
        orderId: order.id,
        version: order.version,
        delivery: { kind: "pick-up" },
      }),
    );
    await chooseStock(builder, order, shop.material.id, (content) => ({
      ...content,
      files: content.files.map((file) => ({ ...file, unit: null })),
    }));
    const quote = async () => quoteOrder(await asked(builder, order.id));
    expect(await refused(quote())).toMatchObject({
      reason: "incomplete",
      words: expect.stringContaining("Confirm the size of shelves.dxf"),
    });
    await chooseStock(builder, order, shop.material.id);
    await transact((tx) => tx.update(lots).set({ sheetsReserved: 20 }));
    expect(await refused(quote())).toMatchObject({ reason: "out-of-stock" });
    await transact((tx) => tx.update(lots).set({ sheetsReserved: 0 }));
    expect(await quote()).toMatchObject({ ok: true });

    const large = await makeReadyDraft(
      builder,
      shop,
      dxfBytes([{ layer: "OUTSIDE", path: rectangle({ x: 0, y: 0 }, 3_000, 500) }]),
    );
    expect(await refused(quoteOrder(await asked(builder, large.id)))).toMatchObject({
      reason: "open-findings",
      words: expect.stringContaining("3,000.0"),
    });
    expect((await orderAsIs(large.id)).stage).toBe("draft");
  });

  test("is the builder's to ask for: not another's, not the shop's, though one is both", async () => {
    const order = await makeReadyDraft(builder, shop);
    const both = await makePerson({ roles: ["builder", "owner"] });
    for (const [actor, reason] of [
      [await makePerson(), "not-found"],
      [operator, "not-allowed"],
      [both, "not-allowed"],
    ] as const)
      expect(await refused(quoteOrder(await asked(actor, order.id)))).toMatchObject({ reason });
  });
});

describe("approval", () => {
  test("of the list that was shown is the release, and makes the debt", async () => {
    const order = await makeQuoted(builder, shop);
    const quote = await quoteOf(order.id);
    await done(approve(builder, order.id));
    expect(await quoteOf(order.id)).toMatchObject({
      status: "accepted",
      acceptedBy: builder.id,
      acceptedAt: expect.any(Date),
    });
    expect(await owedOnQuote(db, order.id, quote.id)).toBe(quote.total);
    await done(approve(builder, order.id));
    expect(await owedOnQuote(db, order.id, quote.id)).toBe(quote.total);
  });

  test("of another list, of an expired quote, or by the shop is refused", async () => {
    const order = await makeQuoted(builder, shop);
    const request = {
      actor: builder,
      orderId: order.id,
      version: order.version,
      quoteId: order.quoteId ?? "",
      listHash: "0".repeat(64),
    };
    expect(await refused(approveQuote(request))).toMatchObject({ reason: "changed" });
    expect(await refused(approveQuote({ ...request, actor: operator }))).toMatchObject({
      reason: "not-allowed",
    });
    expect(await refused(approve(builder, order.id, new Date(Date.now() + 15 * DAY)))).toMatchObject({
      reason: "expired",
    });
    expect(await quoteOf(order.id)).toMatchObject({ status: "expired", acceptedAt: null });
  });

  test("of an expired quote comes after pricing again, which shows what differs", async () => {
    const order = await makeQuoted(builder, shop, new Date(Date.now() - 20 * DAY));
    const old = await quoteOf(order.id);
    await refused(approve(builder, order.id));
    await transact((tx) => tx.update(materials).set({ sheetPrice: 10_800 }));
    const { quote, differences } = await done(requoteOrder(await asked(builder, order.id)));
    // One sheet, 1,000 cents dearer, with the mark-up of 0.2: 1,200 cents, and the tax of 0.085 on it: 102 cents.
    expect(differences.map(({ kind, difference }) => [kind, difference])).toEqual([
      ["material", 1_200],
      ["tax", 102],
    ]);
    expect(quote).toMatchObject({ number: 2, revisionId: old.revisionId, total: old.total + 1_302 });
    expect((await listQuotes(db, order.id)).map(({ number, status }) => [number, status])).toEqual([
      [2, "open"],
      [1, "superseded"],
    ]);
    await done(approve(builder, order.id));
    expect(await refused(requoteOrder(await asked(builder, order.id)))).toMatchObject({
      reason: "wrong-stage",
    });
  });
});

describe("a change after the quote", () => {
  test("takes it back to draft with its choices; the next revision is number 2 and the old quote counts no more", async () => {
    const order = await makeApproved(builder, shop);
    const first = await quoteOf(order.id);
    const { sessionId } = await openPayPage(builder, order.id);
    const before = await contentOf(order.id);
    expect(
      await refused(
        setChoices({ actor: builder, orderId: order.id, after: before.number, sanding: "arrises" }),
      ),
    ).toMatchObject({ reason: "wrong-stage" });

    await done(reviseOrder(await asked(builder, order.id)));
    expect(await orderAsIs(order.id)).toMatchObject({ stage: "draft", quoteId: null, revisionId: null });
    expect((await contentOf(order.id)).content).toEqual(before.content);
    expect(await owedOnQuote(db, order.id, first.id)).toBe(0);
    expect(await running.services.payments.getCheckout(sessionId)).toMatchObject({
      value: { status: "expired" },
    });

    await done(
      setChoices({
        actor: builder,
        orderId: order.id,
        after: (await contentOf(order.id)).number,
        sanding: "arrises",
        leaveTabs: true,
      }),
    );
    await done(quoteOrder(await asked(builder, order.id)));
    const second = await quoteOf(order.id);
    expect(second.facts).toMatchObject({ sanding: "arrises", leaveTabs: true });
    expect(second.number).toBe(2);
    expect(await db.select({ number: revisions.number }).from(revisions)).toEqual([
      { number: 1 },
      { number: 2 },
    ]);
    expect(await findQuote(db, order.id, first.id)).toMatchObject({
      status: "superseded",
      total: first.total,
    });
  });
});

describe("review", () => {
  const lowerCap = async () => {
    const content = await currentSettings(db);
    await transact((tx) =>
      changeSettings(tx, {
        content: { ...content, review: { cap: 100 } },
        version: 1,
        by: "owner",
        now: new Date(),
      }),
    );
  };

  test("holds an order above the owner's cap until a person accepts it", async () => {
    await lowerCap();
    const order = await makeQuoted(builder, shop);
    expect(order.stage).toBe("needs-review");
    expect((await listStageMoves(db, order.id)).map(({ act, actorRole }) => [act, actorRole])).toEqual([
      ["quote", "builder"],
      ["ask-review", "system"],
    ]);
    expect(await refused(approve(builder, order.id))).toMatchObject({ reason: "wrong-stage" });
    expect(await refused(acceptReview(await asked(builder, order.id)))).toMatchObject({
      reason: "not-allowed",
    });
    await done(acceptReview(await asked(operator, order.id)));
    expect(await orderAsIs(order.id)).toMatchObject({ stage: "quoted", reviewedBy: operator.id });
    await done(approve(builder, order.id));
  });

  test("that the builder asks for, sent back with a reason, is a draft again", async () => {
    const order = await makeQuoted(builder, shop);
    await done(askReview(await asked(builder, order.id)));
    expect((await orderAsIs(order.id)).stage).toBe("needs-review");
    expect(await refused(sendBack(await asked(operator, order.id)))).toMatchObject({ reason: "incomplete" });
    await done(sendBack({ ...(await asked(operator, order.id)), reason: "The back is drawn twice." }));
    expect(await orderAsIs(order.id)).toMatchObject({ stage: "draft", quoteId: null });
    expect((await listQuotes(db, order.id))[0]).toMatchObject({ status: "superseded" });
    expect((await db.select().from(outbox)).at(-1)).toMatchObject({
      template: "sent-back",
      recipient: builder.email,
      payload: { text: expect.stringContaining("The back is drawn twice.") },
    });
  });

  test("for a question about the drawing ends with the builder's last answer", async () => {
    const draft = await makeReadyDraft(builder, shop, narrowStrip());
    const { review } = await done(quoteOrder(await asked(builder, draft.id)));
    expect(review).toEqual(["a question about the drawing waits for its answer"]);
    const order = await orderAsIs(draft.id);
    expect(order.stage).toBe("needs-review");
    const finding = await questionOf(order);
    const answer = { actor: builder, orderId: order.id, findingId: finding.id };

    expect(await refused(answerFinding({ ...answer, actor: operator, answer: "accept" }))).toMatchObject({
      reason: "not-allowed",
    });
    await done(answerFinding({ ...answer, answer: "message", note: "Can you hold it?" }));
    expect((await orderAsIs(order.id)).stage).toBe("needs-review");
    await done(answerFinding({ ...answer, answer: "accept" }));
    expect((await orderAsIs(order.id)).stage).toBe("quoted");
    expect((await questionOf(order)).answer).toMatchObject({ answer: "accept", answeredBy: builder.id });
    await done(approve(builder, order.id));
  });

  test("accepted by the shop leaves the builder's question open: it is answered before paying", async () => {
    const draft = await makeReadyDraft(builder, shop, narrowStrip());
    await done(quoteOrder(await asked(builder, draft.id)));
    await done(acceptReview(await asked(operator, draft.id)));
    await done(approve(builder, draft.id));
    expect(await refused(startCheckout({ actor: builder, orderId: draft.id }))).toMatchObject({
      reason: "open-findings",
    });
    const finding = await questionOf(await orderAsIs(draft.id));
    await done(answerFinding({ actor: builder, orderId: draft.id, findingId: finding.id, answer: "accept" }));
    await done(startCheckout({ actor: builder, orderId: draft.id }));
  });

  /** Narrower than the shop's setting for what is easily held: asked about. */
  const narrowStrip = () => dxfBytes([{ layer: "OUTSIDE", path: rectangle({ x: 0, y: 0 }, 900, 20) }]);
  const questionOf = async ({ revisionId }: { revisionId: string | null }) => {
    const [question] = (await listFindings(db, revisionId ?? "")).filter(
      ({ severity }) => severity === "ask",
    );
    if (!question) throw new Error("There is no question.");
    return question;
  };
});
