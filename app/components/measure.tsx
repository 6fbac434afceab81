import { formatArea, formatInches, formatMillimetres, nearest64th } from "~/domain/units";
import { useShownUnit } from "./shown-unit";

const THIN_SPACE = "\u2009";

interface MeasureProps {
  /** Millimetres. */
  readonly length: number;
  readonly digits?: number;
  /** Without the unit: the head of the column says it. */
  readonly bare?: boolean;
}

/** A length in the reader's unit; in inches with the nearest 1/64 beside it. */
export function Measure({ length, digits, bare = false }: MeasureProps) {
  const unit = useShownUnit();
  if (unit === "mm") {
    return (
      <span className="measure whitespace-nowrap">
        {formatMillimetres(length, digits)}
        {bare ? "" : `${THIN_SPACE}mm`}
      </span>
    );
  }
  return (
    <span className="measure whitespace-nowrap">
      {formatInches(length, digits === undefined ? undefined : digits + 2)}
      {bare ? "" : `${THIN_SPACE}in`} <span className="text-soft">{nearest64th(length)}</span>
    </span>
  );
}

interface SizeProps {
  /** Millimetres. */
  readonly width: number;
  readonly height: number;
  readonly bare?: boolean;
}

/** Two lengths as a size: `620.0 × 420.0`. */
export function Size({ width, height, bare = false }: SizeProps) {
  const unit = useShownUnit();
  const print = unit === "mm" ? formatMillimetres : formatInches;
  return (
    <span className="measure whitespace-nowrap">
      {print(width)} × {print(height)}
      {bare ? "" : `${THIN_SPACE}${unit}`}
    </span>
  );
}

/** A cut length in metres or feet. */
export function CutLength({ length, bare = false }: { readonly length: number; readonly bare?: boolean }) {
  const unit = useShownUnit();
  const value = unit === "mm" ? length / 1000 : length / 304.8;
  return (
    <span className="measure whitespace-nowrap">
      {value.toFixed(2)}
      {bare ? "" : `${THIN_SPACE}${unit === "mm" ? "m" : "ft"}`}
    </span>
  );
}

/** An area given in square millimetres, in m² or ft². */
export function Area({ area }: { readonly area: number }) {
  return <span className="measure whitespace-nowrap">{formatArea(area, useShownUnit())}</span>;
}
