import { memo, useMemo } from "react";
import { type Size, toScreen, type View } from "./view";
import type { Spot, ViewPart, ViewPin } from "./view-geometry";

interface PartLabelsProps {
  readonly parts: readonly ViewPart[];
  readonly pins: readonly ViewPin[];
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
/** How far down a label may go to stand clear of a pin, in pixels. */
const SHIFTS = [0, 10, 20, 30];
const PIN = 21;

/** Letters in the parts' corners and depths in their pockets. A label that has no room, or would stand on another, is left out. */
export const PartLabels = memo(function PartLabels({
  parts,
  pins,
  view,
  size,
  chosen,
  lit,
}: PartLabelsProps) {
  const labels = useMemo(
    () => placedLabels(parts, pins, view, size, chosen),
    [parts, pins, view, size, chosen],
  );
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
          strokeWidth="3"
          strokeLinejoin="round"
          className={`text-caption font-semibold [paint-order:stroke] ${label.part === chosen ? "stroke-blue-wash" : "stroke-sheet"} ${label.part === chosen || label.part === lit ? "fill-blue" : "fill-ink"}`}
        >
          {label.text}
        </text>
      ))}
    </svg>
  );
});

function placedLabels(
  parts: readonly ViewPart[],
  pins: readonly ViewPin[],
  view: View,
  size: Size,
  chosen: string | null,
): Placed[] {
  const placed: Placed[] = [];
  const taken = pins.map((pin) => toScreen(view, pin.at));
  const first = [...parts].sort((one, other) => Number(other.id === chosen) - Number(one.id === chosen));
  for (const part of first) {
    for (const [index, copy] of part.copies.entries()) {
      const [left, top] = toScreen(view, copy.labelAt);
      const width = copy.label.length * CHARACTER;
      const wide = (copy.box.maxX - copy.box.minX) * view.scale;
      const foot = view.y - copy.box.minY * view.scale;
      if (wide < width + 2 * INSET.x) continue;
      const tried = { key: `${part.id} ${index}`, part: part.id, text: copy.label, x: left + INSET.x, width };
      const clear = SHIFTS.map((shift): Placed => ({ ...tried, y: top + INSET.y + shift })).find(
        (label) => label.y + LINE <= foot && !taken.some((pin) => underPin(label, pin)),
      );
      if (clear && inWindow(clear, size) && !placed.some((other) => overlap(clear, other)))
        placed.push(clear);
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

/** A pin stands up and to the right of its point. */
const underPin = (label: Placed, [x, y]: Spot): boolean =>
  label.x < x + PIN && x < label.x + label.width && label.y < y && y - PIN < label.y + LINE;

const overlap = (one: Placed, other: Placed): boolean =>
  one.x < other.x + other.width + 4 &&
  other.x < one.x + one.width + 4 &&
  one.y < other.y + LINE &&
  other.y < one.y + LINE;
