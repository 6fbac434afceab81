import { useQuery } from "@tanstack/react-query";
import { useMemo } from "react";
import type { GeometryDocument } from "~/documents/geometry";
import { DrawingViewer } from "../drawing-viewer/drawing-viewer";
import type { ViewGeometry } from "../drawing-viewer/view-geometry";
import { viewGeometryOf } from "../drawing-viewer/view-geometry-of";
import { EmptyState } from "../empty-state";
import { Sheet } from "../sheet";
import { mustBeSettled, type ShownDrawing, type ShownFinding, type ShownPart } from "./order-view";
import type { OrderFocus } from "./use-order-focus";

interface OrderDrawingProps {
  readonly orderId: string;
  readonly geometryKey: string | null;
  readonly drawings: readonly ShownDrawing[];
  readonly parts: readonly ShownPart[];
  readonly findings: readonly ShownFinding[];
  readonly focus: OrderFocus;
}

/** The largest thing on the page: one drawing of the order at a time, in step with the lists beside it. */
export function OrderDrawing({ orderId, geometryKey, drawings, parts, findings, focus }: OrderDrawingProps) {
  const drawing = drawings.find(({ sha256 }) => sha256 === focus.fileSha) ?? null;
  const loaded = useGeometry(orderId, geometryKey, drawing);
  const here = useMemo(
    () => parts.filter(({ fileSha }) => fileSha === drawing?.sha256),
    [parts, drawing?.sha256],
  );
  const letterOf = (label: string | null) => here.find((part) => part.label === label)?.letter ?? null;
  const labelOf = (letter: string | null) => here.find((part) => part.letter === letter)?.label ?? null;
  const pins = findings.flatMap((finding) =>
    finding.at && finding.fileSha === drawing?.sha256
      ? [
          {
            number: finding.number,
            at: finding.at,
            filled: mustBeSettled(finding),
            label: finding.words,
          },
        ]
      : [],
  );
  return (
    <div id="drawing" className="scroll-mt-4">
      <Sheet label="Drawing">
        {drawing && loaded.geometry ? (
          <DrawingViewer
            key={drawing.sha256}
            geometry={loaded.geometry}
            hovered={letterOf(focus.hovered)}
            onHover={(letter) => focus.hover(labelOf(letter))}
            selected={letterOf(focus.selected)}
            onSelect={(letter, at) => focus.select(labelOf(letter), at)}
            spot={focus.spot}
            pins={pins}
            onPin={(number) => document.getElementById(`finding-${number}`)?.focus()}
            {...(drawings.length > 1
              ? {
                  modes: drawings.map(({ sha256, fileName, number }) => ({
                    id: sha256,
                    label: `${number} ${fileName}`,
                  })),
                  mode: drawing.sha256,
                  onMode: focus.showFile,
                }
              : {})}
          />
        ) : (
          <EmptyState>{words(drawing, loaded.failed)}</EmptyState>
        )}
      </Sheet>
    </div>
  );
}

function words(drawing: ShownDrawing | null, failed: boolean): string {
  if (!drawing) return "No drawing is read yet: it appears here as soon as it is.";
  return failed
    ? "The drawing could not be fetched. Load the page again."
    : "A large drawing: it is on its way.";
}

/** The drawing that came with the page, or fetched once by its content hash. */
function useGeometry(
  orderId: string,
  geometryKey: string | null,
  drawing: ShownDrawing | null,
): { geometry: ViewGeometry | null; failed: boolean } {
  const query = useQuery({
    queryKey: ["geometry", orderId, geometryKey],
    enabled: drawing !== null && drawing.geometry === null && geometryKey !== null,
    staleTime: Number.POSITIVE_INFINITY,
    queryFn: async ({ signal }): Promise<GeometryDocument> => {
      const response = await fetch(`/api/orders/${orderId}/geometry/${geometryKey}`, { signal });
      if (!response.ok) throw new Error(`The geometry answered ${response.status}.`);
      return response.json();
    },
  });
  const fetched = query.data?.files.find(({ sha256 }) => sha256 === drawing?.sha256);
  const geometry = useMemo(() => (fetched ? viewGeometryOf(fetched.report) : null), [fetched]);
  return { geometry: drawing?.geometry ?? geometry, failed: query.isError };
}
