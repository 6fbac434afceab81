import { randomBytes } from "node:crypto";
import * as build from "virtual:react-router/server-build";
import { createRequestHandler } from "@react-router/express";
import compression from "compression";
import express, { type NextFunction, type Request, type Response } from "express";
import helmet from "helmet";
import { pino } from "pino";
import { pinoHttp } from "pino-http";
import { RouterContextProvider } from "react-router";
import { CLIENT_ADDRESS_HEADER } from "~/auth/auth.server";
import { closeDatabase } from "~/db/client.server";
import { migrateDatabase } from "~/db/migrate.server";
import { closePool } from "~/jobs/pool.server";
import { startRunners } from "~/jobs/runners.server";
import { environment } from "./environment.server";
import { nonceContext } from "./nonce";

const log = pino({ level: environment.LOG_LEVEL, base: null });
const secure = environment.APP_URL.startsWith("https:");
const YEAR_SECONDS = 31_536_000;

const nonces = new WeakMap<Request, string>();

function contentPolicy(request: Request, response: Response, next: NextFunction): void {
  const nonce = randomBytes(16).toString("base64url");
  nonces.set(request, nonce);
  const policy = helmet({
    contentSecurityPolicy: {
      directives: {
        "default-src": ["'self'"],
        "script-src": ["'self'", `'nonce-${nonce}'`],
        "style-src": ["'self'"],
        "img-src": ["'self'", "data:", "blob:"],
        "font-src": ["'self'"],
        "connect-src": ["'self'"],
        "form-action": ["'self'", environment.STRIPE_API_URL, "https://checkout.stripe.com"],
        "frame-ancestors": ["'none'"],
        "object-src": ["'none'"],
        "base-uri": ["'self'"],
        "upgrade-insecure-requests": null,
      },
    },
    strictTransportSecurity: secure,
    crossOriginOpenerPolicy: secure,
    originAgentCluster: secure,
    referrerPolicy: { policy: "same-origin" },
  });
  policy(request, response, next);
}

function createApp(): express.Express {
  const app = express();
  app.disable("x-powered-by");
  app.set("trust proxy", environment.TRUSTED_PROXIES);
  app.use((request, _response, next) => {
    request.headers[CLIENT_ADDRESS_HEADER] = request.ip ?? "unknown";
    next();
  });
  app.get("/healthz", (_request, response) => {
    response.type("text").send("ok");
  });
  app.use(compression());
  if (environment.NODE_ENV === "production") {
    app.use(
      "/assets",
      express.static("build/client/assets", { immutable: true, maxAge: YEAR_SECONDS * 1000 }),
    );
    app.use(express.static("build/client", { maxAge: "1h", index: false }));
    app.use(contentPolicy);
  }
  app.use(
    pinoHttp({
      logger: log,
      autoLogging: { ignore: ({ url = "" }) => url.startsWith("/assets/") || url.startsWith("/@") },
      serializers: {
        req: ({ method, url }: { method: string; url: string }) => ({
          method,
          url: url.replace(/(token=|\/invitation\/)[^&?/]*/g, "$1…"),
        }),
        res: ({ statusCode }: { statusCode: number }) => ({ statusCode }),
      },
      customLogLevel: (_request, { statusCode }, error) => (error || statusCode >= 500 ? "error" : "debug"),
    }),
  );
  app.use(
    createRequestHandler({
      build,
      mode: environment.NODE_ENV,
      getLoadContext(request) {
        const context = new RouterContextProvider();
        context.set(nonceContext, nonces.get(request));
        return context;
      },
    }),
  );
  return app;
}

/** Migrates the database and starts this process's runners of jobs and mail; resolves with how to stop them. */
export async function begin(): Promise<{ stop(): Promise<void> }> {
  await migrateDatabase();
  const runners = environment.RUN_JOBS ? startRunners() : undefined;
  return {
    async stop() {
      await runners?.stop();
      closePool();
      closeDatabase();
    },
  };
}

export const app = createApp();
export { environment, log };
