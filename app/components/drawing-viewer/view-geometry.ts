/** Millimetres of the drawing, y up. */
export type Spot = readonly [x: number, y: number];

export interface ViewBox {
  readonly minX: number;
  readonly minY: number;
  readonly maxX: number;
  readonly maxY: number;
}

export type OutlineKind = "outside" | "cut-through" | "pocket" | "drill" | "engrave";

/** All outlines of one kind and depth of a part, over all its copies, as one SVG path in drawing millimetres. */
export interface ViewOutline {
  readonly kind: OutlineKind;
  readonly d: string;
  /** "6.35 deep", "leave 6.35"; absent for what goes through. */
  readonly depthLabel?: string;
}

/** Words that stand in a pocket, and the width they may take. */
export interface ViewWords {
  readonly text: string;
  readonly at: Spot;
  readonly room: number;
}

export interface ViewCopy {
  /** "A ×2" on the first copy, "A" on the others. */
  readonly label: string;
  /** Upper left corner of a clear place for the label. */
  readonly labelAt: Spot;
  readonly box: ViewBox;
}

export interface ViewPart {
  readonly id: string;
  readonly name: string;
  readonly quantity: number;
  /** Of the first copy as drawn. */
  readonly size: { readonly width: number; readonly height: number };
  readonly outlines: readonly ViewOutline[];
  readonly words: readonly ViewWords[];
  /** Full circles among the outlines, for their centre marks. */
  readonly circles: readonly (readonly [x: number, y: number, radius: number])[];
  readonly copies: readonly ViewCopy[];
  readonly box: ViewBox;
}

export interface ViewSetAside {
  readonly what: string;
  readonly d: string;
}

/** A drawing as the viewer shows it: plain JSON, made once from a reading. */
export interface ViewGeometry {
  /** Largest first, so that a part lying in another's opening is drawn over it. */
  readonly parts: readonly ViewPart[];
  readonly open: { readonly d: string; readonly ends: readonly Spot[] };
  readonly setAside: readonly ViewSetAside[];
  /** Of parts and open chains; null for an empty drawing. */
  readonly extents: ViewBox | null;
  /** The set-asides included. */
  readonly fullExtents: ViewBox | null;
  /** Ends of curves and centres of arcs, which a measure holds on to; flat x, y pairs. */
  readonly snaps: readonly number[];
  readonly totals: { readonly parts: number; readonly kinds: number; readonly cutLength: number };
}

/** A place on the drawing that somebody pointed at. */
export interface ViewSpot {
  readonly at: Spot;
  readonly label: string;
}

/** A finding's place on the drawing. */
export interface ViewPin {
  readonly number: number;
  readonly at: Spot;
  /** Filled when it must be settled. */
  readonly filled: boolean;
  readonly label: string;
}
