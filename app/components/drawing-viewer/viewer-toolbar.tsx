import type { ReactNode } from "react";
import type { ShownUnit } from "~/domain/units";
import { Button } from "../button";

export interface ViewerMode {
  readonly id: string;
  readonly label: string;
}

interface ViewerToolbarProps {
  readonly modes: readonly ViewerMode[];
  readonly mode: string;
  readonly onMode: (mode: string) => void;
  readonly summary: ReactNode;
  readonly measuring: boolean;
  readonly onMeasuring: (on: boolean) => void;
  readonly unit: ShownUnit;
  readonly onUnit: (unit: ShownUnit) => void;
  readonly onFit: () => void;
  /** Null where the drawing has nothing set aside. */
  readonly setAside: {
    readonly shown: boolean;

    readonly onShow: (shown: boolean) => void;
  } | null;
}

/** The words above the drawing: its modes, the numbers of the whole, and what can be done with the view. */
export function ViewerToolbar(props: ViewerToolbarProps) {
  const { modes, mode, onMode, summary, measuring, onMeasuring, unit, onUnit, onFit, setAside } = props;
  return (
    <div className="flex flex-wrap items-center justify-between gap-x-4 gap-y-2 border-b border-line p-2">
      <fieldset className={`flex-wrap gap-1.5 print:hidden ${modes.length > 1 ? "flex" : "hidden sm:flex"}`}>
        <legend className="sr-only">What the drawing shows</legend>
        {modes.map(({ id, label }) => (
          <Button
            key={id}
            type="button"
            size="small"
            variant={id === mode ? "chosen" : "plain"}
            aria-pressed={id === mode}
            onClick={() => onMode(id)}
          >
            {label}
          </Button>
        ))}
      </fieldset>
      <p className="measure order-last w-full px-1 text-small text-soft sm:order-none sm:w-auto">{summary}</p>
      <fieldset className="flex flex-wrap gap-1.5 print:hidden">
        <legend className="sr-only">View</legend>
        {setAside && (
          <Button
            type="button"
            size="small"
            variant={setAside.shown ? "chosen" : "plain"}
            aria-pressed={setAside.shown}
            onClick={() => setAside.onShow(!setAside.shown)}
          >
            Set aside
          </Button>
        )}
        <Button
          type="button"
          size="small"
          variant={measuring ? "chosen" : "plain"}
          aria-pressed={measuring}
          onClick={() => onMeasuring(!measuring)}
        >
          Measure
        </Button>
        <Button type="button" size="small" onClick={() => onUnit(unit === "mm" ? "in" : "mm")}>
          <span className="sr-only">Lengths in {unit === "mm" ? "millimetres" : "inches"}, change: </span>
          <span className={unit === "mm" ? "" : "font-normal text-soft"}>mm</span>
          <span className="-mx-1 text-soft">|</span>
          <span className={unit === "in" ? "" : "font-normal text-soft"}>in</span>
        </Button>
        <Button type="button" size="small" onClick={onFit}>
          Fit view
        </Button>
      </fieldset>
    </div>
  );
}
