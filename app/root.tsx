import robotoMono from "@fontsource/roboto-mono/files/roboto-mono-latin-400-normal.woff2?url";
import publicSans from "@fontsource-variable/public-sans/files/public-sans-latin-wght-normal.woff2?url";
import type { ReactNode } from "react";
import { Links, Meta, Outlet, Scripts, ScrollRestoration, useRouteLoaderData } from "react-router";
import type { Route } from "./+types/root";
import "./app.css";
import { sessionMiddleware } from "./auth/session.server";
import { AppShell } from "./components/app-shell";
import { ErrorPanel } from "./components/error-panel";
import { QueryProvider } from "./components/query-provider";

export const middleware: Route.MiddlewareFunction[] = [sessionMiddleware];

export const links: Route.LinksFunction = () => [
  { rel: "icon", href: "/icon.svg", type: "image/svg+xml" },
  ...[publicSans, robotoMono].map((href) => ({
    rel: "preload",
    href,
    as: "font" as const,
    type: "font/woff2",
    crossOrigin: "anonymous" as const,
  })),
];

export const meta: Route.MetaFunction = () => [{ title: "Kerfpost" }];

/** The colours the reader chose, from the cookie that the theme switch writes; null follows the device. */
export function loader({ request }: Route.LoaderArgs) {
  const chosen = /(?:^|;\s*)theme=(light|dark)(?:;|$)/.exec(request.headers.get("cookie") ?? "")?.[1];
  return { theme: chosen ?? null };
}

export function Layout({ children }: { readonly children: ReactNode }) {
  const facts = useRouteLoaderData<typeof loader>("root");
  return (
    <html lang="en" data-theme={facts?.theme ?? undefined} suppressHydrationWarning>
      <head>
        <meta charSet="utf-8" />
        <meta name="viewport" content="width=device-width, initial-scale=1" />
        <meta name="color-scheme" content="light dark" />
        <Meta />
        <Links />
      </head>
      <body>
        {children}
        <ScrollRestoration />
        <Scripts />
      </body>
    </html>
  );
}

export default function Root() {
  return (
    <QueryProvider>
      <Outlet />
    </QueryProvider>
  );
}

export function ErrorBoundary({ error }: Route.ErrorBoundaryProps) {
  return (
    <AppShell nav={[]} who={null} width="read">
      <ErrorPanel error={error} />
    </AppShell>
  );
}
