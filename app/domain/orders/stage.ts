/** Spelled just so in data, API and screens. */
export const STAGES = [
  "draft",
  "quoted",
  "needs-review",
  "paid",
  "received",
  "nested",
  "cut",
  "tabs-removed",
  "shipped",
  "on-hold",
  "cancelled",
] as const;
export type Stage = (typeof STAGES)[number];

export const SHOP_STAGES = ["received", "nested", "cut", "tabs-removed", "shipped"] as const;
/** A piece exists from the moment its order is received. */
export type PieceStage = (typeof SHOP_STAGES)[number];

/** The way an order goes when nothing comes between: what the steel rule shows. */
export const MAIN_LINE = ["draft", "quoted", "paid", ...SHOP_STAGES] as const satisfies readonly Stage[];
