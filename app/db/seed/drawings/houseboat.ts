import {
  INSIDE,
  inRows,
  mirrored,
  OUTSIDE,
  onLayer,
  rectangle,
  round,
  type Shape,
  stroke,
  toDxf,
  together,
} from "./draft";
import { tenonedOutline } from "./tenons";

/** Drawn for 3/4 in stock: what the shop's 18 mm lots are thinner than. */
const DRAWN_THICKNESS = 19.05;

const panel = (width: number, height: number): Shape => onLayer(OUTSIDE, rectangle([0, 0], width, height));

/**
 * A 35 mm hinge cup and its two screw holes. The cup's centre stands 22.5 mm from the door's edge (17.5 mm and a
 * boring distance of 5 mm), the screws 45 mm apart and 9.5 mm behind it (generic hinge data sheet).
 */
const hinge = (height: number): Shape =>
  together(
    onLayer("CUP_35_D13", round([22.5, height], 35)),
    onLayer("DRILL_5_D10", round([32, height - 22.5], 5), round([32, height + 22.5], 5)),
  );

/** A galley carcass: 12 parts of 6 kinds for 18 mm stock, its mortises drawn at 19.05 mm. */
export function galleyCarcass(): string {
  const tenons = [
    [35, 95],
    [205, 265],
  ] as const;
  const levels = [90, 450, 590];
  const mortise = (x: number, y: number): Shape =>
    rectangle([x, y - DRAWN_THICKNESS / 2], 61, DRAWN_THICKNESS);
  const side = together(
    panel(420, 640),
    onLayer(
      INSIDE,
      ...levels.flatMap((level) => [mortise(94.5, level), mortise(264.5, level)]),
      mortise(94.5, 260),
      mortise(264.5, 260),
      round([210, 350], 116),
    ),
  );
  const spreader = tenonedOutline({ width: 420, height: 300, length: 18, left: tenons, right: tenons });
  const shelf = together(
    tenonedOutline({ width: 420, height: 300, length: 18, left: tenons, right: tenons }),
    onLayer("POCKET_LEAVE_6.35MM", rectangle([70, 85], 280, 130, 10)),
  );
  const door = together(
    panel(330, 620),
    hinge(90),
    hinge(530),
    onLayer(INSIDE, rectangle([250, 297], 44, 26, 4)),
  );
  const vent = together(panel(180, 300), onLayer(INSIDE, round([90, 150], 120)));
  const block = panel(180, 110);
  const parts = [
    { part: side, copies: 2 },
    { part: spreader, copies: 3 },
    { part: shelf, copies: 1 },
    { part: door, copies: 1 },
    { part: vent, copies: 1 },
    { part: block, copies: 4 },
  ];
  return toDxf(inRows(parts, 2600, 40), { declared: "mm", joined: true });
}

/** A pair of locker doors, left and right mirrored, each with two hinges and a latch opening: 2 parts. */
export function lockerDoors(): string {
  const door = together(
    onLayer(OUTSIDE, rectangle([0, 0], 396, 716, 12)),
    hinge(100),
    hinge(616),
    onLayer(INSIDE, rectangle([330, 338], 22, 60, 6)),
  );
  const parts = [
    { part: door, copies: 1 },
    { part: mirrored(door), copies: 1 },
  ];
  return toDxf(inRows(parts, 2400, 30), { declared: "mm", joined: true });
}

/** A panel for a roof fan: one round opening, four screw holes, eight vent slots: 1 part. */
export function fanPanel(): string {
  const slots = [0, 1, 2, 3].flatMap((row) => [
    rectangle([40, 60 + row * 30], 90, 12, 6),
    rectangle([330, 60 + row * 30], 90, 12, 6),
  ]);
  const part = together(
    onLayer(OUTSIDE, rectangle([0, 0], 460, 420, 40)),
    onLayer(INSIDE, round([230, 230], 225), ...slots),
    onLayer(
      "DRILL_5",
      ...[
        [110, 350],
        [350, 350],
        [110, 110 + 100],
        [350, 110 + 100],
      ].map(([x, y]) => round([x, y], 5)),
    ),
  );
  return toDxf(inRows([{ part, copies: 1 }], 2400, 20), { declared: "mm", joined: false });
}

/** Drawers of a chart table in 9 mm stock, two alike: fronts, backs, sides with a groove for the bottom: 8 parts of 3 kinds. */
export function chartTableDrawers(): string {
  const fingers = [
    [12, 36],
    [60, 84],
  ] as const;
  const mortises = [5, 805.8].flatMap((x) =>
    fingers.map(([from, to]) => rectangle([x, from], 9.2, to - from)),
  );
  const front = together(panel(820, 96), onLayer(INSIDE, ...mortises, rectangle([340, 58], 140, 24, 12)));
  const back = together(panel(820, 96), onLayer(INSIDE, ...mortises));
  const side = together(
    tenonedOutline({ width: 540, height: 96, length: 9, left: fingers, right: fingers }),
    onLayer("POCKET_D5MM", rectangle([8, 12], 524, 6.8)),
  );
  const parts = [
    { part: front, copies: 2 },
    { part: back, copies: 2 },
    { part: side, copies: 4 },
  ];
  return toDxf(inRows(parts, 2400, 25), { declared: "mm", joined: true });
}

/**
 * A bench lid as an old drawing gives it: loose lines, the lower edge drawn twice, a gap of 0.15 mm at one corner:
 * 1 part with a finger opening.
 */
export function benchLid(): string {
  const gap = 0.15;
  const outline = onLayer(
    OUTSIDE,
    stroke([0, 0], [900, 0]),
    stroke([0, 0], [900, 0]),
    stroke([900, 0], [900, 380]),
    stroke([900, 380], [0, 380]),
    stroke([0, 380], [0, gap]),
  );
  const opening = onLayer(INSIDE, rectangle([400, 320], 100, 30, 15));
  return toDxf(together(outline, opening), { declared: "mm", joined: false });
}
