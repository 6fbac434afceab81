import { memo } from "react";
import type { ViewOutline, ViewPart } from "./view-geometry";

export type PartState = "plain" | "lit" | "chosen";

/** Circles smaller than this on the screen stand without a centre mark, in pixels of radius. */
const LEAST_MARKED = 4;

interface PartShapeProps {
  readonly part: ViewPart;
  readonly state: PartState;
  readonly hatch: string;
  /** Pixels in a millimetre, rounded to a power of two, so that a part is not drawn anew at every turn of the wheel. */
  readonly roughScale: number;
  /** A stop of the Tab key that can be chosen. */
  readonly choosable: boolean;
}

const OUTSIDE: Readonly<Record<PartState, string>> = {
  plain: "fill-grain/55 stroke-ink",
  lit: "fill-blue-wash/70 stroke-ink",
  chosen: "fill-blue-wash stroke-blue",
};

/** All copies of one part, one path for each kind of outline, after the line conventions of ISO 128. */
export const PartShape = memo(function PartShape({
  part,
  state,
  hatch,
  roughScale,
  choosable,
}: PartShapeProps) {
  const { width, height } = part.size;
  const words = `Part ${part.id}${part.name === part.id ? "" : `, ${part.name}`}, ${part.quantity === 1 ? "one" : part.quantity}, ${width.toFixed(1)} by ${height.toFixed(1)} mm`;
  return (
    <g
      data-part={part.id}
      {...(choosable
        ? { role: "button", tabIndex: 0, "aria-label": words, "aria-pressed": state === "chosen" }
        : {})}
      className={choosable ? "cursor-pointer outline-offset-4" : ""}
    >
      {part.outlines.map((outline) => (
        <Outline
          key={`${outline.kind} ${outline.depthLabel}`}
          outline={outline}
          state={state}
          hatch={hatch}
        />
      ))}
      <path
        d={centreMarks(part, roughScale)}
        fill="none"
        vectorEffect="non-scaling-stroke"
        strokeWidth="0.8"
        strokeDasharray="9 2 1.5 2"
        className="pointer-events-none stroke-soft"
      />
    </g>
  );
});

interface OutlineProps {
  readonly outline: ViewOutline;
  readonly state: PartState;
  readonly hatch: string;
}

function Outline({ outline, state, hatch }: OutlineProps) {
  const common = { d: outline.d, vectorEffect: "non-scaling-stroke", strokeLinejoin: "round" } as const;
  const through = outline.depthLabel === undefined;
  switch (outline.kind) {
    case "outside":
      return <path {...common} strokeWidth={state === "chosen" ? 2.2 : 1.7} className={OUTSIDE[state]} />;
    case "pocket":
      return <path {...common} fill={`url(#${hatch})`} strokeWidth="0.9" className="stroke-ink" />;
    case "engrave":
      return (
        <path
          {...common}
          fill="none"
          strokeWidth="1.5"
          strokeLinecap="round"
          strokeDasharray="0.1 3.4"
          className="stroke-ink"
        />
      );
    case "cut-through":
    case "drill":
      return (
        <path {...common} strokeWidth="1" className={`stroke-ink ${through ? "fill-sheet" : "fill-none"}`} />
      );
  }
}

/** A cross in chain line through each circle, standing out by a fifth of its radius or two pixels. */
function centreMarks(part: ViewPart, scale: number): string {
  return part.circles
    .filter(([, , radius]) => radius * scale >= LEAST_MARKED)
    .map(([x, y, radius]) => {
      const reach = Math.min(radius * 1.2 + 2 / scale, radius + 12 / scale);
      return `M${x - reach} ${y}h${2 * reach}M${x} ${y - reach}v${2 * reach}`;
    })
    .join("");
}
