import { plywoodLimits, type StackThickness } from "~/domain/fit";

export interface StripScale {
  readonly from: number;
  readonly to: number;
}

interface Stack {
  readonly thickness: StackThickness;
  readonly nominal: number;
  readonly plywood: boolean;
}

/** One scale for stacks that stand under one another: their nominal, their limits and all their readings, in tenths. */
export function stripScale(stacks: readonly Stack[]): StripScale {
  const marks = stacks.flatMap(({ thickness, nominal, plywood }) => {
    const { lower, upper } = plywoodLimits(nominal);
    return [thickness.min, thickness.max, nominal, ...(plywood ? [lower, upper] : [])];
  });
  const room = 0.1;
  return {
    from: Math.floor((Math.min(...marks) - room) * 10) / 10,
    to: Math.ceil((Math.max(...marks) + room) * 10) / 10,
  };
}

const HEIGHT = 34;
const BASE = 12;

/** A stack's thickness as a piece of rule: from its thinnest to its thickest, a mark at the mean, the limits dashed. */
export function ThicknessStrip({
  thickness,
  nominal,
  plywood,
  scale,
}: Stack & { readonly scale: StripScale }) {
  const at = (length: number): string =>
    `${Math.round(((length - scale.from) / (scale.to - scale.from)) * 1e4) / 100}%`;
  const { min, mean, max } = thickness;
  const limits = plywoodLimits(nominal);
  const isBeyond = plywood && (min < limits.lower || max > limits.upper);
  const tenths = Math.round((scale.to - scale.from) * 10);
  const first = Math.round(scale.from * 10);
  const width = `${Math.max(((max - min) / (scale.to - scale.from)) * 100, 0.6).toFixed(2)}%`;
  return (
    <div>
      <svg
        role="img"
        aria-label={`${min.toFixed(2)} to ${max.toFixed(2)} mm, mean ${mean.toFixed(2)} mm, nominal ${nominal} mm${isBeyond ? ", beyond EN 315" : ""}`}
        width="100%"
        height={HEIGHT}
        className="block overflow-visible"
      >
        <g shapeRendering="crispEdges">
          {Array.from({ length: tenths + 1 }, (_, step) => {
            const tenth = first + step;
            const height = tenth % 10 === 0 ? 12 : tenth % 5 === 0 ? 8 : 4;
            return (
              <line
                key={tenth}
                x1={at(tenth / 10)}
                x2={at(tenth / 10)}
                y1={HEIGHT}
                y2={HEIGHT - height}
                className={tenth % 5 === 0 ? "stroke-edge" : "stroke-line"}
              />
            );
          })}
          <rect
            x={at(min)}
            y={BASE - 7}
            width={width}
            height="14"
            className={isBeyond ? "fill-amber-wash stroke-amber" : "fill-grain stroke-ink"}
          />
          {plywood &&
            [limits.lower, limits.upper].map((limit) => (
              <line
                key={limit}
                x1={at(limit)}
                x2={at(limit)}
                y1="0"
                y2={HEIGHT}
                strokeDasharray="3 3"
                className={isBeyond ? "stroke-amber" : "stroke-soft"}
              />
            ))}
          <line x1={at(nominal)} x2={at(nominal)} y1={HEIGHT} y2="2" className="stroke-edge" />
          <line x1={at(mean)} x2={at(mean)} y1="1" y2={BASE + 11} strokeWidth="2" className="stroke-blue" />
        </g>
      </svg>
      <p className="mt-1 flex justify-between text-caption text-soft" aria-hidden="true">
        <span className="measure">{scale.from.toFixed(1)}</span>
        <span className="measure">{scale.to.toFixed(1)} mm</span>
      </p>
    </div>
  );
}
