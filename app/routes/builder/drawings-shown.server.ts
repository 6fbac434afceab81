import type { ViewGeometry } from "~/components/drawing-viewer/view-geometry";
import { viewGeometryOf } from "~/components/drawing-viewer/view-geometry-of";
import type { ShownDrawing, ShownFinding } from "~/components/order/order-view";
import type { FileGeometry } from "~/documents/geometry";
import type { Finding } from "~/domain/fit";

/** A drawing larger than this, in characters of JSON, is loaded after the page instead of with it. */
const WITH_THE_PAGE = 400_000;
/** More curves than this are never as small as that; the shape of the drawing is then not even made here. */
const CURVES_WITH_THE_PAGE = 20_000;

/** Drawings for the viewer. */
export function shownDrawings(
  files: readonly { readonly fileName: string; readonly geometry: FileGeometry }[],
): ShownDrawing[] {
  return files.map(({ fileName, geometry }, index) => ({
    sha256: geometry.sha256,
    fileName,
    number: index + 1,
    geometry:
      geometry.report.drawn.curves > CURVES_WITH_THE_PAGE
        ? null
        : smallEnough(viewGeometryOf(geometry.report)),
  }));
}

const smallEnough = (geometry: ViewGeometry): ViewGeometry | null =>
  JSON.stringify(geometry).length <= WITH_THE_PAGE ? geometry : null;

interface Found {
  readonly id: string | null;
  readonly finding: Finding & { readonly fileSha?: string | undefined };
  readonly answer: ShownFinding["answer"];
}

/** Findings numbered as they are pinned: what stops first, then what is asked, then what is good to know. */
export function shownFindings(found: readonly Found[], shas: readonly string[]): ShownFinding[] {
  const order = { stop: 0, ask: 1, note: 2 };
  return [...found]
    .sort((one, other) => order[one.finding.severity] - order[other.finding.severity])
    .map(({ id, finding, answer }, index) => {
      const fileSha = finding.fileSha ?? (shas.length === 1 ? (shas[0] ?? null) : null);
      return {
        number: index + 1,
        id,
        severity: finding.severity,
        words: finding.words,
        fileSha,
        label: finding.part === null ? null : labelOf(finding.part, fileSha, shas),
        at: finding.at ? [finding.at.x, finding.at.y] : null,
        answer,
      };
    });
}

/** `A`, or `2A` for the second of several drawings: as the part list has it. */
const labelOf = (letter: string, fileSha: string | null, shas: readonly string[]): string =>
  shas.length > 1 && fileSha !== null ? `${shas.indexOf(fileSha) + 1}${letter}` : letter;
