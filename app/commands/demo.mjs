// `npm run demo`: everything from a fresh clone to a shop that can be looked at.
import { spawnSync } from "node:child_process";
import { existsSync, statSync } from "node:fs";
import { DEMO_PORTS, startProduct } from "./product.mjs";

const say = (/** @type {string} */ words) => process.stdout.write(`${words}\n`);

function run(/** @type {string} */ title, /** @type {string[]} */ args) {
  say(title);
  const { status } = spawnSync("npm", args, { stdio: ["ignore", "ignore", "inherit"] });
  if (status !== 0) {
    process.stderr.write(`\`npm ${args.join(" ")}\` failed.\n`);
    process.exit(1);
  }
}

const installed = "node_modules/.package-lock.json";
if (!existsSync(installed) || statSync("package-lock.json").mtimeMs > statSync(installed).mtimeMs)
  run("Installing packages (about a minute)", ["ci", "--silent"]);
run("Building", ["run", "-s", "build"]);

const directory = process.env.DEMO_DIRECTORY ?? ".data/demo";
const first = Number(process.env.DEMO_PORT ?? DEMO_PORTS.product);
const ports = {
  product: first,
  storage: first + 1,
  payments: first + 2,
  smtp: first + 3,
  inbox: first + 4,
  carrier: first + 5,
};
const product = await startProduct({ directory, ports, say }).catch((/** @type {Error} */ error) => {
  process.stderr.write(`The demo could not start. ${error.message}\n`);
  process.exit(1);
});

say(`
Kerfpost is at   ${product.url}
Mail lands at    ${product.inboxUrl}

Sign in as (password: marrow-point-demo)
  builder    builder@kerfpost.example
  operator   operator@kerfpost.example
  clerk      clerk@kerfpost.example
  owner      owner@kerfpost.example

Cards on the pay page: 4242 4242 4242 4242 pays, 4000 0000 0000 0002 is declined; any later date, any three digits.
Everything is kept in ${directory}; delete that folder to begin again. Ctrl-C stops it all.`);

let stopping = false;
async function stop() {
  if (stopping) return;
  stopping = true;
  await product.stop();
  process.exit(0);
}
process.on("SIGINT", stop);
process.on("SIGTERM", stop);
