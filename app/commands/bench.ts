/** `npm run bench [-- TOPIC...] [--json]`: what the heavy work takes, beside a reference measured in the same run. */
import { parseArgs } from "node:util";
import { benchTable } from "./bench/table";
import type { BenchRow } from "./bench/topic";
import { TOPICS } from "./bench/topics";

const DONE = 0;
const FAILED = 1;
const UNUSABLE = 2;

async function bench(given: readonly string[]): Promise<number> {
  const { positionals, values } = parseArgs({
    args: [...given],
    allowPositionals: true,
    options: { json: { type: "boolean", default: false } },
  });
  const names = TOPICS.map(({ name }) => name);
  const unknown = positionals.find((name) => !names.includes(name));
  if (unknown !== undefined) {
    console.error(`There is no topic ${unknown}. Say: bench [${names.join("|")}] [--json].`);
    return UNUSABLE;
  }
  const rows: BenchRow[] = [];
  for (const topic of TOPICS) {
    if (positionals.length > 0 && !positionals.includes(topic.name)) continue;
    rows.push(...(await topic.run((words) => console.error(words))));
  }
  process.stdout.write(values.json ? `${JSON.stringify(rows, null, 1)}\n` : `${benchTable(rows)}\n`);
  return DONE;
}

bench(process.argv.slice(2))
  .catch((error: unknown) => {
    console.error(error);
    return FAILED;
  })
  .then((code) => {
    process.exitCode = code;
  });
