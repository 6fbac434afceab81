import findParts from "./find-parts.worker.ts?node-worker";
import readDrawing from "./read-drawing.worker.ts?node-worker";
import taskHost from "./task-host.ts?node-worker";

export const bundledWorkers = {
  "task-host": taskHost,
  "read-drawing.worker": readDrawing,
  "find-parts.worker": findParts,
};
