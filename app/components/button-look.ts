export type ButtonVariant = "primary" | "plain" | "chosen" | "quiet" | "danger";
export type ButtonSize = "small" | "normal" | "large" | "floor";

const VARIANT: Readonly<Record<ButtonVariant, string>> = {
  primary: "border-blue bg-blue text-on-blue hover:opacity-90",
  plain: "border-line bg-sheet text-ink hover:border-edge",
  chosen: "border-blue bg-blue-wash text-blue",
  quiet: "border-transparent bg-transparent text-blue hover:underline underline-offset-4",
  danger: "border-ink bg-sheet text-amber hover:bg-amber-wash",
};

/** Under a finger every size grows to 44 px (WCAG 2.2, 2.5.5); on the floor, in gloves, to 56 px. */
const HEIGHT: Readonly<Record<ButtonSize, string>> = {
  small: "min-h-7 text-small pointer-coarse:min-h-11",
  normal: "min-h-9 text-body pointer-coarse:min-h-11",
  large: "min-h-11 text-body",
  floor: "min-h-14 text-floor",
};
const PADDING: Readonly<Record<ButtonSize, string>> = {
  small: "px-2.5",
  normal: "px-4",
  large: "px-5",
  floor: "px-6",
};

/** The classes of a button or of a link that looks like one. A quiet one stands in its line without padding. */
export function buttonLook(variant: ButtonVariant, size: ButtonSize, wide = false): string {
  const padding = variant === "quiet" ? "px-0" : PADDING[size];
  return `inline-flex items-center justify-center gap-2 rounded-sheet border font-medium text-center no-underline disabled:opacity-55 disabled:hover:opacity-55 aria-disabled:opacity-55 ${VARIANT[variant]} ${HEIGHT[size]} ${padding} ${wide ? "w-full" : ""}`;
}
