import { environment } from "~/server/environment.server";
import { type Executor, type OpenDatabase, openDatabase } from "./open.server";

export type { Executor } from "./open.server";

/** One database a process, kept where a reload of this module in development finds it again. */
const shelf = globalThis as { kerfpostDatabase?: OpenDatabase };

/** The process's database, opened from the environment at its first use. */
export function currentDatabase(): OpenDatabase {
  shelf.kerfpostDatabase ??= openDatabase(environment.DATABASE_URL, environment.DATABASE_AUTH_TOKEN);
  return shelf.kerfpostDatabase;
}

/** Puts another open database in place of the environment's, for tests; the caller closes it. */
export function putDatabase(database: OpenDatabase): void {
  shelf.kerfpostDatabase = database;
}

/** Closes the process's database if it was opened. */
export function closeDatabase(): void {
  shelf.kerfpostDatabase?.close();
  delete shelf.kerfpostDatabase;
}

/** Reads and single writes outside a transaction. */
export const db: OpenDatabase["executor"] = new Proxy({} as OpenDatabase["executor"], {
  get(_, property) {
    const { executor } = currentDatabase();
    const value: unknown = Reflect.get(executor, property, executor);
    return typeof value === "function" ? value.bind(executor) : value;
  },
});

/** Runs `work` in one write transaction; see `OpenDatabase`. */
export const transact = <T>(work: (tx: Executor) => Promise<T>): Promise<T> =>
  currentDatabase().transact(work);
