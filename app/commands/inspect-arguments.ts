import { parseArgs } from "node:util";
import { LENGTH_UNITS, type LengthUnit } from "~/domain/units";

/** Measured stock, millimetres. */
export interface Thickness {
  readonly min: number;
  readonly mean: number;
  readonly max: number;
}

export interface InspectArguments {
  readonly file: string;
  readonly unit: LengthUnit | null;
  readonly thickness: Thickness | null;
}

export type ParsedArguments =
  | { readonly ok: true; readonly arguments: InspectArguments }
  | { readonly ok: false; readonly reason: string };

const USAGE = "Say: inspect FILE.dxf [--units mm|in|cm|m|ft] [--thickness T or MIN,MEAN,MAX].";

/** The command line of `inspect`, or one sentence that says what is wrong with it. */
export function parseInspectArguments(given: readonly string[]): ParsedArguments {
  let parsed: ReturnType<typeof parse>;
  try {
    parsed = parse(given);
  } catch (error) {
    return { ok: false, reason: `${error instanceof Error ? error.message : String(error)} ${USAGE}` };
  }
  const { positionals, values } = parsed;
  if (positionals.length !== 1) return { ok: false, reason: `Name one DXF file. ${USAGE}` };
  const unit = LENGTH_UNITS.find((one) => one === values.units) ?? null;
  if (values.units !== undefined && unit === null) {
    return { ok: false, reason: `The unit ${values.units} is not one of ${LENGTH_UNITS.join(", ")}.` };
  }
  const thickness = values.thickness === undefined ? null : thicknessOf(values.thickness);
  if (values.thickness !== undefined && thickness === null) {
    return {
      ok: false,
      reason: `The thickness ${values.thickness} is neither T nor MIN,MEAN,MAX in millimetres.`,
    };
  }
  return { ok: true, arguments: { file: positionals[0], unit, thickness } };
}

const parse = (given: readonly string[]) =>
  parseArgs({
    args: [...given],
    allowPositionals: true,
    options: { units: { type: "string" }, thickness: { type: "string" } },
  });

function thicknessOf(text: string): Thickness | null {
  const numbers = text.split(",").map(Number);
  const [min, mean = min, max = min] = numbers;
  const isWhole = numbers.length === 1 || numbers.length === 3;
  return isWhole && numbers.every((value) => value > 0 && value < 1000) && min <= mean && mean <= max
    ? { min, mean, max }
    : null;
}
