import { silhouetteOf } from "~/components/drawing-viewer/view-geometry-of";
import type {
  DraftFile,
  ShownFinding,
  ShownLayer,
  ShownPart,
  StockChoice,
  UnitQuestion,
} from "~/components/order/order-view";
import { db } from "~/db/client.server";
import type { Interpretation } from "~/domain/orders";
import type { PartsReport } from "~/domain/parts";
import { MM_PER_UNIT } from "~/domain/units";
import { checkOrderFit } from "~/flows/check-order-fit";
import { type FileParts, findOrderParts, type OrderParts } from "~/flows/find-order-parts.server";
import { type FileReport, listOrderParts } from "~/flows/listed-parts";
import { guessedLayers } from "~/flows/order-interpretation.server";
import { deliveryOf, priceOrder } from "~/flows/price-order.server";
import { collectFacts, type Delivery } from "~/flows/quote-facts.server";
import { type Address, listAddresses } from "~/models/addresses.server";
import { findFileSizes } from "~/models/drawing-files.server";
import { listLots, listMaterials } from "~/models/materials.server";
import type { Order } from "~/models/orders.server";
import { findPublishedPriceBook } from "~/models/price-books.server";
import { currentSettings } from "~/models/settings.server";
import type { PriceAnswer } from "~/routes/api/price";
import { shownDrawings, shownFindings } from "./drawings-shown.server";

type ReadFile = Extract<FileParts, { state: "read" }>;

/** Everything the page of a draft shows. */
export async function draftView(
  order: Order,
  person: { readonly id: string; readonly roles: Parameters<typeof priceOrder>[0]["actor"]["roles"] },
) {
  const found = await findOrderParts({ order });
  const { content, number } = found.interpretation;
  const read = found.files.filter((file): file is ReadFile => file.state === "read");
  const reports = read.map(({ sha256, geometry }) => ({ sha256, report: geometry.report }));
  const addresses = await listAddresses(db, order.builderId);
  const supposed = deliveryOf(order) ?? supposedDelivery(addresses);
  return {
    kind: "draft" as const,
    after: number,
    content,
    drawings: shownDrawings(read),
    geometryKey: found.geometryKey,
    files: await draftFiles(found),
    parts: draftParts(reports, content),
    findings: await draftFindings(order, reports, content),
    unitQuestion: unitQuestion(read),
    stocks: await stockChoices(),
    addresses,
    delivery: order.delivery,
    shipTo: order.shipTo,
    /** What the price is shown for while the builder has not said where it goes. */
    supposed,
    price: await pricedNow(order, person, supposed),
  };
}
export type DraftView = Awaited<ReturnType<typeof draftView>>;

const supposedDelivery = ([first]: readonly Address[]): Delivery =>
  first ? { delivery: "ship", region: first.shipTo.region } : { delivery: "pick-up", region: null };

/** What the price route would answer now, so that the page comes with its price. */
async function pricedNow(
  order: Order,
  actor: Parameters<typeof draftView>[1],
  delivery: Delivery,
): Promise<PriceAnswer | { readonly ok: false; readonly words: string }> {
  const priced = await priceOrder({ actor, orderId: order.id, delivery });
  if (!priced.ok) return { ok: false, words: priced.words };
  const { quote, currency, promisedFor, promiseHow, wouldExpireAt } = priced;
  return {
    ok: true,
    quote,
    currency,
    promisedFor: promisedFor.toISOString(),
    promiseHow,
    wouldExpireAt: wouldExpireAt.toISOString(),
  };
}

/** The part list as it stands, parts without a stock included. */
function draftParts(reports: readonly FileReport[], content: Interpretation): ShownPart[] {
  const files = content.files.map((file) => ({ ...file, materialId: file.materialId ?? "" }));
  return listOrderParts(reports, { ...content, files }).map((part) => ({
    label: part.label,
    fileSha: part.fileSha,
    letter: part.letter,
    name: part.name,
    width: part.width,
    height: part.height,
    cutLength: part.outerLength + part.innerLength,
    quantity: part.quantity,
    mirrorOf: part.mirrorOf,
    grain: part.grain,
  }));
}

/** The fit of what has a stock already, on the lots as they lie on the rack. */
async function draftFindings(
  order: Order,
  reports: readonly FileReport[],
  content: Interpretation,
): Promise<ShownFinding[]> {
  const settings = await currentSettings(db);
  const book = await findPublishedPriceBook(db);
  if (!book) return [];
  const collected = await collectFacts(db, {
    parts: listOrderParts(reports, content),
    choices: content,
    delivery: deliveryOf(order) ?? { delivery: "pick-up", region: null },
    taxExempt: false,
    settings,
    book: book.content,
    now: new Date(),
  });
  if (!collected.ok) return [];
  const { facts, stocks } = collected;
  const checked = stocks.flatMap(({ parts }, index) => {
    const stock = facts.stocks[index];
    return stock ? [{ parts, thickness: stock.thickness, sheet: stock.sheet }] : [];
  });
  return shownFindings(
    checkOrderFit(reports, checked, settings).map((finding) => ({ id: null, finding, answer: null })),
    content.files.map(({ sha256 }) => sha256),
  );
}

async function draftFiles({ files, interpretation }: OrderParts): Promise<DraftFile[]> {
  const sizes = await findFileSizes(
    db,
    files.map(({ sha256 }) => sha256),
  );
  return files.map((file, index) => {
    const chosen = interpretation.content.files.find(({ sha256 }) => sha256 === file.sha256);
    return {
      drawingId: file.drawingId,
      sha256: file.sha256,
      fileName: file.fileName,
      number: index + 1,
      size: sizes.get(file.sha256) ?? 0,
      state: file.state,
      words: file.state === "failed" ? file.words : null,
      unit: chosen?.unit ?? null,
      materialId: chosen?.materialId ?? null,
      sets: chosen?.sets ?? 1,
      kinds: file.state === "read" ? file.geometry.report.parts.length : 0,
      layers: file.state === "read" ? shownLayers(file, chosen?.layers ?? []) : [],
      leftOut: file.state === "read" ? leftOut(file) : [],
    };
  });
}

function shownLayers({ summary }: ReadFile, rules: Interpretation["files"][number]["layers"]): ShownLayer[] {
  const guesses = guessedLayers(summary);
  return summary.layers
    .filter(({ count }) => count > 0)
    .map(({ name, count, hidden }) => {
      const rule = rules.find(({ layer }) => layer === name) ?? null;
      const guess = guesses.find(({ layer }) => layer === name);
      const guessed =
        rule === null ||
        (guess !== undefined &&
          guess.kind === rule.kind &&
          JSON.stringify(guess.depth) === JSON.stringify(rule.depth));
      return { name, count, hidden, rule, guessed };
    });
}

const ASIDE: Readonly<Record<PartsReport["setAside"][number]["what"], string>> = {
  frame: "drawn border or sheet",
  text: "lettering",
  hidden: "on a hidden layer",
  note: "notes and dimensions",
  duplicate: "lines drawn twice",
};

const UNREAD: Readonly<Record<string, string>> = {
  "not-a-curve": "not a line or a curve",
  "paper-space": "on a paper sheet, not in the model",
  "three-dimensional": "not in the plane",
  damaged: "damaged",
  "too-deep": "too deep in blocks",
  "too-many": "more than can be read",
};

/** Everything of the drawing that becomes no part, in words: nothing is left out in silence. */
function leftOut({ summary, geometry }: ReadFile): string[] {
  const { setAside, open } = geometry.report;
  return [
    ...setAside.map(({ what, layer, count }) => `${count} × ${ASIDE[what]}, layer ${layer}`),
    ...summary.ignored.map(
      ({ type, layer, count, why }) => `${count} × ${type}, layer ${layer}: not read, ${UNREAD[why] ?? why}`,
    ),
    ...(open.length > 0
      ? [`${open.length} open ${open.length === 1 ? "line" : "lines"} that close no outline`]
      : []),
    ...summary.notes,
  ];
}

/** One question for all drawings that declare the same unit: the longest part among them. */
function unitQuestion(read: readonly ReadFile[]): UnitQuestion | null {
  const waiting = read.filter(({ geometry }) => !geometry.confirmed && geometry.report.parts.length > 0);
  const first = waiting[0];
  if (!first) return null;
  const alike = waiting.filter(({ summary }) => summary.declared === first.summary.declared);
  const parts = alike.flatMap(({ geometry }) => geometry.report.parts);
  const longest = parts.reduce((most, part) =>
    part.smallestRect.long > most.smallestRect.long ? part : most,
  );
  const assumed = first.geometry.unit;
  return {
    shas: alike.map(({ sha256 }) => sha256),
    fileNames: alike.map(({ fileName }) => fileName),
    declared: first.summary.declared,
    longest: longest.smallestRect.long / MM_PER_UNIT[assumed],
    shape: silhouetteOf(longest),
    assumed,
  };
}

async function stockChoices(): Promise<StockChoice[]> {
  const materials = (await listMaterials(db)).sort(
    (one, other) => one.nominalThickness - other.nominalThickness,
  );
  return Promise.all(
    materials.map(async (material) => {
      const [lot] = await listLots(db, material.id);
      return {
        id: material.id,
        name: material.name,
        nominal: material.nominalThickness,
        measured: lot
          ? {
              lot: lot.code,
              min: lot.thicknessMin,
              mean: lot.thicknessMean,
              max: lot.thicknessMax,
              free: lot.sheetsOnHand - lot.sheetsReserved,
            }
          : null,
      };
    }),
  );
}
