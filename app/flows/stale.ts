import { refuse } from "./verdict";

/** What somebody reads whose form was opened before another's change was saved. */
export const STALE = refuse(
  "changed",
  "Somebody changed this while you were writing. Nothing was saved; look at it again.",
);
