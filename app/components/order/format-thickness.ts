import { formatMillimetres } from "~/domain/units";

/** A lot's measured thickness: `17.62–17.98`. */
export const formatThickness = ({ min, max }: { readonly min: number; readonly max: number }): string =>
  `${formatMillimetres(min, 2)}–${formatMillimetres(max, 2)}`;
