export const SIGNATURE_FIELD = { width: 600, height: 200 } as const;

type Strokes = readonly (readonly (readonly [number, number])[])[];

const held = (value: number, most: number): string =>
  String(Math.round(Math.min(Math.max(value, 0), most) * 10) / 10);

/** SVG path text of strokes, each point kept inside the field. */
export const signaturePath = (strokes: Strokes): string =>
  strokes
    .filter((stroke) => stroke.length > 0)
    .map(
      (stroke) =>
        `M${stroke.map(([x, y]) => `${held(x, SIGNATURE_FIELD.width)} ${held(y, SIGNATURE_FIELD.height)}`).join("L")}`,
    )
    .join("");

/** A drawn signature as an SVG document: numbers only, nothing that was typed goes into it. */
export const signatureSvg = (strokes: Strokes): string =>
  `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 ${SIGNATURE_FIELD.width} ${SIGNATURE_FIELD.height}"><path d="${signaturePath(strokes)}" fill="none" stroke="#000" stroke-width="3" stroke-linecap="round" stroke-linejoin="round"/></svg>`;
