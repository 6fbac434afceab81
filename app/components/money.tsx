import { formatMoney } from "~/domain/units";

interface MoneyProps {
  /** Integer cents. */
  readonly cents: number;
  readonly currency?: string;
  /** `line` is the bare amount of a table whose head says the currency; `price` is the large one of a page. */
  readonly show?: "plain" | "line" | "price";
}

/** An amount of money in mono. */
export function Money({ cents, currency = "usd", show = "plain" }: MoneyProps) {
  const whole = formatMoney(cents, currency).replace("-", "−");
  const words = show === "line" ? whole.replace(/[^\d.,−]/g, "") : whole;
  return (
    <span
      className={`measure whitespace-nowrap ${show === "price" ? "text-price font-semibold text-ink" : ""}`}
    >
      {words}
    </span>
  );
}
