import { integer, text } from "drizzle-orm/sqlite-core";
import { newId } from "../new-id";

export const id = () => text().primaryKey().$defaultFn(newId);
/** An instant, UTC, milliseconds. */
export const instant = () => integer({ mode: "timestamp_ms" });
export const createdAt = () =>
  instant()
    .notNull()
    .$defaultFn(() => new Date());
/** The row's version: a write names the version it read, and a stale one changes nothing. */
export const version = () => integer().notNull().default(1);
export const flag = () => integer({ mode: "boolean" });
/** Integer cents. */
export const centsColumn = () => integer();
