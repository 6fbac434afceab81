import { reading } from "./reading";
import type { BenchTopic } from "./topic";

/** Everything that is measured, in the order it is run; a new topic adds its line. */
export const TOPICS: readonly BenchTopic[] = [reading];
