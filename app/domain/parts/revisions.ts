import { distance } from "../geometry";
import { congruentBy } from "./congruence";
import type { Part, PartsReport } from "./part";
import { partLetters } from "./parts-of-kinds";
import { type Shape, shapeOf } from "./shape";
import { type ShapeDifference, shapeDifference } from "./shape-difference";

/** A part of the earlier revision and what became of it, by their ids in their own reports. */
export interface PairedPart {
  readonly before: string;
  readonly after: string;
  readonly quantityBefore: number;
  readonly quantityAfter: number;
}

export interface ChangedPart extends PairedPart, ShapeDifference {}

export interface RevisionComparison {
  /** The same shape; the quantity may differ. */
  readonly unchanged: readonly PairedPart[];
  readonly changed: readonly ChangedPart[];
  readonly added: readonly string[];
  readonly removed: readonly string[];
}

type Parts = Pick<PartsReport, "parts">;

interface Candidate {
  readonly part: Part;
  readonly shape: Shape;
}

/** How much equal parts may differ, millimetres: as where copies are counted together. */
const EQUAL = 0.05;
/** Smaller over larger area, and smaller over larger perimeter, under which one part is not the other changed. */
const LEAST_ALIKE = 0.7;
/** The name that a part has where nothing is written in it: its letters. */
const LETTERS = /^[A-Z]+$/;

/**
 * What became of each part of a drawing. Equal shapes are paired first; of the rest a part is taken for a changed one
 * where the same name is written in both, or where they are most alike in area and perimeter. Each pairs once.
 */
export function compareRevisions(before: Parts, after: Parts): RevisionComparison {
  const old = before.parts.map(candidateOf);
  const fresh = after.parts.map(candidateOf);
  const unchanged = takePairs(old, fresh, sameness);
  const changed = takePairs(old, fresh, likeness);
  return {
    unchanged: unchanged.map(([one, other]) => pairOf(one.part, other.part)),
    changed: changed.map(([one, other]) => ({
      ...pairOf(one.part, other.part),
      ...shapeDifference(one, other),
    })),
    added: fresh.map(({ part }) => part.id),
    removed: old.map(({ part }) => part.id),
  };
}

/**
 * The later report with the letters and the names of the earlier one for parts that survived, changed or not; new
 * parts take letters that neither has used. A name written in the later drawing stands.
 */
export function keepLetters(before: Parts, after: PartsReport): PartsReport {
  const { unchanged, changed } = compareRevisions(before, after);
  const kept = new Map([...unchanged, ...changed].map((pair) => [pair.after, pair.before]));
  const used = new Set(before.parts.map(({ id }) => id));
  let next = 0;
  const unusedLetters = () => {
    while (used.has(partLetters(next))) next += 1;
    return partLetters(next++);
  };
  const ids = new Map(after.parts.map(({ id }) => [id, kept.get(id) ?? unusedLetters()]));
  const idOf = (id: string) => ids.get(id) ?? id;
  const nameBefore = new Map(before.parts.map(({ id, name }) => [id, name]));
  return {
    ...after,
    parts: after.parts.map((part) => {
      const id = idOf(part.id);
      const name = part.name === part.id ? (nameBefore.get(id) ?? id) : part.name;
      return { ...part, id, name, mirrorOf: part.mirrorOf === null ? null : idOf(part.mirrorOf) };
    }),
    nearEqual: after.nearEqual.map((pair) => ({ ...pair, one: idOf(pair.one), other: idOf(pair.other) })),
  };
}

const candidateOf = (part: Part): Candidate => ({
  part,
  shape: shapeOf({
    outer: { path: part.outer, area: part.grossArea, length: part.outerLength },
    features: part.features,
  }),
});

const pairOf = (before: Part, after: Part): PairedPart => ({
  before: before.id,
  after: after.id,
  quantityBefore: before.quantity,
  quantityAfter: after.quantity,
});

/** Takes pairs out of both lists, the least cost first; null costs are no pairs. */
function takePairs(
  old: Candidate[],
  fresh: Candidate[],
  costOf: (one: Candidate, other: Candidate) => number | null,
): [Candidate, Candidate][] {
  const possible = old.flatMap((one) =>
    fresh.flatMap((other) => {
      const cost = costOf(one, other);
      return cost === null ? [] : [{ one, other, cost }];
    }),
  );
  const pairs: [Candidate, Candidate][] = [];
  const taken = new Set<Candidate>();
  for (const { one, other } of possible.sort((p, q) => p.cost - q.cost)) {
    if (taken.has(one) || taken.has(other)) continue;
    taken.add(one).add(other);
    pairs.push([one, other]);
  }
  for (const list of [old, fresh]) list.splice(0, list.length, ...list.filter((each) => !taken.has(each)));
  return pairs;
}

/** Equal shapes: those nearest in place first, where a drawing holds several within the tolerance. */
function sameness({ part, shape }: Candidate, other: Candidate): number | null {
  if (Math.abs(shape.area - other.shape.area) > EQUAL * (shape.length + 1)) return null;
  if (shape.signature !== other.shape.signature || !congruentBy(shape, other.shape, EQUAL)) return null;
  return distance(part.copies[0].at, other.part.copies[0].at);
}

/** Shares by which area and perimeter differ; a name written in both counts before all others. */
function likeness(one: Candidate, other: Candidate): number | null {
  const writtenName = ({ part }: Candidate) => (LETTERS.test(part.name) ? null : part.name);
  if (writtenName(one) !== null && writtenName(one) === writtenName(other)) return -1;
  const shareOf = (p: number, q: number) => Math.min(p, q) / Math.max(p, q);
  const areas = shareOf(one.shape.area, other.shape.area);
  const lengths = shareOf(one.shape.length, other.shape.length);
  return areas < LEAST_ALIKE || lengths < LEAST_ALIKE ? null : 2 - areas - lengths;
}
