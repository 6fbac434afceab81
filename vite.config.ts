/// <reference types="vitest/config" />
import { fileURLToPath } from "node:url";
import { reactRouter } from "@react-router/dev/vite";
import tailwindcss from "@tailwindcss/vite";
import { defineConfig } from "vite";
import { nodeWorker } from "./app/jobs/node-worker-plugin.ts";

const testing = process.env.VITEST !== undefined;

export default defineConfig({
  plugins: [nodeWorker(), ...(testing ? [] : [tailwindcss(), reactRouter()])],
  resolve: {
    alias: {
      "~": fileURLToPath(new URL("./app", import.meta.url)),
      "~fakes": fileURLToPath(new URL("./fakes", import.meta.url)),
    },
  },
  build: { assetsInlineLimit: 0 },
  environments: {
    ssr: { build: { rollupOptions: { input: "./app/server/app.ts" } } },
  },
  server: { host: "127.0.0.1" },
  test: {
    maxWorkers: 2,
    setupFiles: ["./tests/support/loud-console.ts"],
    projects: [
      {
        extends: true,
        test: { name: "domain", include: ["tests/domain/**/*.test.{ts,tsx}"], testTimeout: 60_000 },
      },
      {
        extends: true,
        test: {
          name: "flows",
          include: ["tests/flows/**/*.test.{ts,tsx}", "tests/routes/**/*.test.{ts,tsx}"],
          testTimeout: 60_000,
          hookTimeout: 60_000,
          pool: "forks",
        },
      },
    ],
  },
});
