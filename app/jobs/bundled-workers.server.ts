import findParts from "./find-parts.worker.ts?node-worker";
import readDrawing from "./read-drawing.worker.ts?node-worker";

export const bundledWorkers = { "read-drawing": readDrawing, "find-parts": findParts };
