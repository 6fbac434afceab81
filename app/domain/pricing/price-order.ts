import { estimateMinutes } from "~/domain/toolpath";
import { panelKilograms } from "~/domain/units";
import { freightLine } from "./freight";
import type { PriceOrder, QuoteLine } from "./quote";
import { refusalOf } from "./refusal";
import { planStock } from "./sheets";
import {
  materialLine,
  minimumLine,
  packingLine,
  routerLine,
  sandingLine,
  setUpLine,
  tabsLine,
} from "./shop-lines";
import { taxLine } from "./tax";

const total = (lines: readonly QuoteLine[]): number => lines.reduce((sum, line) => sum + line.amount, 0);

/**
 * The price of an order: material, router, set-up, tabs, sanding, packing, a supplement up to the smallest
 * order, freight, tax. Every amount is rounded half up to a cent on its own line; the total is their sum.
 * Deterministic, and never less for more of a part. Refuses with a sentence what it cannot price.
 */
export const priceOrder: PriceOrder = (facts, book) => {
  const refusal = refusalOf(facts, book);
  if (refusal) return { ok: false, reason: refusal };

  const planned = facts.stocks.map((stock) => planStock(stock, facts.plannedYield, facts.spacing));
  const materials = planned.map((plan) => materialLine(plan, facts, book));
  const routers: QuoteLine[] = [];
  let machineMinutes = 0;
  for (const plan of planned) {
    const { stock, sheets } = plan;
    const cut = estimateMinutes({
      parts: stock.parts,
      thickness: stock.nominalThickness,
      sheets,
      rates: book,
    });
    if (!cut.ok) return { ok: false, reason: cut.reason };
    const router = routerLine(plan, cut.estimate, planned.length > 1, book);
    routers.push(router.line);
    machineMinutes += router.minutes;
  }

  const pieces = planned.reduce((sum, plan) => sum + plan.pieces, 0);
  const tabs = tabsLine(facts, book);
  const sanding = sandingLine(facts, book);
  const shop = [
    ...materials,
    ...routers,
    setUpLine(facts.stocks.length, book),
    tabs.line,
    sanding.line,
    packingLine(pieces, book),
  ];
  const supplement = minimumLine(total(shop), book);
  const untaxed = [...shop, ...(supplement ? [supplement] : []), freightLine(facts, book)];
  const tax = taxLine(untaxed, facts);
  const net = total(untaxed);
  return {
    ok: true,
    quote: {
      lines: [...untaxed, tax],
      net,
      tax: tax.amount,
      total: net + tax.amount,
      machineMinutes,
      benchMinutes: tabs.minutes + sanding.minutes,
      weightKilograms: facts.stocks.reduce(
        (sum, { parts, thickness, density }) =>
          parts.reduce(
            (heavier, part) => heavier + part.quantity * panelKilograms(part.area, thickness.mean, density),
            sum,
          ),
        0,
      ),
      sheets: planned.map(({ stock, sheets }) => ({ materialId: stock.materialId, sheets })),
    },
  };
};
