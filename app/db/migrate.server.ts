import path from "node:path";
import { setTimeout as pause } from "node:timers/promises";
import { sql } from "drizzle-orm";
import { migrate } from "drizzle-orm/libsql/migrator";
import { currentDatabase } from "./client.server";
import type { OpenDatabase } from "./open.server";

/** Where migrations lie: beside package.json, from where every command and the server are started. */
const MIGRATIONS = "drizzle";

/** Another process that starts at the same time may be at the same migration; the second try finds it done. */
const TRIES = 3;
const PAUSE = 500;

/** Brings the database to the newest schema. Safe to run at every start and from several processes at once. */
export async function migrateDatabase(database: OpenDatabase = currentDatabase()): Promise<void> {
  if (database.url.startsWith("file:")) await database.executor.run(sql`PRAGMA journal_mode = WAL`);
  for (let attempt = 1; ; attempt++) {
    try {
      await migrate(database.executor, { migrationsFolder: path.resolve(MIGRATIONS) });
      return;
    } catch (error) {
      if (attempt === TRIES) throw error;
      await pause(PAUSE);
    }
  }
}
