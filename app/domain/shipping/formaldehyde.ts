/**
 * Boards under the US formaldehyde rule for composite wood (TSCA Title VI, 40 CFR 770): hardwood plywood and MDF. A
 * fabricator's label on each box names the maker, the month and year made, and says that it complies (770.45).
 * Structural softwood plywood and plastics are outside of it.
 */
const UNDER_THE_RULE: readonly string[] = ["birch-plywood", "hardwood-plywood", "mdf"];

export interface BoxStock {
  readonly kind: string;
  readonly lot: string | null;
  /** The supplier's paper that says the board complies. */
  readonly document: string | null;
}

export interface FormaldehydeLine {
  /** Null where no board in the box is under the rule. */
  readonly line: string | null;
  /** Lots that are under it and whose paper is not on file: nothing may be claimed of them. */
  readonly missing: readonly string[];
}

/** The line for a box of parts of these stocks; `made` is the month they were cut, like `December 2026`. */
export function formaldehydeLine(stocks: readonly BoxStock[], maker: string, made: string): FormaldehydeLine {
  const under = stocks.filter(({ kind }) => UNDER_THE_RULE.includes(kind));
  const missing = [
    ...new Set(under.filter(({ document }) => !document?.trim()).map(({ lot }) => lot ?? "no lot")),
  ];
  return {
    line:
      under.length > 0 && missing.length === 0 ? `TSCA Title VI compliant. Made by ${maker}, ${made}.` : null,
    missing,
  };
}
