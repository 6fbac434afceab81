import type { Drawing, DrawnPath } from "../drawing";
import { AsideList } from "./aside-list";
import type { LayerReader } from "./operations";

/** What the builder wants cut after all, of what is set aside of itself. */
export interface Restored {
  readonly what: "frame" | "text" | "hidden" | "note";
  readonly layer: string;
}

/** Whether the builder has taken back a setting aside. */
export const isRestored = (restored: readonly Restored[], what: Restored["what"], layer: string): boolean =>
  restored.some((one) => one.what === what && one.layer === layer);

/**
 * Paths to be cut, and what is set aside: hidden layers, layers of text and notes, texts themselves, and, for the
 * list only, what is drawn twice among the rest.
 */
export function sortOut(
  drawing: Drawing,
  reader: LayerReader,
  restored: readonly Restored[],
  duplicates: Int32Array,
): { readonly cut: DrawnPath[]; readonly aside: AsideList } {
  const reasonFor = ({ hidden, layer }: DrawnPath): "hidden" | "text" | "note" | null => {
    if (hidden && !isRestored(restored, "hidden", layer)) return "hidden";
    const what = reader(layer)?.what ?? null;
    return what !== null && !isRestored(restored, what, layer) ? what : null;
  };
  const aside = new AsideList();
  const cut: DrawnPath[] = [];
  for (let i = 0; i < drawing.paths.length; i++) {
    const path = drawing.paths[i];
    const reason = reasonFor(path);
    if (reason) aside.add(reason, path);
    else cut.push(path);
    if (duplicates[i] >= 0 && !reason) aside.add("duplicate", path);
  }
  for (const { layer } of drawing.texts) aside.count("text", layer);
  return { cut, aside };
}
