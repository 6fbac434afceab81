/** DXF bytes to a drawing and back: the only room that knows the format. */
export type { Drawing, DrawnPath, DrawnText, Ignored, IgnoredReason, ReadResult } from "./drawing";
export { MOST_EXPANDED } from "./expand";
export { readDrawing } from "./read-drawing";
export { scaleDrawing } from "./scale-drawing";
export { SNIFFED_BYTES, type Sniffed, sniffContent } from "./sniff";
export { type LayeredPath, writeDxf } from "./write-dxf";
