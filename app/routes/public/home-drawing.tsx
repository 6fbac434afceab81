/** The drawing of the first page: parts of a galley locker as they are found in a file. Units are millimetres. */

const MORTISES = [
  [62, 118],
  [292, 118],
  [62, 500],
  [292, 500],
] as const;
/** A shelf 456 x 300 between shoulders, with two tenons 60 wide and 18 long at each end. */
const SHELF = "M18 0H438V60H456V120H438V180H456V240H438V300H18V240H0V180H18V120H0V60H18Z";
const OUTLINE = "fill-grain/55 stroke-ink stroke-[2.6]";
const OPENING = "fill-sheet stroke-ink stroke-[1.6]";
const AXIS = "stroke-soft stroke-[0.9] [stroke-dasharray:18_5_3_5]";
const LETTERS = "fill-ink font-mono text-[22px] font-semibold";

function Hole({ x, y, r }: { readonly x: number; readonly y: number; readonly r: number }) {
  const over = r + 12;
  return (
    <g>
      <circle cx={x} cy={y} r={r} className={OPENING} />
      <path d={`M${x - over} ${y}H${x + over}M${x} ${y - over}V${y + over}`} className={AXIS} />
    </g>
  );
}

export function HomeDrawing() {
  return (
    <svg
      viewBox="0 0 1600 800"
      className="block h-auto w-[190%] max-w-none sm:w-full"
      role="img"
      aria-label="A drawing as it is read: a side with four mortises and a cable hole, cut twice; a shelf with tenons, cut three times; a back with a pocket; a door with two hinge cups."
    >
      <defs>
        <pattern
          id="hatch"
          width="12"
          height="12"
          patternUnits="userSpaceOnUse"
          patternTransform="rotate(45)"
        >
          <path d="M0 0V12" className="stroke-soft" />
        </pattern>
      </defs>
      <g transform="translate(70 70)">
        <rect width="420" height="620" className="fill-blue-wash stroke-blue stroke-[3.2]" />
        {MORTISES.map(([x, y]) => (
          <rect key={`${x} ${y}`} x={x} y={y} width="66" height="18" className={OPENING} />
        ))}
        <Hole x={210} y={310} r={55} />
        <text x="18" y="38" className={LETTERS}>
          A ×2
        </text>
        <path d="M0 632V672M420 632V672M0 660H420" className="stroke-blue stroke-[1.4]" />
        <path d="M0 660l14 -5v10zM420 660l-14 -5v10z" className="fill-blue" />
        <text x="210" y="650" textAnchor="middle" className="fill-blue font-mono text-[20px] font-semibold">
          420.0 mm · 16 17/32 in
        </text>
      </g>
      <g transform="translate(570 70)">
        <path d={SHELF} className={OUTLINE} />
        <text x="36" y="38" className={LETTERS}>
          B ×3
        </text>
      </g>
      <g transform="translate(588 450)">
        <rect width="420" height="240" className={OUTLINE} />
        <rect x="70" y="60" width="280" height="126" rx="12" className="fill-sheet" />
        <rect
          x="70"
          y="60"
          width="280"
          height="126"
          rx="12"
          fill="url(#hatch)"
          className="stroke-ink stroke-[1.2]"
        />
        <rect x="146" y="108" width="128" height="30" className="fill-sheet" />
        <text x="210" y="130" textAnchor="middle" className="fill-ink font-mono text-[18px]">
          leave 6.35
        </text>
        <text x="18" y="38" className={LETTERS}>
          C
        </text>
      </g>
      <g transform="translate(1100 70)">
        <rect width="430" height="620" className={OUTLINE} />
        <Hole x={34} y={96} r={17.5} />
        <Hole x={34} y={524} r={17.5} />
        <rect x="338" y="292" width="46" height="28" className={OPENING} />
        <text x="66" y="38" className={LETTERS}>
          D
        </text>
      </g>
    </svg>
  );
}
