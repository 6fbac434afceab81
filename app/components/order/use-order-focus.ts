import { useCallback, useMemo, useState } from "react";
import { useSearchParams } from "react-router";
import type { Spot, ViewSpot } from "../drawing-viewer/view-geometry";
import type { Pointing } from "../thread/thread-data";
import type { ShownDrawing, ShownFinding, ShownPart } from "./order-view";

export interface OrderFocus {
  /** Labels of the part pointed at and of the part chosen. */
  readonly hovered: string | null;
  readonly selected: string | null;
  /** The drawing that lies on the sheet. */
  readonly fileSha: string | null;
  readonly hover: (label: string | null) => void;
  /** `at`: where on the drawing it was pressed, millimetres. */
  readonly select: (label: string | null, at?: Spot) => void;
  readonly showFile: (sha: string) => void;
  /** Brings a finding's place to view. */
  readonly look: (finding: ShownFinding) => void;
  /** The chosen part and where it was pressed, which a message may point at. */
  readonly pointing: Pointing | null;
  /** Where a message points, on the drawing that lies on the sheet. */
  readonly spot: ViewSpot | null;
  /** Shows what a message points at. */
  readonly openSpot: (pointing: Pointing) => void;
}

/**
 * What the drawing and the lists beside it point at together. The chosen part is in the address, `?part=A`, so that
 * it can be sent to somebody.
 */
export function useOrderFocus(parts: readonly ShownPart[], drawings: readonly ShownDrawing[]): OrderFocus {
  const [search, setSearch] = useSearchParams();
  const [hovered, hover] = useState<string | null>(null);
  const [file, showFile] = useState<string | null>(null);
  const [pressed, setPressed] = useState<Pressed | null>(null);
  const [opened, setOpened] = useState<Pointing | null>(null);
  const asked = search.get("part");
  const chosen = parts.find(({ label }) => label === asked);
  const selected = chosen?.label ?? null;
  const there = (sha: string | null | undefined) => drawings.some(({ sha256 }) => sha256 === sha);
  const fileSha = [file, chosen?.fileSha].find((sha) => there(sha)) ?? drawings[0]?.sha256 ?? null;

  const select = useCallback(
    (label: string | null, at?: Spot) => {
      setPressed(label !== null && at ? { label, at } : null);
      setOpened(null);
      const part = parts.find((one) => one.label === label);
      if (part) showFile(part.fileSha);
      setSearch(
        (now) => {
          if (label === null) now.delete("part");
          else now.set("part", label);
          return now;
        },
        { replace: true, preventScrollReset: true },
      );
    },
    [parts, setSearch],
  );

  const look = useCallback(
    (finding: ShownFinding) => {
      if (finding.fileSha) showFile(finding.fileSha);
      if (finding.label) select(finding.label);
      document.getElementById("drawing")?.scrollIntoView({ block: "nearest" });
    },
    [select],
  );

  const openSpot = useCallback(
    (pointing: Pointing) => {
      if (parts.some(({ label }) => label === pointing.partLabel)) select(pointing.partLabel);
      setOpened(pointing);
      document.getElementById("drawing")?.scrollIntoView({ block: "nearest" });
    },
    [parts, select],
  );

  const pointing = useMemo(() => pointingAt(selected, pressed), [selected, pressed]);
  const spot = useMemo(() => opened && spotOf(opened), [opened]);

  return useMemo(
    () => ({ hovered, selected, fileSha, hover, select, showFile, look, pointing, spot, openSpot }),
    [hovered, selected, fileSha, select, look, pointing, spot, openSpot],
  );
}

interface Pressed {
  readonly label: string;
  readonly at: Spot;
}

function pointingAt(selected: string | null, pressed: Pressed | null): Pointing | null {
  if (selected === null) return null;
  const at = pressed?.label === selected ? pressed.at : null;
  return { partLabel: selected, spot: at && { x: at[0], y: at[1] } };
}

const spotOf = ({ partLabel, spot }: Pointing): ViewSpot | null =>
  spot && { at: [spot.x, spot.y], label: partLabel ? `Pointed at on part ${partLabel}` : "Pointed at" };
