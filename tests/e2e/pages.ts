import { createClient } from "@libsql/client";
import type { Page } from "@playwright/test";
import { DEMO_PASSWORD } from "~/db/seed/people";

export const PEOPLE = ["visitor", "builder", "operator", "clerk", "owner"] as const;
export type WhoLooks = (typeof PEOPLE)[number];

/** A page somebody can open; `find` names an order of the demonstration whose id goes into the address. */
export interface ShownPage {
  readonly name: string;
  readonly path: string;
  readonly find?: string;
}

const ORDER_PAGES = (base: string, names: readonly string[]): ShownPage[] =>
  names.map((find) => ({ name: `order, ${find.toLowerCase()}`, path: `${base}/:orderId`, find }));

/** Every page of every role, with orders of the demonstration in each state worth seeing. */
export const PAGES: Readonly<Record<WhoLooks, readonly ShownPage[]>> = {
  visitor: [
    { name: "home", path: "/" },
    { name: "terms", path: "/terms" },
    { name: "API", path: "/api-guide" },
    { name: "sign in", path: "/sign-in" },
    { name: "sign up", path: "/sign-up" },
    { name: "forgot password", path: "/forgot-password" },
    { name: "reset password", path: "/reset-password?token=none" },
    { name: "verify e-mail", path: "/verify-email?token=none" },
    { name: "invitation", path: "/invitation/none" },
    { name: "not found", path: "/nowhere" },
  ],
  builder: [
    { name: "orders", path: "/orders" },
    { name: "new drawing", path: "/orders/new" },
    ...ORDER_PAGES("/orders", [
      "Galley doors, starboard",
      "Trial box, bowtie corner",
      "Galley carcass, port side",
      "Roof fan panel",
    ]),
    { name: "account", path: "/account" },
    { name: "addresses", path: "/account/addresses" },
    { name: "password", path: "/account/password" },
    { name: "sessions", path: "/account/sessions" },
    { name: "mail choices", path: "/account/mail" },
    { name: "API keys", path: "/account/keys" },
    { name: "no such order", path: "/orders/none" },
  ],
  operator: [
    { name: "queue", path: "/shop" },
    ...ORDER_PAGES("/shop/orders", [
      "Galley carcass, port side",
      "Cockpit locker doors",
      "Kiosk menu frame",
      "Bunk side, pair",
      "Reading room counter",
    ]),
    { name: "bench", path: "/shop/bench" },
    { name: "bench, an order", path: "/shop/bench/orders/:orderId", find: "Cash drawer fronts" },
    { name: "lots", path: "/shop/stock" },
    { name: "nest desk", path: "/shop/nest" },
    { name: "schedule", path: "/shop/schedule" },
    { name: "shipping", path: "/shipping" },
  ],
  clerk: [
    { name: "queue", path: "/shop" },
    { name: "shipping", path: "/shipping" },
    { name: "ship an order", path: "/shipping/:orderId", find: "Library trailer, shelf run" },
    { name: "not allowed", path: "/owner/staff" },
  ],
  owner: [
    { name: "queue", path: "/shop" },
    ...ORDER_PAGES("/shop/orders", ["Serving trays, first dozen", "Window frame, not needed"]),
    { name: "staff", path: "/owner/staff" },
    { name: "refunds", path: "/owner/refunds" },
    { name: "figures", path: "/owner" },
    { name: "tools", path: "/owner/tools" },
    { name: "machines", path: "/owner/machines" },
    { name: "price book", path: "/owner/price-book" },
    { name: "settings", path: "/owner/settings" },
    { name: "audit", path: "/owner/audit" },
    { name: "mail", path: "/owner/mail" },
  ],
};

export async function signIn(page: Page, url: string, who: Exclude<WhoLooks, "visitor">): Promise<void> {
  await page.goto(`${url}/sign-in`);
  await page.getByLabel("E-mail").fill(`${who}@kerfpost.example`);
  await page.getByLabel("Password").fill(DEMO_PASSWORD);
  await page.getByRole("button", { name: "Sign in" }).click();
  await page.waitForURL((address) => !address.pathname.startsWith("/sign-in"));
}

/** The address of a page, its order found by name in the database that the product runs on. */
export async function addressOf(url: string, { path, find }: ShownPage): Promise<string> {
  if (!find) return `${url}${path}`;
  return `${url}${path.replace(":orderId", await orderIdOf(find))}`;
}

/** Id of the demonstration's order of this name. */
export async function orderIdOf(name: string): Promise<string> {
  const database = createClient({ url: process.env.KERFPOST_DATABASE_URL ?? "" });
  try {
    const { rows } = await database.execute({ sql: "select id from orders where name = ?", args: [name] });
    if (rows.length !== 1) throw new Error(`${rows.length} orders are called ${name}.`);
    return String(rows[0]?.id);
  } finally {
    database.close();
  }
}
