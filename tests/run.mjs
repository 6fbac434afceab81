// Everything that `npm test` does, on a fresh machine too. Plain Node: it runs before anything is installed.
import { spawnSync } from "node:child_process";
import { existsSync, mkdtempSync, readFileSync, statSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";

const counts = { passed: 0, failed: 0 };
const results = mkdtempSync(path.join(tmpdir(), "kerfpost-test-"));

function run(title, command, args, env = {}) {
  process.stdout.write(`\n== ${title}\n`);
  const began = Date.now();
  const { status } = spawnSync(command, args, { stdio: "inherit", env: { ...process.env, ...env } });
  process.stdout.write(
    `== ${title}: ${status === 0 ? "ok" : "FAILED"} in ${((Date.now() - began) / 1000).toFixed(1)} s\n`,
  );
  return status === 0;
}

/** A step without a count of its own counts as one. */
function step(title, command, args, env) {
  if (run(title, command, args, env)) counts.passed += 1;
  else counts.failed += 1;
}

/** A test runner's own counts, read from its report; a run that reports nothing has failed. */
function suite(title, command, args, report, read, env) {
  const ok = run(title, command, args, env);
  let seen = { passed: 0, failed: 0 };
  if (existsSync(report)) seen = read(JSON.parse(readFileSync(report, "utf8")));
  if (!ok && seen.failed === 0) seen.failed = 1;
  if (ok && seen.passed === 0) seen.failed += 1;
  counts.passed += seen.passed;
  counts.failed += seen.failed;
}

function newer(a, b) {
  return !existsSync(b) || statSync(a).mtimeMs > statSync(b).mtimeMs;
}

function must(title, command, args, env) {
  if (run(title, command, args, env)) return;
  process.stdout.write(`\n${counts.passed} passed, ${counts.failed + 1} failed\n`);
  process.exit(1);
}

if (newer("package-lock.json", "node_modules/.package-lock.json")) must("install packages", "npm", ["ci"]);
const missing = [
  ["/usr/bin/chromium", "chromium"],
  ["/usr/bin/zbarimg", "zbar-tools"],
  ["/usr/bin/pdftoppm", "poppler-utils"],
].filter(([file]) => !existsSync(file));
if (missing.length > 0) {
  must("update package lists", "apt-get", ["update", "-qq"]);
  must(
    "install Debian packages",
    "apt-get",
    ["install", "-y", "-qq", "--no-install-recommends", ...missing.map(([, name]) => name)],
    { DEBIAN_FRONTEND: "noninteractive" },
  );
}

step("lint", "npx", ["biome", "ci", "."]);
must("route types", "npx", ["react-router", "typegen"]);
step("types", "npx", ["tsc", "--noEmit", "-p", "."]);

const vitestReport = path.join(results, "vitest.json");
suite(
  "unit and flow tests",
  "npx",
  ["vitest", "run", "--reporter=default", "--reporter=json", `--outputFile.json=${vitestReport}`],
  vitestReport,
  (json) => ({ passed: json.numPassedTests, failed: json.numFailedTests }),
);

step("build", "npm", ["run", "-s", "build"]);
const playwrightReport = path.join(results, "playwright.json");
suite(
  "browser tests",
  "npx",
  ["playwright", "test", "-c", "tests/e2e/playwright.config.ts"],
  playwrightReport,
  (json) => {
    if (json.stats.flaky > 0)
      process.stdout.write(`${json.stats.flaky} browser tests passed only at the second try: see above.\n`);
    return { passed: json.stats.expected + json.stats.flaky, failed: json.stats.unexpected };
  },
  { PLAYWRIGHT_JSON_OUTPUT_NAME: playwrightReport },
);

process.stdout.write(`\n${counts.passed} passed, ${counts.failed} failed\n`);
process.exit(counts.failed === 0 ? 0 : 1);
