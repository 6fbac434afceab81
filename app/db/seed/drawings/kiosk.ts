import {
  INSIDE,
  inRows,
  OUTSIDE,
  obround,
  onLayer,
  rectangle,
  round,
  type Shape,
  toDxf,
  together,
  turned,
} from "./draft";
import { tenonedOutline } from "./tenons";

/** A frame for a tea kiosk's menu with the board cut from its opening: 2 parts, one inside the other. */
export function menuFrame(): string {
  const frame = together(
    onLayer(OUTSIDE, rectangle([0, 0], 720, 980, 30)),
    onLayer(INSIDE, rectangle([60, 60], 600, 860, 15)),
    onLayer("DRILL_5", ...[30, 690].flatMap((x) => [30, 490, 950].map((y) => round([x, y], 5)))),
  );
  const board = together(
    onLayer(OUTSIDE, rectangle([80, 80], 560, 820, 10)),
    onLayer("ENGRAVE", rectangle([100, 100], 520, 780), rectangle([120, 720], 480, 140)),
  );
  return toDxf(together(frame, board), { declared: "mm", joined: true });
}

/** Fronts for counter drawers with a half-round finger pull, one turned as it came: 5 parts of 3 kinds. */
export function drawerFronts(): string {
  const front = (width: number, height: number): Shape =>
    together(
      onLayer(OUTSIDE, rectangle([0, 0], width, height, 3)),
      onLayer(INSIDE, obround([width / 2, height - 34], 96, 28)),
      onLayer(
        "DRILL_5_D10",
        ...[40, width - 40].flatMap((x) => [40, height - 40].map((y) => round([x, y], 5))),
      ),
    );
  const parts = [
    { part: front(446, 157), copies: 2 },
    { part: turned(front(446, 157), 90), copies: 1 },
    { part: front(446, 253), copies: 1 },
    { part: front(596, 317), copies: 1 },
  ];
  return toDxf(inRows(parts, 1600, 20), { declared: "mm", joined: true });
}

/** Serving trays: a bottom with hand holes, ends and sides with tenons: 10 parts of 3 kinds for two trays. */
export function servingTray(): string {
  const bottom = together(
    onLayer(OUTSIDE, rectangle([0, 0], 460, 320, 24)),
    onLayer(
      INSIDE,
      ...[20, 430.6].map((x) => rectangle([x, 110], 9.4, 100)),
      ...[15, 295.6].flatMap((y) => [90, 290].map((x) => rectangle([x, y], 80, 9.4))),
    ),
    onLayer("ENGRAVE", round([230, 160], 150), round([230, 160], 140)),
  );
  const end = together(
    tenonedOutline({ width: 260, height: 75, length: 9, bottom: [[80, 180]] }),
    onLayer(INSIDE, obround([130, 46], 110, 30)),
  );
  const side = tenonedOutline({
    width: 400,
    height: 50,
    length: 9,
    bottom: [
      [60, 140],
      [260, 340],
    ],
  });
  const parts = [
    { part: bottom, copies: 2 },
    { part: end, copies: 4 },
    { part: side, copies: 4 },
  ];
  return toDxf(inRows(parts, 1500, 25), { declared: "mm", joined: true });
}

/** A small box that tries every joint of the kiosk's counter in cheap 12 mm stock: 6 parts of 4 kinds. */
export function trialBox(): string {
  const slot = 12.2;
  const front = together(
    onLayer(OUTSIDE, rectangle([0, 0], 240, 140)),
    onLayer(
      INSIDE,
      ...[20, 240 - 20 - slot].flatMap((x) => [25, 85].map((y) => rectangle([x, y], slot, 30))),
      rectangle([95, 12], 50, slot),
    ),
  );
  const ends = [
    [25, 55],
    [85, 115],
  ] as const;
  const side = tenonedOutline({ width: 150, height: 140, length: 12, left: ends, right: ends });
  const bottom = tenonedOutline({
    width: 176,
    height: 150,
    length: 12,
    top: [[63, 113]],
    bottom: [[63, 113]],
  });
  const lid = together(
    onLayer(OUTSIDE, rectangle([0, 0], 240, 174, 8)),
    onLayer(INSIDE, round([120, 140], 25)),
  );
  const parts = [
    { part: front, copies: 2 },
    { part: side, copies: 2 },
    { part: bottom, copies: 1 },
    { part: lid, copies: 1 },
  ];
  return toDxf(inRows(parts, 900, 20), { declared: "mm", joined: false });
}
