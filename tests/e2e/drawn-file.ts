import { DEMO_DRAWINGS, type DemoDrawingName } from "~/db/seed/drawings";
import { writeDxf } from "~/domain/drawing";

/** A file as a browser's file input takes it. */
export interface DrawnFile {
  readonly name: string;
  readonly mimeType: string;
  readonly buffer: Buffer;
}

/** A drawing of the demonstration, drawn now by our own code. */
export function drawnFile(name: DemoDrawingName): DrawnFile {
  const { fileName, draw } = DEMO_DRAWINGS[name];
  return textFile(fileName, draw());
}

export const textFile = (name: string, text: string): DrawnFile => ({
  name,
  mimeType: "application/octet-stream",
  buffer: Buffer.from(text),
});

/** A square plate, millimetres. */
export function squareFile(name: string, side: number): DrawnFile {
  const corners = [
    { x: 0, y: 0 },
    { x: side, y: 0 },
    { x: side, y: side },
    { x: 0, y: side },
  ];
  const curves = corners.map((from, i) => ({
    kind: "line" as const,
    from,
    to: corners[(i + 1) % 4] ?? from,
  }));
  return textFile(name, writeDxf([{ layer: "OUTSIDE", path: { closed: true, curves } }], "mm"));
}
