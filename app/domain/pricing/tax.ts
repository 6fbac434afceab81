import { formatMoney, roundHalfUp } from "~/domain/units";
import type { QuoteFacts, QuoteLine } from "./quote";

/** `8.25 %`, without trailing zeros. */
const percent = (rate: number): string => `${Number((rate * 100).toFixed(4))} %`;

/** Sales tax on the taxable lines; a line of nothing says why none is charged. */
export function taxLine(lines: readonly QuoteLine[], facts: QuoteFacts): QuoteLine {
  const { rate, region, freightTaxable } = facts.tax;
  const none = (how: string): QuoteLine => ({
    kind: "tax",
    label: "No sales tax",
    how,
    amount: 0,
    taxable: false,
  });
  if (facts.taxExempt) return none("A valid exemption certificate is on file.");
  if (rate === 0) return none(`No sales tax is collected for ${region}.`);

  const base = lines.reduce((sum, line) => (line.taxable ? sum + line.amount : sum), 0);
  const freight =
    facts.delivery === "pick-up" ? "" : freightTaxable ? ", freight included" : ", freight not taxed";
  return {
    kind: "tax",
    label: `Sales tax, ${region}`,
    how: `${percent(rate)} of ${formatMoney(base)} in ${region}${freight}.`,
    amount: roundHalfUp(base * rate),
    taxable: false,
  };
}
