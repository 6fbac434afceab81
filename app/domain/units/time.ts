export type Minutes = number & { readonly __unit: "minutes" };
export const minutes = (value: number): Minutes => value as Minutes;

/** `46 min`, `6 h 10 min` */
export function formatMinutes(value: number): string {
  const whole = Math.max(value > 0 ? 1 : 0, Math.round(value));
  if (whole < 90) return `${whole} min`;
  return `${Math.floor(whole / 60)} h ${String(whole % 60).padStart(2, "0")} min`;
}
