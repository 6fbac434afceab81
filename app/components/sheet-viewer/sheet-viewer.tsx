import { useId } from "react";
import { formatMinutes } from "~/domain/units";
import { Measure, Size } from "../measure";
import { offcutOf, type SheetBox, type SheetPart, type SheetView } from "./sheet-view";

/** Room around the sheet for its outline, in millimetres. */
const AROUND = 12;
/** A label is written where its part is at least so large, in millimetres on the sheet; on a phone only where it is `far` as wide and high. */
const LABEL_ROOM = { wide: 190, short: 80, high: 45, far: 2.6 };
const PATTERNS = ["plain", "lines", "dots", "level", "cross"] as const;

interface SheetViewerProps {
  readonly sheet: SheetView;
  /** Names the picture: "Sheet 1 of 3". */
  readonly label: string;
  readonly selected?: string | null;
  readonly onSelect?: (id: string | null) => void;
}

/** A sheet of stock with the parts laid on it, their orders told apart by pattern; figures beneath. */
export function SheetViewer({ sheet, label, selected = null, onSelect }: SheetViewerProps) {
  const ids = useId();
  const offcut = offcutOf(sheet);
  const { length, width } = sheet;
  const view = `${-AROUND} ${-AROUND} ${length + 2 * AROUND} ${width + 2 * AROUND}`;
  return (
    <figure className="min-w-0">
      <div className="relative p-3 sm:p-5">
        {sheet.hasGrain && (
          <p className="measure mb-1 text-center text-caption text-soft" aria-hidden="true">
            grain ───→
          </p>
        )}
        <div className="relative">
          <svg
            role="img"
            aria-label={`${label}: ${sheet.parts.length} parts, ${Math.round(sheet.yield * 100)} % of the sheet`}
            viewBox={view}
            className="block w-full"
          >
            <SheetPatterns ids={ids} />
            <g transform={`matrix(1 0 0 -1 0 ${width})`} strokeLinejoin="round">
              <rect
                width={length}
                height={width}
                strokeWidth="2.2"
                vectorEffect="non-scaling-stroke"
                className="fill-sheet stroke-ink"
              />
              {offcut && <Offcut box={offcut} fill={`url(#${ids}offcut)`} />}
              <rect
                x={sheet.margin}
                y={sheet.margin}
                width={length - 2 * sheet.margin}
                height={width - 2 * sheet.margin}
                fill="none"
                strokeWidth="0.8"
                strokeDasharray="2 3"
                vectorEffect="non-scaling-stroke"
                className="stroke-edge"
              />
              {sheet.parts.map((part) => (
                <PlacedPart
                  key={part.id}
                  part={part}
                  pattern={`${ids}${PATTERNS[part.order % PATTERNS.length]}`}
                  chosen={part.id === selected}
                  onChoose={onSelect && (() => onSelect(part.id === selected ? null : part.id))}
                />
              ))}
            </g>
          </svg>
          <PartWords sheet={sheet} />
        </div>
      </div>
      <figcaption className="measure flex flex-wrap justify-between gap-x-6 gap-y-1 border-t border-line px-4 py-2.5 text-small text-soft">
        <span>yield {(sheet.yield * 100).toFixed(1)} %</span>
        <span>
          spacing <Measure length={sheet.spacing} digits={1} />
        </span>
        <span>
          margin <Measure length={sheet.margin} digits={0} />
        </span>
        {offcut && (
          <span>
            offcut <Size width={offcut.maxX - offcut.minX} height={width} />
          </span>
        )}
        <span>{formatMinutes(sheet.minutes)}</span>
      </figcaption>
    </figure>
  );
}

function Offcut({ box, fill }: { readonly box: SheetBox; readonly fill: string }) {
  return (
    <rect
      x={box.minX}
      y={box.minY}
      width={box.maxX - box.minX}
      height={box.maxY - box.minY}
      fill={fill}
      strokeWidth="0.9"
      strokeDasharray="6 4"
      vectorEffect="non-scaling-stroke"
      className="stroke-edge"
    />
  );
}

interface PlacedPartProps {
  readonly part: SheetPart;
  readonly pattern: string;
  readonly chosen: boolean;
  readonly onChoose: (() => void) | undefined;
}

function PlacedPart({ part, pattern, chosen, onChoose }: PlacedPartProps) {
  const { box, turnDegrees, x, y } = part;
  const d =
    part.d ??
    `M${box.minX} ${box.minY}L${box.maxX} ${box.minY}L${box.maxX} ${box.maxY}L${box.minX} ${box.maxY}Z`;
  const transform = part.d === null ? undefined : `translate(${x} ${y}) rotate(${turnDegrees})`;
  const common = { d, transform, fillRule: "evenodd", vectorEffect: "non-scaling-stroke" } as const;
  return (
    <g className={onChoose ? "cursor-pointer" : ""}>
      {/* biome-ignore lint/a11y/noStaticElementInteractions: a short cut; the list beside chooses by keyboard */}
      <path
        {...common}
        onClick={onChoose}
        strokeWidth={chosen ? 2.4 : 1.3}
        className={chosen ? "fill-blue-wash stroke-blue" : "fill-grain/55 stroke-ink"}
      />
      {!chosen && (
        <path {...common} fill={`url(#${pattern})`} stroke="none" className="pointer-events-none" />
      )}
    </g>
  );
}

/** Labels over the sheet, in a size of their own, so that they stay readable whatever the sheet's scale. */
function PartWords({ sheet }: { readonly sheet: SheetView }) {
  const across = sheet.length + 2 * AROUND;
  const down = sheet.width + 2 * AROUND;
  return (
    <svg aria-hidden="true" className="pointer-events-none absolute inset-0 size-full">
      {sheet.parts.map(({ id, label, box }) => {
        const wide = box.maxX - box.minX;
        if (box.maxY - box.minY < LABEL_ROOM.high || wide < LABEL_ROOM.short) return null;
        const isShort = wide < LABEL_ROOM.wide;
        const onPhone =
          wide >= LABEL_ROOM.wide * LABEL_ROOM.far && box.maxY - box.minY >= LABEL_ROOM.high * LABEL_ROOM.far;
        return (
          <text
            key={id}
            x={`${(((box.minX + box.maxX) / 2 + AROUND) / across) * 100}%`}
            y={`${((sheet.width - (box.minY + box.maxY) / 2 + AROUND) / down) * 100}%`}
            textAnchor="middle"
            dominantBaseline="central"
            paintOrder="stroke"
            strokeWidth="4"
            strokeLinejoin="round"
            className={`measure fill-ink stroke-sheet text-[0.625rem] font-semibold ${onPhone ? "" : "hidden sm:block"}`}
          >
            {isShort ? label.split(" ").at(-1) : label}
          </text>
        );
      })}
    </svg>
  );
}

/** Sizes in millimetres of the sheet: about eight pixels apart on a desk. */
function SheetPatterns({ ids }: { readonly ids: string }) {
  return (
    <defs>
      <pattern
        id={`${ids}lines`}
        width="26"
        height="26"
        patternUnits="userSpaceOnUse"
        patternTransform="rotate(45)"
      >
        <path d="M0 0V26" strokeWidth="3" className="stroke-edge" />
      </pattern>
      <pattern id={`${ids}dots`} width="26" height="26" patternUnits="userSpaceOnUse">
        <circle cx="13" cy="13" r="3.4" className="fill-edge" />
      </pattern>
      <pattern id={`${ids}level`} width="26" height="26" patternUnits="userSpaceOnUse">
        <path d="M0 13H26" strokeWidth="3" className="stroke-edge" />
      </pattern>
      <pattern
        id={`${ids}cross`}
        width="36"
        height="36"
        patternUnits="userSpaceOnUse"
        patternTransform="rotate(45)"
      >
        <path d="M0 0V36M0 0H36" strokeWidth="3" className="stroke-edge" />
      </pattern>
      <pattern
        id={`${ids}offcut`}
        width="30"
        height="30"
        patternUnits="userSpaceOnUse"
        patternTransform="rotate(-45)"
      >
        <path d="M0 0V30" strokeWidth="1.6" className="stroke-line" />
      </pattern>
      <pattern id={`${ids}plain`} width="10" height="10" patternUnits="userSpaceOnUse" />
    </defs>
  );
}

/** The pattern of one order, small, for the list that names the orders. */
export function OrderSwatch({ order }: { readonly order: number }) {
  const ids = useId();
  const pattern = `${ids}${PATTERNS[order % PATTERNS.length]}`;
  return (
    <svg aria-hidden="true" viewBox="0 0 96 72" width="24" height="18" className="shrink-0">
      <SheetPatterns ids={ids} />
      <rect
        x="2"
        y="2"
        width="92"
        height="68"
        strokeWidth="1.2"
        vectorEffect="non-scaling-stroke"
        className="fill-grain/55 stroke-ink"
      />
      <rect x="2" y="2" width="92" height="68" fill={`url(#${pattern})`} />
    </svg>
  );
}
