import type { DemoOrder } from "./demo-ids";

/** Who gets what from every address: one row a route of the URL map, a status for each role and method. */

export const ROLES = ["visitor", "builder", "another builder", "operator", "clerk", "owner"] as const;
export type AskingRole = (typeof ROLES)[number];

/** A status; `sign-in` is being sent to sign in; null is not asked, because it would do something. */
export type Seen = number | "sign-in" | null;
export type SeenByRole = Readonly<Record<AskingRole, Seen>>;

export interface AccessRow {
  /** As in the URL map. */
  readonly route: string;
  readonly get: SeenByRole;
  readonly post: SeenByRole;
  /** What is posted: a form that no page sends, or a body of JSON. */
  readonly body?: { readonly form: Readonly<Record<string, string>> } | { readonly json: object };
  /** The order that stands in the address; one that is cut if not said otherwise. */
  readonly order?: DemoOrder;
  /** An answer that does not end: only its head is read. */
  readonly streams?: boolean;
  /** The page is an index: what is posted to it goes to `?index`. */
  readonly index?: boolean;
}

const seen = (...statuses: readonly [Seen, Seen, Seen, Seen, Seen, Seen]): SeenByRole => {
  const [visitor, builder, another, operator, clerk, owner] = statuses;
  return { visitor, builder, "another builder": another, operator, clerk, owner };
};

const everybody = (status: Seen) => seen(status, status, status, status, status, status);
/** Pages: a visitor is sent to sign in, the wrong role is told that it is not theirs. */
const people = (status: Seen) => seen("sign-in", status, status, status, status, status);
const builders = (status: Seen) => seen("sign-in", status, status, 403, 403, 403);
const ownOrder = (status: Seen) => seen("sign-in", status, 404, 403, 403, 403);
const staff = (status: Seen) => seen("sign-in", 403, 403, status, status, status);
const floor = (status: Seen) => seen("sign-in", 403, 403, status, 403, status);
const desk = (status: Seen) => seen("sign-in", 403, 403, 403, status, status);
const owner = (status: Seen) => seen("sign-in", 403, 403, 403, 403, status);
/** The API: a visitor is told 401; an order is its builder's and the shop's. */
const apiPeople = (status: Seen) => seen(401, status, status, status, status, status);
const apiBuilders = (status: Seen) => seen(401, status, status, 403, 403, 403);
const apiOrder = (status: Seen) => seen(401, status, 404, status, status, status);
/** No act is posted here; where a page has an error boundary of its own, its frame sends a visitor to sign in first. */
const NOT_TAKEN = everybody(405);
const NO_ACT = people(405);
/** Only for who is not signed in yet; the others are led on. */
const comingIn = (status: Seen) => seen(status, 302, 302, 302, 302, 302);

export const ROWS: readonly AccessRow[] = [
  // public
  { route: "/", index: true, get: comingIn(200), post: NOT_TAKEN },
  { route: "/sign-in", get: comingIn(200), post: comingIn(400) },
  { route: "/sign-up", get: comingIn(200), post: comingIn(400) },
  { route: "/forgot-password", get: everybody(200), post: everybody(400) },
  { route: "/reset-password", get: everybody(200), post: everybody(400) },
  { route: "/verify-email", get: everybody(200), post: people(302) },
  { route: "/invitation/:token", get: everybody(410), post: seen(400, 410, 410, 410, 410, 410) },
  { route: "/terms", get: everybody(200), post: NOT_TAKEN },
  { route: "/unsubscribe", get: everybody(400), post: everybody(400) },
  { route: "/api-guide", get: everybody(200), post: NOT_TAKEN },

  // account
  { route: "/account", index: true, get: people(200), post: people(400) },
  { route: "/account/addresses", get: people(200), post: people(400) },
  { route: "/account/mail", get: people(200), post: people(400), body: { form: { wanted: "none" } } },
  { route: "/account/password", get: people(200), post: people(400) },
  { route: "/account/sessions", get: people(200), post: people(302) },
  { route: "/account/keys", get: people(200), post: people(400) },
  { route: "/sign-out", get: everybody(302), post: seen(302, null, null, null, null, null) },

  // builder
  { route: "/orders", index: true, get: builders(200), post: NO_ACT },
  { route: "/orders/new", get: builders(200), post: NO_ACT },
  { route: "/orders/:orderId", get: ownOrder(200), post: ownOrder(400) },
  // A checkout that is none leads back to the order.
  { route: "/orders/:orderId/checkout", get: ownOrder(302), post: ownOrder(302) },

  // shop
  { route: "/shop", index: true, get: staff(200), post: floor(422) },
  { route: "/shop/orders/:orderId", get: staff(200), post: staff(422) },
  { route: "/shop/nest", get: floor(200), post: floor(422) },
  { route: "/shop/nest/:nestId", get: floor(200), post: floor(422) },
  { route: "/shop/schedule", get: floor(200), post: floor(422) },
  { route: "/shop/bench", get: staff(200), post: NO_ACT },
  { route: "/shop/bench/orders/:orderId", get: staff(200), post: NO_ACT },
  { route: "/shop/bench/sheets/:sheetId", get: staff(200), post: NO_ACT },
  { route: "/shop/bench/acts", get: staff(400), post: floor(400), body: { json: { kind: "none" } } },
  { route: "/shop/orders/:orderId/labels.pdf", get: staff(200), post: NOT_TAKEN },
  { route: "/shop/sheets/:sheetId/labels.pdf", get: staff(200), post: NOT_TAKEN },

  // shipping
  { route: "/shipping", index: true, get: staff(200), post: NO_ACT },
  { route: "/shipping/:orderId", get: staff(200), post: desk(422) },
  { route: "/shipping/:orderId/packing-list.pdf", order: "shipped", get: staff(200), post: NOT_TAKEN },
  {
    route: "/shipping/:orderId/parcels/:parcelId/label.pdf",
    order: "shipped",
    get: staff(200),
    post: NOT_TAKEN,
  },
  // Nobody has signed for it.
  { route: "/shipping/:orderId/signature.svg", get: staff(404), post: NOT_TAKEN },

  // owner
  { route: "/shop/stock", index: true, get: floor(200), post: NOT_TAKEN },
  { route: "/shop/stock/materials/:materialId", get: floor(200), post: floor(400) },
  { route: "/shop/stock/materials/:materialId/lots/new", get: floor(200), post: floor(400) },
  { route: "/shop/stock/lots/:lotId", get: floor(200), post: floor(400) },
  { route: "/owner", index: true, get: owner(200), post: NOT_TAKEN },
  { route: "/owner/tools", get: owner(200), post: owner(400) },
  { route: "/owner/machines", get: owner(200), post: owner(400) },
  // Whatever is posted starts a draft.
  { route: "/owner/price-book", get: owner(200), post: owner(null) },
  // Whether there is a draft depends on what the owner did before.
  { route: "/owner/price-book/draft", get: owner(null), post: owner(null) },
  { route: "/owner/settings", get: owner(200), post: owner(400) },
  { route: "/owner/audit", get: owner(200), post: NOT_TAKEN },
  { route: "/owner/audit.csv", get: owner(200), post: NOT_TAKEN },
  { route: "/owner/refunds", get: owner(200), post: NO_ACT },
  { route: "/owner/staff", get: owner(200), post: owner(400) },
  { route: "/owner/mail", get: owner(200), post: owner(400) },

  // api
  { route: "/api/openapi.json", get: everybody(200), post: NOT_TAKEN },
  { route: "/api/uploads", get: NOT_TAKEN, post: apiBuilders(400) },
  { route: "/api/orders", get: apiPeople(200), post: NOT_TAKEN },
  { route: "/api/orders/:orderId", get: apiOrder(200), post: NOT_TAKEN },
  { route: "/api/orders/:orderId/status", get: apiOrder(200), post: NOT_TAKEN },
  {
    route: "/api/orders/:orderId/price",
    get: NOT_TAKEN,
    post: apiOrder(400),
    body: { json: { content: "none" } },
  },
  { route: "/api/orders/:orderId/events", get: apiOrder(200), post: NOT_TAKEN, streams: true },
  { route: "/api/orders/:orderId/geometry/:key", get: apiOrder(200), post: NOT_TAKEN },
  { route: "/api/orders/:orderId/drawings/:drawingId", get: apiOrder(200), post: NOT_TAKEN },
  { route: "/api/orders/:orderId/messages", get: apiOrder(200), post: apiOrder(400) },
  { route: "/api/orders/:orderId/messages/read", get: NOT_TAKEN, post: apiOrder(400) },
  { route: "/api/orders/:orderId/attachments/:attachmentId", get: apiOrder(404), post: NOT_TAKEN },
  { route: "/api/*", get: everybody(404), post: everybody(404) },

  // other services
  { route: "/webhooks/payments", get: NOT_TAKEN, post: everybody(400) },
];
