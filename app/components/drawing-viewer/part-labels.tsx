import { memo, useMemo } from "react";
import { type Size, toScreen, type View } from "./view";
import type { ViewPart } from "./view-geometry";

interface PartLabelsProps {
  readonly parts: readonly ViewPart[];
  readonly view: View;
  readonly size: Size;
  readonly chosen: string | null;
  readonly lit: string | null;
}

interface Placed {
  readonly key: string;
  readonly part: string;
  readonly text: string;
  readonly x: number;
  readonly y: number;
  readonly width: number;
}

/** Advance of one mono character and height of a line at 12 px, in pixels. */
const CHARACTER = 7.3;
const LINE = 14;
const INSET = { x: 7, y: 4 };

/** Letters in the parts' corners and depths in their pockets. A label that has no room, or would stand on another, is left out. */
export const PartLabels = memo(function PartLabels({ parts, view, size, chosen, lit }: PartLabelsProps) {
  const labels = useMemo(() => placedLabels(parts, view, size, chosen), [parts, view, size, chosen]);
  const words = useMemo(() => placedWords(parts, view, size), [parts, view, size]);
  return (
    <svg aria-hidden="true" className="pointer-events-none font-mono">
      {words.map((word) => (
        <text
          key={word.key}
          x={word.x}
          y={word.y}
          textAnchor="middle"
          strokeWidth="4"
          strokeLinejoin="round"
          className="fill-ink stroke-sheet text-[11px] [paint-order:stroke]"
        >
          {word.text}
        </text>
      ))}
      {labels.map((label) => (
        <text
          key={label.key}
          x={label.x}
          y={label.y + 11}
          className={`text-caption font-semibold ${label.part === chosen || label.part === lit ? "fill-blue" : "fill-ink"}`}
        >
          {label.text}
        </text>
      ))}
    </svg>
  );
});

function placedLabels(parts: readonly ViewPart[], view: View, size: Size, chosen: string | null): Placed[] {
  const placed: Placed[] = [];
  const first = [...parts].sort((one, other) => Number(other.id === chosen) - Number(one.id === chosen));
  for (const part of first) {
    for (const [index, copy] of part.copies.entries()) {
      const [left, top] = toScreen(view, copy.labelAt);
      const label: Placed = {
        key: `${part.id} ${index}`,
        part: part.id,
        text: copy.label,
        x: left + INSET.x,
        y: top + INSET.y,
        width: copy.label.length * CHARACTER,
      };
      const wide = (copy.box.maxX - copy.box.minX) * view.scale;
      const high = (copy.box.maxY - copy.box.minY) * view.scale;
      const fits = wide >= label.width + 2 * INSET.x && high >= LINE + 2 * INSET.y;
      if (fits && inWindow(label, size) && !placed.some((other) => overlap(label, other))) placed.push(label);
    }
  }
  return placed;
}

function placedWords(parts: readonly ViewPart[], view: View, size: Size): Placed[] {
  return parts.flatMap((part) =>
    part.words.flatMap((word): Placed[] => {
      const [x, y] = toScreen(view, word.at);
      const width = word.text.length * CHARACTER;
      const placed = {
        key: `${part.id} ${word.at.join(" ")}`,
        part: part.id,
        text: word.text,
        x,
        y: y + 4,
        width,
      };
      return word.room * view.scale >= width + 4 && inWindow(placed, size) ? [placed] : [];
    }),
  );
}

const inWindow = (label: Placed, size: Size): boolean =>
  label.x > -label.width && label.x < size.width && label.y > -LINE && label.y < size.height;

const overlap = (one: Placed, other: Placed): boolean =>
  one.x < other.x + other.width + 4 &&
  other.x < one.x + one.width + 4 &&
  one.y < other.y + LINE &&
  other.y < one.y + LINE;
