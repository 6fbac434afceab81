import type { KeyboardEvent, MouseEvent } from "react";
import { PinMark } from "../pin";
import { toScreen, type View } from "./view";
import type { ViewPin } from "./view-geometry";

interface PlacedPinProps {
  readonly pin: ViewPin;
  readonly view: View;
  /** Told of a press; without it the pin only stands there. */
  readonly onPin: ((number: number) => void) | undefined;
}

/** A finding's pin with its point at its place on the drawing, the same size at every scale. */
export function PlacedPin({ pin, view, onPin }: PlacedPinProps) {
  const [x, y] = toScreen(view, pin.at);
  const label = `Finding ${pin.number}: ${pin.label}`;
  const press = (event: MouseEvent | KeyboardEvent) => {
    event.stopPropagation();
    event.preventDefault();
    onPin?.(pin.number);
  };
  const acting = onPin && {
    role: "button",
    tabIndex: 0,
    onClick: press,
    onKeyDown: (event: KeyboardEvent) => {
      if (event.key === "Enter" || event.key === " ") press(event);
    },
  };
  return (
    <svg
      x={x}
      y={y}
      role="img"
      aria-label={label}
      {...acting}
      className={`overflow-visible ${onPin ? "cursor-pointer" : "pointer-events-none"}`}
    >
      <PinMark number={pin.number} filled={pin.filled} />
    </svg>
  );
}
