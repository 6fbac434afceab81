import {
  type FocusEvent,
  type KeyboardEvent,
  type MouseEvent,
  type PointerEvent,
  useEffect,
  useId,
  useMemo,
  useRef,
  useState,
} from "react";
import { useShownUnitChoice } from "../shown-unit";
import { DimensionLines } from "./dimension-lines";
import { GroundGrid } from "./ground-grid";
import { type Held, heldPoint, MeasureLine, measuredWords } from "./measuring";
import { PartLabels } from "./part-labels";
import { PartShape } from "./part-shape";
import { PlacedPin } from "./placed-pin";
import { ScaleBar } from "./scale-bar";
import { SpotMark } from "./spot-mark";
import { useView } from "./use-view";
import { toScreen, viewAt, viewShowing } from "./view";
import type { Spot, ViewBox, ViewGeometry, ViewPin, ViewSpot } from "./view-geometry";
import { type ViewerMode, ViewerToolbar } from "./viewer-toolbar";

interface DrawingViewerProps {
  readonly geometry: ViewGeometry;
  /** Id of the part pointed at, here or in a list beside. */
  readonly hovered?: string | null;
  readonly onHover?: (part: string | null) => void;
  readonly selected?: string | null;
  /** Without it parts are shown but cannot be chosen; told the place of a press, in drawing millimetres. */
  readonly onSelect?: (part: string | null, at?: Spot) => void;
  readonly pins?: readonly ViewPin[];
  readonly onPin?: (number: number) => void;
  /** A place that somebody pointed at; another one is brought into view. */
  readonly spot?: ViewSpot | null;
  readonly modes?: readonly ViewerMode[];
  readonly mode?: string;
  readonly onMode?: (mode: string) => void;
  /** Of the drawing's window: `page` is the largest thing on its page, `small` stands in a list or a form. */
  readonly size?: "page" | "small";
}

const PARTS_ONLY: readonly ViewerMode[] = [{ id: "parts", label: "Parts" }];
const NO_PINS: readonly ViewPin[] = [];
const HEIGHT = {
  page: "h-[46dvh] min-h-72 md:h-[62dvh] lg:h-[70dvh] print:h-[120mm]",
  small: "h-72 print:h-[80mm]",
};

const partOf = (target: EventTarget): string | null =>
  target instanceof Element ? (target.closest<SVGElement>("[data-part]")?.dataset.part ?? null) : null;

/**
 * A drawing on its sheet: parts with what is cut into them, moved and enlarged by pointer, touch or keys. Which
 * part is pointed at and which is chosen belongs to the page, so that a list beside can share it.
 */
export function DrawingViewer({
  geometry,
  hovered = null,
  onHover,
  selected = null,
  onSelect,
  pins = NO_PINS,
  onPin,
  spot = null,
  modes = PARTS_ONLY,
  mode = modes[0]?.id ?? "",
  onMode,
  size: extent = "page",
}: DrawingViewerProps) {
  const svg = useRef<SVGSVGElement>(null);
  const ids = useId();
  const [unit, changeUnit] = useShownUnitChoice();
  const [asideShown, setAsideShown] = useState(false);
  const [measuring, setMeasuring] = useState(false);
  const [points, setPoints] = useState<readonly Held[]>([]);
  const [pointer, setPointer] = useState<Held | null>(null);
  const pane = useView(svg, asideShown ? geometry.fullExtents : geometry.extents);
  const { view, size } = pane;
  const chosen = geometry.parts.find((part) => part.id === selected);

  const others = useMemo(() => boxesBeside(geometry, selected), [geometry, selected]);

  const { change } = pane;
  const windowSize = useRef(size);
  windowSize.current = size;
  useEffect(() => {
    if (spot) change((now) => viewAt(now, spot.at, windowSize.current));
  }, [spot, change]);

  const changeMeasuring = (on: boolean) => {
    setMeasuring(on);
    setPoints([]);
    setPointer(null);
  };

  const onClick = (event: MouseEvent<SVGSVGElement>) => {
    if (pane.wasDragged()) return;
    if (measuring) {
      const held = heldPoint(geometry.snaps, pane.drawingPlace(event), view.scale);
      setPoints((set) => (set.length === 1 ? [...set, held] : [held]));
      return;
    }
    onSelect?.(partOf(event.target), pane.drawingPlace(event));
  };

  const onKeyDown = (event: KeyboardEvent<SVGSVGElement>) => {
    const part = partOf(event.target);
    if (event.key === "Escape") {
      if (measuring) changeMeasuring(false);
      else if (selected !== null) onSelect?.(null);
      svg.current?.focus();
    } else if (part !== null && (event.key === "Enter" || event.key === " ")) {
      onSelect?.(part);
    } else if (!pane.takeKey(event)) {
      return;
    }
    event.preventDefault();
  };

  const onFocus = (event: FocusEvent<SVGSVGElement>) => {
    const part = geometry.parts.find(({ id }) => id === partOf(event.target));
    if (!part || !event.target.matches(":focus-visible")) return;
    onHover?.(part.id);
    const box = part.copies[0].box;
    const showing = viewShowing(view, box, size);
    if (showing !== view) pane.change(() => showing);
  };

  const onPointerMove = (event: PointerEvent<SVGSVGElement>) => {
    pane.handlers.onPointerMove(event);
    if (measuring) setPointer(heldPoint(geometry.snaps, pane.drawingPlace(event), view.scale));
  };

  const { parts, kinds } = geometry.totals;
  const cut =
    unit === "mm"
      ? `${(geometry.totals.cutLength / 1000).toFixed(2)} m`
      : `${(geometry.totals.cutLength / 304.8).toFixed(2)} ft`;
  const summary = `${count(parts, "part")} · ${count(kinds, "kind")} · ${cut} cut`;
  const roughScale = 2 ** Math.round(Math.log2(view.scale));
  const across = { hatch: `${ids}hatch`, grid: `${ids}grid`, keys: `${ids}keys` };
  const done = points.length === 2 ? measuredWords(points[0], points[1], unit) : "";

  return (
    <div className="min-w-0">
      <ViewerToolbar
        modes={modes}
        mode={mode}
        onMode={(next) => onMode?.(next)}
        summary={summary}
        measuring={measuring}
        onMeasuring={changeMeasuring}
        unit={unit}
        onUnit={changeUnit}
        onFit={pane.fit}
        setAside={geometry.setAside.length > 0 ? { shown: asideShown, onShow: setAsideShown } : null}
      />
      <p id={across.keys} className="sr-only">
        Arrow keys move the drawing, plus and minus change its size, 0 fits it. Tab goes through the parts,
        Enter chooses one, Escape lets go.
      </p>
      <svg
        ref={svg}
        width="100%"
        viewBox={`0 0 ${size.width} ${size.height}`}
        role="application"
        // biome-ignore lint/a11y/noNoninteractiveTabindex: it takes keys of its own, so it must take the focus
        tabIndex={0}
        aria-label={`Drawing, ${summary}`}
        aria-describedby={across.keys}
        {...pane.handlers}
        onPointerMove={onPointerMove}
        onPointerOver={(event) => onHover?.(partOf(event.target))}
        onPointerLeave={() => {
          onHover?.(null);
          setPointer(null);
        }}
        onClick={onClick}
        onKeyDown={onKeyDown}
        onFocus={onFocus}
        onBlur={() => onHover?.(null)}
        className={`block select-none overflow-hidden focus-visible:-outline-offset-2 ${HEIGHT[extent]} ${pane.fitted ? "touch-pan-y" : "touch-none"} ${measuring ? "cursor-crosshair" : "cursor-grab active:cursor-grabbing"}`}
      >
        <GroundGrid id={across.grid} view={view} />
        <defs>
          <pattern
            id={across.hatch}
            width="6"
            height="6"
            patternUnits="userSpaceOnUse"
            patternTransform={`scale(${1 / view.scale} ${-1 / view.scale}) rotate(45)`}
          >
            <line x1="3" x2="3" y1="0" y2="6" strokeWidth="0.9" className="stroke-soft" />
          </pattern>
        </defs>
        <g transform={`matrix(${view.scale} 0 0 ${-view.scale} ${view.x} ${view.y})`}>
          {asideShown &&
            geometry.setAside.map((aside) => (
              <path
                key={aside.what}
                d={aside.d}
                fill="none"
                vectorEffect="non-scaling-stroke"
                strokeWidth="0.9"
                className="pointer-events-none stroke-edge"
              >
                <title>{aside.what}</title>
              </path>
            ))}
          {geometry.parts.map((part) => (
            <PartShape
              key={part.id}
              part={part}
              state={part.id === selected ? "chosen" : part.id === hovered ? "lit" : "plain"}
              hatch={across.hatch}
              roughScale={roughScale}
              choosable={onSelect !== undefined && !measuring}
            />
          ))}
          <path
            d={geometry.open.d}
            fill="none"
            vectorEffect="non-scaling-stroke"
            strokeWidth="1.7"
            className="pointer-events-none stroke-amber"
          />
        </g>
        <OpenEnds ends={geometry.open.ends.map((end) => toScreen(view, end))} />
        <PartLabels
          parts={geometry.parts}
          pins={pins}
          view={view}
          size={size}
          chosen={selected}
          lit={hovered}
        />
        {chosen && !measuring && (
          <DimensionLines box={chosen.copies[0].box} others={others} view={view} size={size} unit={unit} />
        )}
        {pins.map((pin) => (
          <PlacedPin key={pin.number} pin={pin} view={view} onPin={onPin} />
        ))}
        {spot && <SpotMark spot={spot} view={view} />}
        {measuring && <MeasureLine points={points} hover={pointer} view={view} unit={unit} />}
        <ScaleBar view={view} size={size} unit={unit} />
      </svg>
      <p role="status" className="sr-only">
        {done}
      </p>
    </div>
  );
}

/** Boxes of every copy but the first of the chosen part, which is the one that is measured. */
function boxesBeside(geometry: ViewGeometry, selected: string | null): ViewBox[] {
  return geometry.parts.flatMap((part) =>
    part.copies.filter((_, index) => part.id !== selected || index > 0).map((copy) => copy.box),
  );
}

const count = (number: number, noun: string): string => `${number} ${noun}${number === 1 ? "" : "s"}`;

/** The loose ends of open chains, ringed so that they are found in black print too. */
function OpenEnds({ ends }: { readonly ends: readonly (readonly [number, number])[] }) {
  return (
    <path
      d={ends.map(([x, y]) => `M${x - 5} ${y}a5 5 0 1 0 10 0a5 5 0 1 0 -10 0`).join("")}
      fill="none"
      strokeWidth="1.5"
      className="pointer-events-none stroke-amber"
    />
  );
}
