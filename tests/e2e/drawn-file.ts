import { DEMO_DRAWINGS, type DemoDrawingName } from "~/db/seed/drawings";

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
