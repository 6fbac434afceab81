import {
  type Arc,
  type Curve,
  distance,
  type EllipseArc,
  ellipseFromDiameters,
  ellipseMinor,
  endOf,
  magnitude,
  normaliseAngle,
  type Path,
  type Point,
  type Spline,
  startOf,
  sweepIsFull,
} from "../geometry";
import type { DxfLines } from "./dxf-lines";

/** R12 knows lines, arcs, circles and heavy polylines; R2000 everything here. */
export type DxfVersion = "R12" | "R2000";

const DEGREES = 180 / Math.PI;

/** Writes entities on one layer; each R2000 entity gets a handle and the marks of its classes. */
export class EntityWriter {
  readonly #out: DxfLines;
  readonly #version: DxfVersion;
  readonly #owner: string;

  /** `owner` is the handle of the block record that holds the entities (R2000). */
  constructor(out: DxfLines, version: DxfVersion, owner: string) {
    this.#out = out;
    this.#version = version;
    this.#owner = owner;
  }

  /** Lines and arcs that follow each other become one polyline; anything else an entity a curve. */
  path(path: Path, layer: string): void {
    const vertices = path.curves.length > 1 ? polylineVertices(path) : null;
    if (vertices) this.#polyline(vertices, path.closed, layer);
    else for (const curve of path.curves) this.#curve(curve, layer);
  }

  #open(type: string, layer: string, marker: string): void {
    this.#out.text(0, type);
    this.#identify(layer, marker);
  }

  #identify(layer: string, marker: string): void {
    const isR2000 = this.#version === "R2000";
    if (isR2000) {
      this.#out.text(5, this.#out.newHandle());
      this.#out.text(330, this.#owner);
      this.#out.text(100, "AcDbEntity");
    }
    this.#out.text(8, layer);
    if (isR2000) this.#out.text(100, marker);
  }

  #curve(curve: Curve, layer: string): void {
    switch (curve.kind) {
      case "line":
        this.#open("LINE", layer, "AcDbLine");
        this.#out.point(10, curve.from);
        this.#out.point(11, curve.to);
        return;
      case "arc":
        this.#arc(curve, layer);
        return;
      case "ellipse":
        this.#ellipse(curve, layer);
        return;
      case "spline":
        this.#spline(curve, layer);
    }
  }

  #arc(arc: Arc, layer: string): void {
    const isCircle = sweepIsFull(arc.sweep);
    this.#open(isCircle ? "CIRCLE" : "ARC", layer, "AcDbCircle");
    this.#out.point(10, arc.centre);
    this.#out.real(40, arc.radius);
    if (isCircle) return;
    if (this.#version === "R2000") this.#out.text(100, "AcDbArc");
    const from = normaliseAngle(arc.sweep > 0 ? arc.start : arc.start + arc.sweep);
    this.#out.real(50, from * DEGREES);
    this.#out.real(51, ((from + Math.abs(arc.sweep)) * DEGREES) % 360);
  }

  #ellipse(ellipse: EllipseArc, layer: string): void {
    const { centre, major, start, sweep } = ellipse;
    const drawn = ellipseFromDiameters(centre, major, ellipseMinor(ellipse), start, sweep);
    if (drawn.kind === "arc") {
      this.#arc(drawn, layer);
      return;
    }
    // A mirrored ellipse runs its parameter backwards; the format knows forward sweeps and ratios from 1e-6 only.
    const side = drawn.ratio < 0 ? -1 : 1;
    const low = Math.min(side * drawn.start, side * (drawn.start + drawn.sweep));
    const isFull = sweepIsFull(drawn.sweep);
    const from = isFull ? 0 : normaliseAngle(low);
    this.#open("ELLIPSE", layer, "AcDbEllipse");
    this.#out.point(10, drawn.centre);
    this.#out.point(11, drawn.major);
    this.#out.real(40, Math.max(1e-6, Math.abs(drawn.ratio)));
    this.#out.real(41, from);
    this.#out.real(42, from + (isFull ? 2 * Math.PI : Math.abs(drawn.sweep)));
  }

  #spline(spline: Spline, layer: string): void {
    const { degree, knots, control, weights } = spline;
    this.#open("SPLINE", layer, "AcDbSpline");
    this.#out.integer(70, weights ? 12 : 8);
    this.#out.integer(71, degree);
    this.#out.integer(72, knots.length);
    this.#out.integer(73, control.length);
    this.#out.integer(74, 0);
    for (const knot of knots) this.#out.real(40, knot);
    for (const weight of weights ?? []) this.#out.real(41, weight);
    for (const p of control) this.#out.point(10, p);
  }

  #polyline(vertices: readonly Vertex[], closed: boolean, layer: string): void {
    const flags = closed ? 1 : 0;
    if (this.#version === "R2000") {
      this.#open("LWPOLYLINE", layer, "AcDbPolyline");
      this.#out.integer(90, vertices.length);
      this.#out.integer(70, flags);
      for (const { at, bulge } of vertices) {
        this.#out.real(10, at.x);
        this.#out.real(20, at.y);
        if (bulge !== 0) this.#out.real(42, bulge);
      }
      return;
    }
    this.#open("POLYLINE", layer, "AcDb2dPolyline");
    this.#out.integer(66, 1);
    this.#out.point(10, { x: 0, y: 0 });
    this.#out.integer(70, flags);
    for (const { at, bulge } of vertices) {
      this.#open("VERTEX", layer, "AcDb2dVertex");
      this.#out.point(10, at);
      if (bulge !== 0) this.#out.real(42, bulge);
    }
    this.#out.text(0, "SEQEND");
    this.#out.text(8, layer);
  }
}

interface Vertex {
  readonly at: Point;
  readonly bulge: number;
}

/** Arcs over a half turn are cut in two, so that no bulge passes 1. */
function arcVertices(arc: Arc): Vertex[] {
  const pieces = Math.abs(arc.sweep) > Math.PI * (1 + 1e-12) ? 2 : 1;
  const sweep = arc.sweep / pieces;
  const bulge = Math.tan(sweep / 4);
  return Array.from({ length: pieces }, (_, i) => {
    const angle = arc.start + sweep * i;
    const at = {
      x: arc.centre.x + arc.radius * Math.cos(angle),
      y: arc.centre.y + arc.radius * Math.sin(angle),
    };
    return { at, bulge };
  });
}

/** The vertices of a path of lines and arcs; null where other curves are in it or its curves do not meet. */
function polylineVertices(path: Path): Vertex[] | null {
  const vertices: Vertex[] = [];
  const size = path.curves.reduce((most, curve) => Math.max(most, magnitude(startOf(curve))), 0);
  const meets = (p: Point, q: Point) => distance(p, q) <= 1e-9 * size;
  for (const [i, curve] of path.curves.entries()) {
    const next = path.curves[i + 1] ?? (path.closed ? path.curves[0] : null);
    if (next && !meets(endOf(curve), startOf(next))) return null;
    if (curve.kind === "line") vertices.push({ at: curve.from, bulge: 0 });
    else if (curve.kind === "arc") vertices.push(...arcVertices(curve));
    else return null;
  }
  if (!path.closed) vertices.push({ at: endOf(path.curves[path.curves.length - 1]), bulge: 0 });
  return vertices;
}
