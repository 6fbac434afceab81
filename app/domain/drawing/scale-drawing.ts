import { affineApply, affineScale, transformPath } from "../geometry";
import { type LengthUnit, MM_PER_UNIT } from "../units";
import type { Drawing } from "./drawing";

/** The drawing in world millimetres, its coordinates taken as being in `unit`. One that is in millimetres is kept. */
export function scaleDrawing(drawing: Drawing, unit: LengthUnit): Drawing {
  if (drawing.unit === "mm") return drawing;
  const factor = MM_PER_UNIT[unit];
  if (factor === 1) return { ...drawing, unit: "mm" };
  const grow = affineScale(factor);
  return {
    ...drawing,
    unit: "mm",
    paths: drawing.paths.map((drawn) => ({ ...drawn, path: transformPath(drawn.path, grow) })),
    texts: drawing.texts.map((text) => ({
      ...text,
      at: affineApply(grow, text.at),
      height: text.height * factor,
    })),
  };
}
