import { fileURLToPath } from "node:url";
import { reactRouter } from "@react-router/dev/vite";
import tailwindcss from "@tailwindcss/vite";
import { defineConfig } from "vite";
import { nodeWorker } from "./app/jobs/node-worker-plugin";

const testing = process.env.VITEST !== undefined;

export default defineConfig({
  plugins: [nodeWorker(), ...(testing ? [] : [tailwindcss(), reactRouter()])],
  resolve: {
    alias: {
      "~": fileURLToPath(new URL("./app", import.meta.url)),
      "~fakes": fileURLToPath(new URL("./fakes", import.meta.url)),
    },
  },
  environments: {
    ssr: { build: { rollupOptions: { input: "./app/server/app.ts" } } },
  },
  server: { host: "127.0.0.1" },
});
