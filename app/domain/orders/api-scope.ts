/** What a bearer key may be made for; each is a right to read, never more than its person may read. */
export const API_SCOPES = ["orders:read", "status:read", "events:read", "drawings:read"] as const;
export type ApiScope = (typeof API_SCOPES)[number];

/** What a scope opens, for whoever ticks it. */
export const API_SCOPE_WORDS: Readonly<Record<ApiScope, { readonly label: string; readonly opens: string }>> =
  {
    "orders:read": { label: "Orders", opens: "The list of orders, and one order with its parts and quote." },
    "status:read": { label: "Status", opens: "Where an order and its pieces stand, and what it waits for." },
    "events:read": { label: "Events", opens: "The live stream of what happens to an order." },
    "drawings:read": { label: "Drawings", opens: "The original drawing files of an order." },
  };

/** A scope that is none of these gives nothing. */
export const isApiScope = (value: unknown): value is ApiScope => API_SCOPES.some((scope) => scope === value);
