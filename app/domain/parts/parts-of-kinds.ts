import type { DrawnText } from "../drawing";
import { flattenPath, normaliseAngle, smallestRectangle } from "../geometry";
import type { Kind } from "./congruence";
import { pointInMaterial } from "./material-point";
import { moved } from "./motion";
import { isThrough, ROUND_SLACK } from "./operations";
import { circleDiameter } from "./outline";
import { OutlineIndex } from "./outline-index";
import type { Part } from "./part";
import type { Piece } from "./pieces";

/** Chords from which the smallest rectangle is taken, millimetres. */
const FINE_CHORD = 0.002;
/** A name longer than this is a note. */
const LONGEST_NAME = 60;

/** The kinds as parts: the largest first, named by the one text that stands in them, else by their letters. */
export function partsOfKinds(kinds: readonly Kind[], texts: readonly DrawnText[]): Part[] {
  // To a thousandth of a square millimetre, and a twin by its original's, so that rounding decides no order.
  const areaOf = (k: number) => Math.round(kinds[kinds[k].mirrorOf ?? k].first.outer.area * 1000);
  const order = Array.from(kinds.keys()).sort((i, j) => areaOf(j) - areaOf(i) || i - j);
  const ids = new Map(order.map((kind, place) => [kind, partLetters(place)]));
  const names = textsByPiece(kinds, texts);
  return order.map((k) => {
    const id = ids.get(k) ?? "";
    const { mirrorOf } = kinds[k];
    return partOf(
      kinds[k],
      id,
      nameOf(kinds[k], names) ?? id,
      mirrorOf === null ? null : (ids.get(mirrorOf) ?? null),
    );
  });
}

/** A, B, ... Z, AA, AB ...: the letters of the part at a place of the list, from 0. */
export function partLetters(place: number): string {
  let letters = "";
  for (let rest = place + 1; rest > 0; rest = Math.floor((rest - 1) / 26)) {
    letters = String.fromCharCode(65 + ((rest - 1) % 26)) + letters;
  }
  return letters;
}

function partOf(kind: Kind, id: string, name: string, mirrorOf: string | null): Part {
  const { outer, features } = kind.first;
  const inner = features.filter(({ kind, path }) => kind !== "engrave" && path.closed);
  const openings = features.filter((feature) => isThrough(feature) && feature.path.closed);
  const inside = pointInMaterial(outer, openings);
  return {
    id,
    name,
    quantity: kind.copies.length,
    mirrorOf,
    layer: outer.layer,
    outer: outer.path,
    features,
    outerLength: outer.length,
    innerLength: inner.reduce((sum, { length }) => sum + length, 0),
    area: outer.area - openings.reduce((sum, { area }) => sum + area, 0),
    grossArea: outer.area,
    box: outer.box,
    smallestRect: smallestRectOf(kind.first),
    holes: inner.length,
    copies: kind.copies.map(({ motion }) => ({
      at: moved(inside, motion),
      turnDegrees: degreesOf(motion.turn),
      move: motion.move,
    })),
  };
}

function smallestRectOf({ outer }: Piece): { long: number; short: number } {
  const diameter = circleDiameter(outer.path, ROUND_SLACK);
  if (diameter !== null) return { long: diameter, short: diameter };
  const { long, short } = smallestRectangle(flattenPath(outer.path, FINE_CHORD));
  return { long, short };
}

/** [0, 360), a whole turn but for rounding being none. */
function degreesOf(turn: number): number {
  const degrees = (normaliseAngle(turn) * 180) / Math.PI;
  return degrees > 360 - 1e-9 ? 0 : degrees;
}

/** Different texts by the piece they stand in; a text belongs to the innermost. */
function textsByPiece(kinds: readonly Kind[], texts: readonly DrawnText[]): Map<Piece, Set<string>> {
  const pieces = kinds.flatMap(({ copies }) => copies.map(({ piece }) => piece));
  const index = new OutlineIndex(pieces.map(({ outer }) => outer));
  const found = new Map<Piece, Set<string>>();
  for (const { text, at } of texts) {
    const place = index.smallestRound(at);
    const words = text.replace(/\s+/g, " ").trim();
    if (place === null || words === "" || words.length > LONGEST_NAME) continue;
    found.set(pieces[place], (found.get(pieces[place]) ?? new Set()).add(words));
  }
  return found;
}

/** The one text that stands in the copies, or null where there is none or more than one. */
function nameOf({ copies }: Kind, texts: ReadonlyMap<Piece, ReadonlySet<string>>): string | null {
  const all = new Set(copies.flatMap(({ piece }) => [...(texts.get(piece) ?? [])]));
  return all.size === 1 ? [...all][0] : null;
}
