import {
  type KeyboardEvent,
  type PointerEvent,
  type RefObject,
  useCallback,
  useEffect,
  useRef,
  useState,
} from "react";
import { fittedView, movedView, type Size, toDrawing, type View, zoomedView } from "./view";
import type { Spot, ViewBox } from "./view-geometry";

/** The window's size until it has been measured, as the server draws it. */
const FIRST_SIZE: Size = { width: 960, height: 560 };
/** A press that moves less than this is a click, in pixels. */
const CLICK_SLACK = 4;
const STEP = 48;
const ZOOM_STEP = 1.25;
const PAN_KEYS: ReadonlyMap<string, Spot> = new Map([
  ["ArrowLeft", [1, 0]],
  ["ArrowRight", [-1, 0]],
  ["ArrowUp", [0, 1]],
  ["ArrowDown", [0, -1]],
]);
const ZOOM_KEYS: ReadonlyMap<string, number> = new Map([
  ["+", ZOOM_STEP],
  ["=", ZOOM_STEP],
  ["-", 1 / ZOOM_STEP],
]);
const FIT_KEYS: ReadonlySet<string> = new Set(["0", "f", "F"]);

interface Press {
  readonly x: number;
  readonly y: number;
}

/**
 * Pan, zoom and fit of one drawing: by drag, wheel, pinch and keys. Until it is moved the view is the fitted one,
 * and follows the window's size.
 */
export function useView(svg: RefObject<SVGSVGElement | null>, box: ViewBox | null) {
  const [size, setSize] = useState<Size>(FIRST_SIZE);
  const [moved, setMoved] = useState<View | null>(null);
  const view = moved ?? fittedView(box, size);
  const latest = useRef(view);
  latest.current = view;
  const presses = useRef(new Map<number, Press>());
  const dragged = useRef(false);

  useEffect(() => {
    const element = svg.current;
    if (!element) return;
    const observer = new ResizeObserver(([entry]) => {
      const { width, height } = entry.contentRect;
      if (width > 0 && height > 0) setSize({ width, height });
    });
    observer.observe(element);
    return () => observer.disconnect();
  }, [svg]);

  const change = useCallback((next: (view: View) => View) => {
    latest.current = next(latest.current);
    setMoved(latest.current);
  }, []);

  // React listens to the wheel passively; a drawing that zooms must keep the page from scrolling under it.
  useEffect(() => {
    const element = svg.current;
    if (!element) return;
    const onWheel = (event: WheelEvent) => {
      event.preventDefault();
      const { left, top } = element.getBoundingClientRect();
      const lines = event.deltaMode === WheelEvent.DOM_DELTA_LINE ? 16 : 1;
      const factor = Math.exp(-event.deltaY * lines * (event.ctrlKey ? 0.01 : 0.0016));
      change((now) => zoomedView(now, factor, event.clientX - left, event.clientY - top));
    };
    element.addEventListener("wheel", onWheel, { passive: false });
    return () => element.removeEventListener("wheel", onWheel);
  }, [svg, change]);

  const place = (event: { readonly clientX: number; readonly clientY: number }): Spot => {
    const frame = svg.current?.getBoundingClientRect();
    return [event.clientX - (frame?.left ?? 0), event.clientY - (frame?.top ?? 0)];
  };

  const handlers = {
    onPointerDown(event: PointerEvent<SVGSVGElement>) {
      if (event.button !== 0) return;
      if (presses.current.size === 0) dragged.current = false;
      const [x, y] = place(event);
      presses.current.set(event.pointerId, { x, y });
    },
    onPointerMove(event: PointerEvent<SVGSVGElement>) {
      const before = presses.current.get(event.pointerId);
      if (!before) return;
      const [x, y] = place(event);
      const other = [...presses.current].find(([id]) => id !== event.pointerId)?.[1];
      if (!dragged.current && Math.hypot(x - before.x, y - before.y) < CLICK_SLACK) return;
      if (!dragged.current) {
        dragged.current = true;
        event.currentTarget.setPointerCapture(event.pointerId);
      }
      presses.current.set(event.pointerId, { x, y });
      // One finger on a drawing that is all in view scrolls the page, as it does everywhere else on it.
      if (!other && moved === null && event.pointerType === "touch") return;
      if (!other) return change((now) => movedView(now, x - before.x, y - before.y));
      const spread = Math.hypot(x - other.x, y - other.y);
      const spreadBefore = Math.hypot(before.x - other.x, before.y - other.y);
      const shift = { x: (x - before.x) / 2, y: (y - before.y) / 2 };
      const factor = spreadBefore > 1 ? spread / spreadBefore : 1;
      change((now) =>
        zoomedView(movedView(now, shift.x, shift.y), factor, (x + other.x) / 2, (y + other.y) / 2),
      );
    },
    onPointerUp(event: PointerEvent<SVGSVGElement>) {
      presses.current.delete(event.pointerId);
    },
    onPointerCancel(event: PointerEvent<SVGSVGElement>) {
      presses.current.delete(event.pointerId);
    },
  };

  /** Moves the view for a key; says whether the key was one of its own. */
  function takeKey(event: KeyboardEvent): boolean {
    if (event.ctrlKey || event.metaKey || event.altKey) return false;
    const pan = PAN_KEYS.get(event.key);
    const zoom = ZOOM_KEYS.get(event.key);
    const step = event.shiftKey ? 4 * STEP : STEP;
    if (pan) change((now) => movedView(now, pan[0] * step, pan[1] * step));
    else if (zoom) change((now) => zoomedView(now, zoom, size.width / 2, size.height / 2));
    else if (FIT_KEYS.has(event.key)) setMoved(null);
    else return false;
    return true;
  }

  return {
    size,
    view,
    fitted: moved === null,
    fit: useCallback(() => setMoved(null), []),
    change,
    handlers,
    takeKey,
    /** Whether the press that just ended moved the drawing, so that its click means nothing. */
    wasDragged: () => dragged.current,
    drawingPlace: (event: { readonly clientX: number; readonly clientY: number }): Spot =>
      toDrawing(view, place(event)),
  };
}
