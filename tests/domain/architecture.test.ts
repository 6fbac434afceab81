import { execFileSync } from "node:child_process";
import { readdirSync } from "node:fs";
import { expect, test } from "vitest";

interface Report {
  summary: {
    error: number;
    totalCruised: number;
    violations: { rule: { name: string }; from: string; to: string }[];
  };
}

test("imports run one way through the house", () => {
  const report: Report = JSON.parse(
    execFileSync(
      "node_modules/.bin/depcruise",
      ["--config", ".dependency-cruiser.cjs", "--output-type", "json", "app", "fakes"],
      { encoding: "utf8", maxBuffer: 256 * 1024 * 1024 },
    ),
  );
  expect(report.summary.violations.map(({ rule, from, to }) => `${rule.name}: ${from} -> ${to}`)).toEqual([]);
  expect(report.summary.totalCruised).toBeGreaterThan(50);
});

test("the top level of the repository holds what it should and nothing else", () => {
  const allowed = new Set([
    "app",
    "drizzle",
    "fakes",
    "public",
    "tests",
    "package.json",
    "package-lock.json",
    "tsconfig.json",
    "vite.config.ts",
    "react-router.config.ts",
    "drizzle.config.ts",
    "README.md",
    "DEVELOPERS.md",
    "node_modules",
    "build",
    "test-results",
    "coverage",
  ]);
  const strangers = readdirSync(".").filter((name) => !name.startsWith(".") && !allowed.has(name));
  expect(strangers).toEqual([]);
});
