import type { Affine, Path } from "../geometry";
import type { IgnoredReason } from "./drawing";

/** A block placed once or as an array; `place` carries the block's own coordinates to those of its owner. */
export interface Insert {
  readonly place: (column: number, row: number, base: { readonly x: number; readonly y: number }) => Affine;
  readonly columns: number;
  readonly rows: number;
}

/** What one entity came to, in the coordinates of the section or block that holds it. */
export type EntityContent =
  | { readonly kind: "path"; readonly path: Path }
  | { readonly kind: "insert"; readonly insert: Insert }
  | { readonly kind: "refused"; readonly why: IgnoredReason };

export const refused = (why: IgnoredReason): EntityContent => ({ kind: "refused", why });

/** The numbers of one entity in the file's order, by group code. */
export class GroupNumbers {
  readonly #codes: number[] = [];
  readonly #values: number[] = [];

  push(code: number, value: number): void {
    this.#codes.push(code);
    this.#values.push(value);
  }

  /** The first value of a code. */
  first(code: number, otherwise: number): number {
    const index = this.#codes.indexOf(code);
    return index < 0 ? otherwise : this.#values[index];
  }

  /** Every value of a code. */
  all(code: number): number[] {
    const found: number[] = [];
    for (let i = 0; i < this.#codes.length; i++) if (this.#codes[i] === code) found.push(this.#values[i]);
    return found;
  }
}
