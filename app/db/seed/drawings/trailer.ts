import {
  caption,
  INSIDE,
  inRows,
  OUTSIDE,
  onLayer,
  rectangle,
  relievedSlot,
  round,
  type Shape,
  toDxf,
  together,
} from "./draft";
import { tenonedOutline } from "./tenons";

const panel = (width: number, height: number): Shape => onLayer(OUTSIDE, rectangle([0, 0], width, height));

/**
 * Book shelves of a travelling library: uprights with relieved mortises and shelf dadoes, shelves, a back rail, on a
 * drawn sheet border with captions: 8 parts of 3 kinds.
 */
export function libraryShelves(): string {
  const levels = [60, 380, 700];
  const upright = together(
    panel(260, 900),
    onLayer("DADO_D6MM", ...levels.map((level) => rectangle([15, level], 230, 18.2, 3.2))),
    onLayer(INSIDE, relievedSlot([30, 800], 18.2, 60.5, 3.25)),
    caption("UPRIGHT 2 OFF", [130, 860]),
  );
  const shelf = panel(760, 250);
  const rail = together(
    tenonedOutline({ width: 760, height: 120, length: 18, left: [[30, 90]], right: [[30, 90]] }),
    caption("BACK RAIL", [380, 60]),
  );
  const parts = [
    { part: upright, copies: 2 },
    { part: shelf, copies: 4 },
    { part: rail, copies: 2 },
  ];
  const border = onLayer("BORDER", rectangle([-60, -60], 2620, 2060));
  return toDxf(together(border, inRows(parts, 2400, 40)), { declared: "mm", joined: true });
}

/** Locker panels made lighter by pockets that leave 6 mm, with solid ribs and pads: 4 parts of 2 kinds. */
export function lightPanels(): string {
  const pocketed = (width: number, height: number, columns: number): Shape => {
    const border = 70;
    const rib = 50;
    const field = (width - 2 * border - (columns - 1) * rib) / columns;
    const pockets = Array.from({ length: columns }, (_, i) =>
      rectangle([border + i * (field + rib), border], field, height - 2 * border, 12),
    );
    return together(panel(width, height), onLayer("POCKET_LEAVE_6MM", ...pockets));
  };
  const parts = [
    { part: pocketed(1100, 480, 3), copies: 2 },
    { part: pocketed(640, 480, 2), copies: 2 },
  ];
  return toDxf(inRows(parts, 2400, 30), { declared: "mm", joined: true });
}

/** A side for a bunk, drawn in inches: rounded corners, a hand hole, four bolt holes: 1 part. */
export function bunkSide(): string {
  const part = together(
    onLayer(OUTSIDE, rectangle([0, 0], 74.75, 11.25, 1.5)),
    onLayer(INSIDE, rectangle([33.5, 8.25], 6, 1.25, 0.625)),
    onLayer("DRILL_0.3125IN", ...[2, 4.5, 70.25, 72.75].map((x) => round([x, 4], 0.3125))),
  );
  return toDxf(inRows([{ part, copies: 1 }], 96, 1), { declared: "in", joined: true });
}

/** A lamp shelf in a file that does not say what its coordinates are in (millimetres): 3 parts of 2 kinds. */
export function lampShelf(): string {
  const shelf = together(
    onLayer(OUTSIDE, rectangle([0, 0], 420, 160, 20)),
    onLayer(INSIDE, round([350, 80], 60)),
  );
  const bracket = tenonedOutline({ width: 140, height: 110, length: 12, top: [[40, 100]] });
  const parts = [
    { part: shelf, copies: 1 },
    { part: bracket, copies: 2 },
  ];
  return toDxf(inRows(parts, 1200, 20), { declared: null, joined: true });
}
