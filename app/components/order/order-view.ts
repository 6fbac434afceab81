import type { ViewGeometry } from "~/components/drawing-viewer/view-geometry";
import type { Severity } from "~/domain/fit";
import type { LayerChoice } from "~/domain/orders";
import type { LengthUnit } from "~/domain/units";
import type { SilhouetteShape } from "../silhouette";

/** What the pages of an order show of it: plain JSON, made by their loaders. Lengths in millimetres. */

/** A drawing as it lies on the sheet. */
export interface ShownDrawing {
  readonly sha256: string;
  readonly fileName: string;
  /** Counted from 1, as in the labels of its parts where there are several drawings. */
  readonly number: number;
  /** Null where it is too large to come with the page: it is then loaded by its key. */
  readonly geometry: ViewGeometry | null;
}

/** A part of any drawing of the order. */
export interface ShownPart {
  /** Unique in the order, `A` or `2A`: what people say. */
  readonly label: string;
  readonly fileSha: string;
  /** Its id within its drawing. */
  readonly letter: string;
  readonly name: string;
  readonly width: number;
  readonly height: number;
  readonly cutLength: number;
  readonly quantity: number;
  readonly mirrorOf: string | null;
  readonly grain: "along-x" | "along-y" | "free";
}

export interface ShownFinding {
  /** As on its pin. */
  readonly number: number;
  /** Of the stored finding, null while the order is a draft. */
  readonly id: string | null;
  readonly severity: Severity;
  readonly words: string;
  readonly fileSha: string | null;
  readonly label: string | null;
  readonly at: readonly [x: number, y: number] | null;
  readonly answer: { readonly kind: "accept" | "mend" | "message"; readonly note: string | null } | null;
}

/** Whether it keeps the order from going on: a stop always, a question until it is answered. */
export const mustBeSettled = ({ severity, answer }: ShownFinding): boolean =>
  severity === "stop" || (severity === "ask" && answer?.kind !== "accept");

/** A layer with what is done to what is drawn on it. */
export interface ShownLayer {
  readonly name: string;
  readonly count: number;
  readonly hidden: boolean;
  /** Null where the shapes decide. */
  readonly rule: LayerChoice | null;
  /** The rule is what its name suggests and nobody has said otherwise. */
  readonly guessed: boolean;
}

/** The longest part of a drawing whose unit nobody has confirmed. */
export interface UnitQuestion {
  readonly shas: readonly string[];
  readonly fileNames: readonly string[];
  readonly declared: LengthUnit | null;
  /** In the drawing's own unit, whatever that is. */
  readonly longest: number;
  readonly shape: SilhouetteShape;
  /** What the shape's millimetres were computed with. */
  readonly assumed: LengthUnit;
}

export interface DraftFile {
  readonly drawingId: string;
  readonly sha256: string;
  readonly fileName: string;
  readonly number: number;
  /** Bytes. */
  readonly size: number;
  readonly state: "queued" | "failed" | "read";
  /** Why it cannot be read. */
  readonly words: string | null;
  readonly unit: LengthUnit | null;
  readonly materialId: string | null;
  readonly sets: number;
  /** Kinds of part found in it. */
  readonly kinds: number;
  readonly layers: readonly ShownLayer[];
  /** Set aside, not read, left open: everything of the drawing that is not cut, in words. */
  readonly leftOut: readonly string[];
}

/** A stock that can be chosen, with what lies on the rack. */
export interface StockChoice {
  readonly id: string;
  readonly name: string;
  readonly nominal: number;
  /** Of the lot with most free sheets; null when none is there. */
  readonly measured: {
    readonly lot: string;
    readonly min: number;
    readonly mean: number;
    readonly max: number;
    readonly free: number;
  } | null;
}
