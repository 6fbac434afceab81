import { formatThickness } from "./format-thickness";
import type { StockChoice } from "./order-view";

/** A stock in a list: its name, nominal thickness, and what the lot on the rack measures. */
export function stockLabel({ name, nominal, measured }: StockChoice): string {
  const named = name.includes(`${nominal} mm`) ? name : `${name}, ${nominal} mm`;
  if (!measured) return `${named}: none on the rack`;
  return `${named}: measures ${formatThickness(measured)}, lot ${measured.lot}, ${measured.free} free`;
}
