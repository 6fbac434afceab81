import { index, layout, prefix, type RouteConfig, route } from "@react-router/dev/routes";

/** The URL map. One block an area; a page lies in `routes/<area>/<page>.tsx`. */
export default [
  layout("routes/public/layout.tsx", [
    index("routes/public/home.tsx"),
    route("sign-in", "routes/public/sign-in.tsx"),
    route("sign-up", "routes/public/sign-up.tsx"),
    route("forgot-password", "routes/public/forgot-password.tsx"),
    route("reset-password", "routes/public/reset-password.tsx"),
    route("verify-email", "routes/public/verify-email.tsx"),
    route("invitation/:token", "routes/public/invitation.tsx"),
    route("terms", "routes/public/terms.tsx"),
    route("unsubscribe", "routes/public/unsubscribe.tsx"),
    route("api-guide", "routes/public/api-guide.tsx"),
  ]),

  layout("routes/account/layout.tsx", [
    ...prefix("account", [
      index("routes/account/profile.tsx"),
      route("addresses", "routes/account/addresses.tsx"),
      route("mail", "routes/account/mail.tsx"),
      route("password", "routes/account/password.tsx"),
      route("sessions", "routes/account/sessions.tsx"),
      route("keys", "routes/account/keys.tsx"),
    ]),
  ]),
  route("sign-out", "routes/account/sign-out.ts"),

  layout("routes/builder/layout.tsx", [
    ...prefix("orders", [
      index("routes/builder/orders.tsx"),
      route("new", "routes/builder/new-drawing.tsx"),
      route(":orderId", "routes/builder/order.tsx"),
      route(":orderId/checkout", "routes/builder/checkout.tsx"),
    ]),
  ]),

  layout("routes/shop/layout.tsx", [
    ...prefix("shop", [
      index("routes/shop/queue.tsx"),
      route("orders/:orderId", "routes/shop/order.tsx"),
      route("nest", "routes/shop/nest-desk.tsx"),
      route("nest/:nestId", "routes/shop/nest.tsx"),
      route("schedule", "routes/shop/schedule.tsx"),
      route("bench", "routes/shop/bench.tsx"),
      route("bench/orders/:orderId", "routes/shop/bench-order.tsx"),
      route("bench/sheets/:sheetId", "routes/shop/bench-sheet.tsx"),
    ]),
  ]),

  layout("routes/shipping/layout.tsx", [
    ...prefix("shipping", [
      index("routes/shipping/shipping-list.tsx"),
      route(":orderId", "routes/shipping/shipping-order.tsx"),
    ]),
  ]),

  /** Printed things and what the bench sends: no pages. */
  ...prefix("shipping/:orderId", [
    route("packing-list.pdf", "routes/shipping/packing-list.ts"),
    route("parcels/:parcelId/label.pdf", "routes/shipping/parcel-label.ts"),
    route("signature.svg", "routes/shipping/signature.ts"),
  ]),
  ...prefix("shop", [
    route("orders/:orderId/labels.pdf", "routes/shop/part-labels.ts"),
    route("sheets/:sheetId/labels.pdf", "routes/shop/sheet-labels.ts"),
    route("bench/acts", "routes/shop/bench-acts.ts"),
  ]),

  layout("routes/owner/layout.tsx", [
    ...prefix("shop/stock", [
      index("routes/owner/stock.tsx"),
      route("materials/:materialId", "routes/owner/material.tsx"),
      route("materials/:materialId/lots/new", "routes/owner/new-lot.tsx"),
      route("lots/:lotId", "routes/owner/lot.tsx"),
    ]),
    ...prefix("owner", [
      index("routes/owner/figures.tsx"),
      route("tools", "routes/owner/tools.tsx"),
      route("machines", "routes/owner/machines.tsx"),
      route("price-book", "routes/owner/price-book.tsx"),
      route("price-book/draft", "routes/owner/price-book-draft.tsx"),
      route("settings", "routes/owner/settings.tsx"),
      route("audit", "routes/owner/audit.tsx"),
      route("refunds", "routes/owner/refunds.tsx"),
      route("staff", "routes/owner/staff.tsx"),
      route("mail", "routes/owner/mail.tsx"),
    ]),
  ]),
  route("owner/audit.csv", "routes/owner/audit-csv.ts"),

  layout(
    "routes/api/layout.ts",
    prefix("api", [
      route("openapi.json", "routes/api/openapi.ts"),
      route("uploads", "routes/api/uploads.ts"),
      route("orders", "routes/api/orders.ts"),
      route("orders/:orderId", "routes/api/order.ts"),
      ...prefix("orders/:orderId", [
        route("status", "routes/api/status.ts"),
        route("price", "routes/api/price.ts"),
        route("events", "routes/api/events.ts"),
        route("geometry/:key", "routes/api/geometry.ts"),
        route("drawings/:drawingId", "routes/api/drawing.ts"),
        route("messages", "routes/api/messages.ts"),
        route("messages/read", "routes/api/thread-read.ts"),
        route("attachments/:attachmentId", "routes/api/attachment.ts"),
      ]),
      route("*", "routes/api/nowhere.ts"),
    ]),
  ),

  route("webhooks/payments", "routes/webhooks/payments.ts"),
] satisfies RouteConfig;
