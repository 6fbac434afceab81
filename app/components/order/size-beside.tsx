import { type LengthUnit, MM_PER_UNIT } from "~/domain/units";
import type { UnitQuestion } from "./order-view";

/** Things everybody has beside them. Millimetres: a hand from wrist to finger tip, a house door's leaf (common practice, no source). */
const HAND = { height: 190, width: 105, name: "a hand, 190 mm" };
const DOOR = { height: 2030, width: 760, name: "a door, 2,030 mm" };
/** Longer parts stand beside a door. */
const BESIDE_A_HAND = 700;

interface SizeBesideProps {
  readonly question: UnitQuestion;
  /** The reading to be looked at. */
  readonly unit: LengthUnit;
}

/** The longest part under one reading, at one scale with something familiar. */
export function SizeBeside({ question, unit }: SizeBesideProps) {
  const { shape, assumed, longest } = question;
  const grown = MM_PER_UNIT[unit] / MM_PER_UNIT[assumed];
  const long = longest * MM_PER_UNIT[unit];
  const familiar = long <= BESIDE_A_HAND ? HAND : DOOR;
  const wide = (shape.box.maxX - shape.box.minX) * grown;
  const high = (shape.box.maxY - shape.box.minY) * grown;
  const height = Math.max(high, familiar.height);
  const gap = 0.15 * height;
  const width = wide + gap + familiar.width;
  return (
    <figure className="print:hidden">
      <svg
        role="img"
        aria-label={`The longest part beside ${familiar.name}`}
        viewBox={`${-0.02 * width} ${-0.02 * height} ${1.04 * width} ${1.04 * height}`}
        width="100%"
        height="120"
      >
        <path
          d={shape.d}
          transform={`matrix(${grown} 0 0 ${-grown} ${-shape.box.minX * grown} ${height + shape.box.minY * grown})`}
          fillRule="evenodd"
          vectorEffect="non-scaling-stroke"
          strokeWidth="1.3"
          className="fill-grain stroke-ink"
        />
        <g transform={`translate(${wide + gap} ${height - familiar.height})`} className="fill-soft">
          {familiar === HAND ? <Hand /> : <Door />}
        </g>
      </svg>
      <figcaption className="text-caption text-soft">your longest part beside {familiar.name}</figcaption>
    </figure>
  );
}

/** 105 by 190 mm, wrist down. */
function Hand() {
  return (
    <path d="M25 190V150Q18 140 17 122L3 92Q-1 82 6 79Q13 77 18 85L28 101V30Q28 22 35 22Q42 22 42 30V80H45V10Q45 0 53 0Q61 0 61 10V80H64V18Q64 9 71 9Q78 9 78 18V84H81V42Q81 34 88 34Q95 34 95 42V120Q95 140 86 152V190Z" />
  );
}

/** 760 by 2,030 mm with its handle. */
function Door() {
  return <path fillRule="evenodd" d="M0 0H760V2030H0ZM40 40V1990H720V40ZM640 980H700V1020H640Z" />;
}
