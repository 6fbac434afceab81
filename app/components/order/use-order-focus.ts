import { useCallback, useMemo, useState } from "react";
import { useSearchParams } from "react-router";
import type { ShownDrawing, ShownFinding, ShownPart } from "./order-view";

export interface OrderFocus {
  /** Labels of the part pointed at and of the part chosen. */
  readonly hovered: string | null;
  readonly selected: string | null;
  /** The drawing that lies on the sheet. */
  readonly fileSha: string | null;
  readonly hover: (label: string | null) => void;
  readonly select: (label: string | null) => void;
  readonly showFile: (sha: string) => void;
  /** Brings a finding's place to view. */
  readonly look: (finding: ShownFinding) => void;
}

/**
 * What the drawing and the lists beside it point at together. The chosen part is in the address, `?part=A`, so that
 * it can be sent to somebody.
 */
export function useOrderFocus(parts: readonly ShownPart[], drawings: readonly ShownDrawing[]): OrderFocus {
  const [search, setSearch] = useSearchParams();
  const [hovered, hover] = useState<string | null>(null);
  const [file, showFile] = useState<string | null>(null);
  const asked = search.get("part");
  const chosen = parts.find(({ label }) => label === asked);
  const selected = chosen?.label ?? null;
  const there = (sha: string | null | undefined) => drawings.some(({ sha256 }) => sha256 === sha);
  const fileSha = [file, chosen?.fileSha].find((sha) => there(sha)) ?? drawings[0]?.sha256 ?? null;

  const select = useCallback(
    (label: string | null) => {
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

  return useMemo(
    () => ({ hovered, selected, fileSha, hover, select, showFile, look }),
    [hovered, selected, fileSha, select, look],
  );
}
