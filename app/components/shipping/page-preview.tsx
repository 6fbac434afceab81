import type { Mark, Page } from "~/documents/page";

interface PagePreviewProps {
  readonly page: Page;
  readonly label: string;
}

/** A printed page on the screen, black on white, drawn from the marks that it is printed from. */
export function PagePreview({ page, label }: PagePreviewProps) {
  return (
    <svg
      role="img"
      aria-label={label}
      viewBox={`0 0 ${page.width} ${page.height}`}
      className="h-auto w-full max-w-80 border border-line"
    >
      <rect width={page.width} height={page.height} fill="#fff" />
      {keyed(page.marks).map(({ key, mark }) => (
        <Drawn key={key} mark={mark} />
      ))}
    </svg>
  );
}

/** Marks of a printed page never move among each other: their place in it names them. */
const keyed = (marks: readonly Mark[]) =>
  marks.map((mark, place) => ({ mark, key: `${mark.kind} ${place}` }));

const ANCHOR = { left: "start", right: "end", middle: "middle" } as const;

function Drawn({ mark }: { readonly mark: Mark }) {
  switch (mark.kind) {
    case "text":
      return (
        <text
          x={mark.x}
          y={mark.y}
          fontSize={mark.size}
          fontWeight={mark.bold ? 600 : 400}
          textAnchor={ANCHOR[mark.align ?? "left"]}
          className="font-mono"
          fill="#000"
        >
          {mark.words}
        </text>
      );
    case "line":
      return (
        <path
          d={`M${mark.from.join(" ")}L${mark.to.join(" ")}`}
          stroke="#000"
          strokeWidth={mark.width}
          strokeDasharray={mark.dashed ? "1 1" : undefined}
        />
      );
    case "box":
      return (
        <rect
          x={mark.x}
          y={mark.y}
          width={mark.width}
          height={mark.height}
          fill={mark.edge === undefined ? "#000" : "none"}
          stroke={mark.edge === undefined ? "none" : "#000"}
          strokeWidth={mark.edge}
        />
      );
    case "bars":
      return <path d={barsPath(mark)} fill="#000" shapeRendering="crispEdges" />;
    case "squares":
      return <path d={squaresPath(mark)} fill="#000" shapeRendering="crispEdges" />;
  }
}

function barsPath({ x, y, module, height, runs }: Extract<Mark, { kind: "bars" }>): string {
  let at = x;
  let path = "";
  for (const [index, run] of runs.entries()) {
    if (index % 2 === 0) path += `M${at} ${y}h${run * module}v${height}h${-run * module}z`;
    at += run * module;
  }
  return path;
}

const squaresPath = ({ x, y, module, rows }: Extract<Mark, { kind: "squares" }>): string =>
  rows
    .flatMap((row, line) =>
      [...row.matchAll(/1+/g)].map(
        (dark) =>
          `M${x + dark.index * module} ${y + line * module}h${dark[0].length * module}v${module}h${-dark[0].length * module}z`,
      ),
    )
    .join("");
