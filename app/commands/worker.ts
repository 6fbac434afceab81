/** Runs jobs and sends mail in a process of its own, until it is told to stop: `npm run worker`, with RUN_JOBS=false in the server. */
import { closeDatabase } from "~/db/client.server";
import { migrateDatabase } from "~/db/migrate.server";
import { closePool } from "~/jobs/pool.server";
import { startRunners } from "~/jobs/runners.server";

await migrateDatabase();
const runners = startRunners();
process.stdout.write("Running jobs and sending mail.\n");

const stop = async () => {
  await runners.stop();
  closePool();
  closeDatabase();
};
process.once("SIGINT", stop);
process.once("SIGTERM", stop);
