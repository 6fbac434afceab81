import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { sql } from "drizzle-orm";
import { afterAll, beforeAll } from "vitest";
import { closeDatabase, currentDatabase, db, putDatabase } from "~/db/client.server";
import { migrateDatabase } from "~/db/migrate.server";
import { openDatabase } from "~/db/open.server";

/**
 * A fresh migrated database in a temporary directory for this test file, behind `db` and `transact`; removed after
 * the last test. Call once at the top of the file.
 */
export function freshDatabase(): void {
  const directory = mkdtempSync(path.join(tmpdir(), "kerfpost-database-"));
  beforeAll(async () => {
    putDatabase(openDatabase(`file:${path.join(directory, "test.db")}`));
    await migrateDatabase(currentDatabase());
  });
  afterAll(() => {
    closeDatabase();
    rmSync(directory, { recursive: true, force: true });
  });
}

/** Empties every table. */
export async function resetDatabase(): Promise<void> {
  const tables = await db.all<{ name: string }>(
    sql`select name from sqlite_schema where type = 'table' and name not like 'sqlite_%' and name not like '\\_\\_drizzle%' escape '\\'`,
  );
  await currentDatabase().transact(async (tx) => {
    await tx.run(sql`PRAGMA defer_foreign_keys = on`);
    for (const { name } of tables) await tx.run(sql`delete from ${sql.identifier(name)}`);
  });
}
