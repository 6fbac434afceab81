/** Integer cents of the shop's currency. */
export type Cents = number & { readonly __unit: "cents" };

/** Rounds half up (toward positive infinity), as each line of a quote is rounded. */
export const roundHalfUp = (value: number): number =>
  Math.floor(value + 0.5 + Number.EPSILON * Math.abs(value));

/** The only way to make cents: a fractional amount is rounded half up to a whole cent. */
export const cents = (value: number): Cents => roundHalfUp(value) as Cents;

/** `$1,244.55`, `-$18.00` */
export function formatMoney(amount: number, currency = "usd"): string {
  return new Intl.NumberFormat("en-US", { style: "currency", currency: currency.toUpperCase() }).format(
    amount / 100,
  );
}
