/**
 * A printed page as marks in millimetres from its upper left corner: the same marks are printed into a PDF and drawn
 * on the screen, so that a preview cannot differ from the print. Everything is set in one mono face, whose letters are
 * all 0.6 em wide: what fits on a line is known without measuring.
 */
export type Mark =
  | {
      readonly kind: "text";
      readonly x: number;
      /** The baseline. */
      readonly y: number;
      /** Millimetres of the em. */
      readonly size: number;
      readonly words: string;
      readonly bold?: boolean;
      readonly align?: "left" | "right" | "middle";
    }
  | {
      readonly kind: "line";
      readonly from: readonly [number, number];
      readonly to: readonly [number, number];
      readonly width: number;
      readonly dashed?: boolean;
    }
  | {
      readonly kind: "box";
      readonly x: number;
      readonly y: number;
      readonly width: number;
      readonly height: number;
      /** Filled black, or only its edge of this width. */
      readonly edge?: number;
    }
  | {
      /** Bars and gaps by turns, in modules. */
      readonly kind: "bars";
      readonly x: number;
      readonly y: number;
      readonly module: number;
      readonly height: number;
      readonly runs: readonly number[];
    }
  | {
      /** Rows of a matrix code, `1` black. */
      readonly kind: "squares";
      readonly x: number;
      readonly y: number;
      readonly module: number;
      readonly rows: readonly string[];
    };

export interface Page {
  /** Millimetres. */
  readonly width: number;
  readonly height: number;
  readonly marks: readonly Mark[];
}

/** Advance of every letter, in em. */
export const LETTER = 0.6;

/** Millimetres that words take in this size. */
export const widthOf = (words: string, size: number): number => words.length * LETTER * size;

/** Words cut to a width, the cut marked by two dots. */
export function fitted(words: string, size: number, width: number): string {
  const room = Math.floor(width / (LETTER * size) + 1e-9);
  return words.length <= room ? words : `${words.slice(0, Math.max(room - 2, 0)).trimEnd()}..`;
}

/** Words in lines of a width, broken at blanks; a word longer than a line is broken anywhere. */
export function wrapped(words: string, size: number, width: number): readonly string[] {
  const room = Math.max(1, Math.floor(width / (LETTER * size) + 1e-9));
  const lines: string[] = [];
  let open = "";
  for (const word of words.split(/\s+/).filter(Boolean)) {
    for (let rest = word; rest !== ""; ) {
      const joined = open === "" ? rest : `${open} ${rest}`;
      if (joined.length <= room) {
        open = joined;
        rest = "";
      } else if (open !== "") {
        lines.push(open);
        open = "";
      } else {
        lines.push(rest.slice(0, room));
        rest = rest.slice(room);
      }
    }
  }
  return open === "" ? lines : [...lines, open];
}

export const text = (
  x: number,
  y: number,
  size: number,
  words: string,
  more: { readonly bold?: boolean; readonly align?: "left" | "right" | "middle" } = {},
): Mark => ({ kind: "text", x, y, size, words: printable(words), ...more });

export const line = (
  from: readonly [number, number],
  to: readonly [number, number],
  width = 0.2,
  dashed = false,
): Mark => ({ kind: "line", from, to, width, dashed });

/** Letters that the embedded face has: Latin-1 and general punctuation. Others lose their marks, or become a question mark. */
function printable(words: string): string {
  return [...words.normalize("NFC")]
    .map((letter) => {
      if (/[\u0020-\u007e\u00a0-\u00ff\u2013\u2014\u2018-\u201e\u2022\u2026\u2212]/.test(letter))
        return letter;
      if (/\s/.test(letter)) return " ";
      const bare = letter.normalize("NFD").replace(/\p{M}/gu, "");
      return /^[\u0020-\u007e]$/.test(bare) ? bare : "?";
    })
    .join("");
}

/** The steel rule across a page: a line with a graduation every `step`, each fifth one long. */
export function ruleMarks(x: number, y: number, width: number, step = 2): readonly Mark[] {
  const ticks = Math.floor(width / step + 1e-9);
  return [
    line([x, y], [x + width, y], 0.35),
    ...Array.from({ length: ticks + 1 }, (_, i) =>
      line([x + i * step, y], [x + i * step, y - (i % 5 === 0 ? 2.2 : 1.1)], 0.15),
    ),
  ];
}

/** A page's marks moved by x and y, as a label is placed on a sheet of labels. */
export const moved = (marks: readonly Mark[], dx: number, dy: number): readonly Mark[] =>
  marks.map((mark) =>
    mark.kind === "line"
      ? {
          ...mark,
          from: [mark.from[0] + dx, mark.from[1] + dy],
          to: [mark.to[0] + dx, mark.to[1] + dy],
        }
      : { ...mark, x: mark.x + dx, y: mark.y + dy },
  );
