// Starts the product: `node app/server/launch.mjs` runs the build, with `--dev` the sources through Vite.
import { existsSync } from "node:fs";
import { createServer } from "node:http";
import process from "node:process";
import express from "express";

const developing = process.argv.includes("--dev");
process.env.NODE_ENV ??= developing ? "development" : "production";

async function developmentApp(server) {
  const { createServer: createVite } = await import("vite");
  const vite = await createVite({ server: { middlewareMode: true, hmr: { server } } });
  const outer = express();
  outer.use(vite.middlewares);
  const loaded = await vite.ssrLoadModule("./app/server/app.ts");
  outer.use(async (request, response, next) => {
    try {
      const { app } = await vite.ssrLoadModule("./app/server/app.ts");
      app(request, response, next);
    } catch (error) {
      if (error instanceof Error) vite.ssrFixStacktrace(error);
      next(error);
    }
  });
  return { ...loaded, app: outer, close: () => vite.close() };
}

async function builtApp() {
  const entry = new URL("../../build/server/index.js", import.meta.url);
  if (!existsSync(entry)) {
    process.stderr.write("There is no build yet: run `npm run build` first.\n");
    process.exit(1);
  }
  return { ...(await import(entry.href)), close: async () => undefined };
}

const server = createServer();
const { app, begin, environment, log, close } = developing ? await developmentApp(server) : await builtApp();
const work = await begin();
server.on("request", app);
server.listen(environment.PORT, environment.HOST, () => {
  process.stdout.write(`Kerfpost is at ${environment.APP_URL}\n`);
});

let stopping = false;
async function stop() {
  if (stopping) return;
  stopping = true;
  server.close();
  // Live pages hold their connections open: they reconnect elsewhere.
  server.closeAllConnections();
  await work.stop();
  await close();
  process.exit(0);
}
process.on("SIGINT", stop);
process.on("SIGTERM", stop);
process.on("unhandledRejection", (error) => {
  log.error(error, "unhandled rejection");
});
