import type { Drawing } from "../drawing";
import { INCH_IN_MM } from "../units";
import type { Depth, LayerRule, OperationKind } from "./part";

/** What a layer's name says of what is drawn on it. `what` is set for layers that are not cut. */
export interface LayerReading {
  readonly kind: OperationKind;
  readonly depth: Depth;
  readonly what: "text" | "note" | null;
}

/** Layer names of DXF R12 are cut at this many characters, so that a last word of such a name may be a beginning only. */
const R12_NAME_LENGTH = 31;
/** A cut-off word shorter than this says nothing. */
const SHORTEST_BEGINNING = 3;

/**
 * Words of layer names by what they say, in order of precedence (common practice, no source). Spaces,
 * hyphens and underscores divide words, so that a name of two words is tried joined as well: DO NOT CUT is DONOTCUT.
 */
const WORDS: readonly (readonly [LayerSense, readonly string[]])[] = [
  ["note", ["NOCUT", "DONOTCUT", "DONTCUT", "NOTCUT", "NOPRINT", "NOTE", "NOTES", "GRAIN", "GRAINDIRECTION"]],
  [
    "engrave",
    [
      "ENGRAVE",
      "ENGRAVING",
      "ENGRAVED",
      "ETCH",
      "ETCHING",
      "SCRIBE",
      "SCORE",
      "VCARVE",
      "VGROOVE",
      "MARKING",
    ],
  ],
  ["text", ["TEXT", "TEXTS", "MTEXT", "ANNOTATION", "ANNOTATIONS", "ANNO", "LABEL", "LABELS"]],
  [
    "note",
    [
      "DIM",
      "DIMS",
      "DIMENSION",
      "DIMENSIONS",
      "DEFPOINTS",
      "CONSTRUCTION",
      "CENTERLINE",
      "CENTERLINES",
      "CENTRELINE",
      "CENTRELINES",
    ],
  ],
  ["note", ["CENTERMARK", "CENTERMARKS", "HATCHING", "TITLEBLOCK", "REFERENCE", "IGNORE"]],
  ["drill", ["DRILL", "DRILLS", "DRILLING", "BORE", "BORES", "BORING", "CUP", "HINGECUP", "PILOT", "PILOTS"]],
  [
    "pocket",
    [
      "POCKET",
      "POCKETS",
      "POCKETING",
      "RECESS",
      "RECESSES",
      "DADO",
      "DADOS",
      "DADOES",
      "RABBET",
      "RABBETS",
      "REBATE",
      "REBATES",
      "GROOVE",
      "GROOVES",
    ],
  ],
  ["through", ["THRU", "THROUGH"]],
  ["cut-through", ["INSIDE", "INNER", "INTERIOR", "CUTOUT", "CUTOUTS", "OPENING", "OPENINGS"]],
  [
    "outside",
    ["OUTSIDE", "OUTER", "OUTLINE", "OUTLINES", "PROFILE", "PROFILES", "PERIMETER", "EXTERIOR", "CONTOUR"],
  ],
];
type LayerSense = "note" | "text" | "engrave" | "drill" | "pocket" | "through" | "cut-through" | "outside";
/** Words that mean a depth wherever they stand beside a number, and those that do only on a layer known to be cut partly through. */
const LEAVE_ALWAYS = ["LEAVE", "LEAVES", "LEAVING"];
const LEAVE_IN_POCKETS = [...LEAVE_ALWAYS, "REMAIN", "REMAINS", "REMAINING", "FLOOR", "SKIN"];
const DEPTH_ALWAYS = ["DEEP", "DEPTH"];
const DEPTH_IN_POCKETS = [...DEPTH_ALWAYS, "D", "DP", "Z"];
const MILLIMETRES: Readonly<Record<string, number>> = {
  MM: 1,
  CM: 10,
  IN: INCH_IN_MM,
  INCH: INCH_IN_MM,
  INCHES: INCH_IN_MM,
};

type Token = { readonly word: string } | { readonly value: number; readonly unit: number | null };

/** Words and numbers of a name in order; a number takes its unit from the letters that follow it (`9mmDEEP`, `0.250IN`, `1/4"`). */
function tokensOf(name: string): Token[] {
  const found: Token[] = [];
  const pattern = /(\d+)\/(\d+)|(\d*[.,]\d+|\d+)|([A-Z]+)|(")/g;
  const upper = name.toUpperCase();
  for (const match of upper.matchAll(pattern)) {
    const [, numerator, denominator, decimal, word, quote] = match;
    const last = found.at(-1);
    const afterNumber =
      last && "value" in last && last.unit === null && /[\d\s]/.test(upper[match.index - 1]);
    if (word && afterNumber) {
      const unit = word.match(/^(MM|CM|INCHES|INCH|IN)(?=$|DEEP|DEPTH|LEAVE|SKIN|FLOOR)/)?.[1];
      if (unit) {
        found[found.length - 1] = { value: last.value, unit: MILLIMETRES[unit] };
        if (word.length > unit.length) found.push({ word: word.slice(unit.length) });
        continue;
      }
    }
    if (quote) {
      if (afterNumber) found[found.length - 1] = { value: last.value, unit: INCH_IN_MM };
    } else if (word) {
      found.push({ word });
    } else {
      const value = decimal ? Number(decimal.replace(",", ".")) : Number(numerator) / Number(denominator);
      found.push({ value, unit: null });
    }
  }
  return found;
}

/** Whether one of `words` stands among the tokens: alone, as two neighbours joined, or cut off at the end of a full-length R12 name. */
function says(tokens: readonly Token[], words: readonly string[], cutOff: boolean): boolean {
  const texts = tokens.map((token) => ("word" in token ? token.word : ""));
  for (let i = 0; i < texts.length; i++) {
    const single = texts[i];
    const pair = single && texts[i + 1] ? single + texts[i + 1] : "";
    const triple = pair && texts[i + 2] ? pair + texts[i + 2] : "";
    if (words.some((word) => word === single || word === pair || word === triple)) return true;
  }
  const last = texts.at(-1) ?? "";
  return cutOff && last.length >= SHORTEST_BEGINNING && words.some((word) => word.startsWith(last));
}

/** The value beside a word of `words`: before it (`9mmDEEP`, `6 LEAVE`) or after it (`D13`, `LEAVE_6MM`); after wins. */
function valueBeside(tokens: readonly Token[], words: readonly string[], bareUnit: number): number | null {
  for (let i = 0; i < tokens.length; i++) {
    const token = tokens[i];
    if (!("word" in token) || !words.includes(token.word)) continue;
    for (const neighbour of [tokens[i + 1], tokens[i - 1]]) {
      if (neighbour && "value" in neighbour && neighbour.value > 0)
        return neighbour.value * (neighbour.unit ?? bareUnit);
    }
  }
  return null;
}

/** The last value with a unit written out (`POCKET_10.0MM`); for a pocket one bare number does as well. */
function looseValue(tokens: readonly Token[], bareUnit: number, bareToo: boolean): number | null {
  const values = tokens.flatMap((token) => ("value" in token && token.value > 0 ? [token] : []));
  const written = values.filter((token) => token.unit !== null).at(-1);
  if (written) return written.value * (written.unit ?? bareUnit);
  return bareToo && values.length === 1 ? values[0].value * bareUnit : null;
}

/**
 * What the name of a layer says of its operation, or null where it says nothing: one layer per operation
 * with the depth in the name (OUTSIDE, POCKET_D0.250IN, POCKET_LEAVE_6MM, SLOT_THRU, DRILL_5_D13, NOCUT).
 * `bareUnit` is the millimetres in one of a number written without a unit.
 */
export function readLayerName(name: string, bareUnit: number): LayerReading | null {
  const tokens = tokensOf(name);
  const cutOff = name.length >= R12_NAME_LENGTH;
  const sense = WORDS.find(([, words]) => says(tokens, words, cutOff))?.[0] ?? null;
  if (sense === "note" || sense === "text") return { kind: "set-aside", depth: null, what: sense };

  const leave = valueBeside(tokens, sense ? LEAVE_IN_POCKETS : LEAVE_ALWAYS, bareUnit);
  const deep = valueBeside(tokens, sense ? DEPTH_IN_POCKETS : DEPTH_ALWAYS, bareUnit);
  const depth: Depth = leave !== null ? { leave } : deep !== null ? { depth: deep } : null;
  const through = says(tokens, ["THRU", "THROUGH"], cutOff);
  switch (sense) {
    case "engrave":
    case "drill":
      return { kind: sense, depth: through ? null : depth, what: null };
    case "pocket": {
      if (through) return { kind: "cut-through", depth: null, what: null };
      const loose = looseValue(tokens, bareUnit, true);
      return { kind: "pocket", depth: depth ?? (loose === null ? null : { depth: loose }), what: null };
    }
    case "through":
      return { kind: "cut-through", depth: null, what: null };
    case "cut-through":
      return {
        kind: depth && !through ? "pocket" : "cut-through",
        depth: through ? null : depth,
        what: null,
      };
    case "outside":
      return { kind: "outside", depth: null, what: null };
    default:
      return depth ? { kind: "pocket", depth, what: null } : null;
  }
}

/** Millimetres in one of a number without a unit: inches where the file says that it is drawn in inches or feet. */
export const bareUnitOf = (drawing: Drawing): number =>
  drawing.declared === "in" || drawing.declared === "ft" ? INCH_IN_MM : 1;

/**
 * The rules that the names of a drawing's layers suggest, for the builder to correct once. Layers whose name
 * says nothing are left out: geometry decides there.
 */
export function guessLayerRules(drawing: Drawing): LayerRule[] {
  return drawing.layers.flatMap(({ name }) => {
    const reading = readLayerName(name, bareUnitOf(drawing));
    return reading ? [{ layer: name, kind: reading.kind, depth: reading.depth }] : [];
  });
}
