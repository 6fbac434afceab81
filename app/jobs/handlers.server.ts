import { readDrawingHandler } from "~/flows/read-drawing.server";
import type { JobHandlers } from "./handler";

/** What the product's runners can do, by kind of job. */
export const jobHandlers: JobHandlers = { "read-drawing": readDrawingHandler() };
