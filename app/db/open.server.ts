import { mkdirSync } from "node:fs";
import path from "node:path";
import { fileURLToPath } from "node:url";
import { createClient, type ResultSet } from "@libsql/client";
import { drizzle, type LibSQLDatabase } from "drizzle-orm/libsql";
import type { BaseSQLiteDatabase } from "drizzle-orm/sqlite-core";
import * as schema from "./schema";
import { serialClient } from "./serial-writes";

/** The database, or one transaction of it: what every model function takes first. */
export type Executor = BaseSQLiteDatabase<"async", ResultSet, typeof schema>;

export interface OpenDatabase {
  readonly url: string;
  readonly executor: LibSQLDatabase<typeof schema>;
  /**
   * Runs `work` in one write transaction: committed when it resolves, rolled back when it rejects. Inside, only the
   * given executor may be used; the outer one throws.
   */
  transact<T>(work: (tx: Executor) => Promise<T>): Promise<T>;
  close(): void;
}

/** Waiting for another process's write, milliseconds. */
const BUSY_TIMEOUT = 5_000;

/**
 * Opens `file:...` (its directory is made if missing), `libsql://...` or `http(s)://...`. Foreign keys are enforced;
 * a file is put into WAL mode by its first migration, and stays so.
 */
export function openDatabase(url: string, authToken?: string): OpenDatabase {
  const isFile = url.startsWith("file:");
  if (isFile) mkdirSync(path.dirname(fileOf(url)), { recursive: true });
  const raw = createClient({ url, timeout: BUSY_TIMEOUT, ...(authToken ? { authToken } : {}) });
  const { client, inside } = serialClient(raw, isFile);
  const database = drizzle(client, { schema, casing: "snake_case" });
  const begin = database.transaction.bind(database);
  database.transaction = (work, config) => begin((tx) => inside(() => work(tx)), config);
  return {
    url,
    executor: database,
    transact: (work) => database.transaction((tx) => work(tx)),
    close: () => client.close(),
  };
}

/** `file:.data/kerfpost.db` and `file:///abs/kerfpost.db` alike; a query after the path is not part of it. */
function fileOf(url: string): string {
  if (url.startsWith("file://")) return fileURLToPath(url.replace(/[?#].*$/, ""));
  return path.resolve(url.slice("file:".length).replace(/[?#].*$/, ""));
}
