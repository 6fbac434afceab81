import type { z } from "zod";
import type { ApiScope } from "~/domain/orders";
import { orderListQuerySchema, orderPageSchema, orderSchema, statusSchema } from "./answers";

/** One thing the API does, as its document and its guide tell it. All of them read. */
export interface ApiOperation {
  readonly id: string;
  /** As OpenAPI writes it. */
  readonly path: `/api/${string}`;
  readonly summary: string;
  readonly description: string;
  /** What a key must have been made for. */
  readonly scope: ApiScope;
  readonly query?: z.ZodObject;
  readonly headers?: readonly { readonly name: string; readonly description: string }[];
  readonly answer:
    | { readonly kind: "json"; readonly name: string; readonly schema: z.ZodType; readonly words: string }
    | { readonly kind: "other"; readonly mediaType: string; readonly words: string };
  /** Statuses of its problems, beside those that every address can answer. */
  readonly problems: readonly number[];
  /** The end of a curl line that tries it. */
  readonly example: string;
}

/** Problems of every address that takes a key. */
export const COMMON_PROBLEMS = [401, 403, 405, 429, 500] as const;

export const PATH_PARAMETERS: Readonly<Record<string, string>> = {
  orderId: "The order's id, as in its address; not its reference.",
  drawingId: "The drawing's id, from the order's answer.",
};

export const API_OPERATIONS: readonly ApiOperation[] = [
  {
    id: "listOrders",
    path: "/api/orders",
    summary: "The orders",
    description:
      "A builder's own orders, or all of them for the shop's people, newest first. The address of the page behind stands in next, and in the Link header as rel=next.",
    scope: "orders:read",
    query: orderListQuerySchema,
    answer: { kind: "json", name: "OrderPage", schema: orderPageSchema, words: "A page of orders." },
    problems: [422],
    example: "/api/orders?stage=nested,cut&limit=10",
  },
  {
    id: "readOrder",
    path: "/api/orders/{orderId}",
    summary: "One order",
    description: "The order with its parts, its quote line by line, its drawings and its parcels.",
    scope: "orders:read",
    answer: { kind: "json", name: "Order", schema: orderSchema, words: "The order." },
    problems: [404],
    example: "/api/orders/ORDER",
  },
  {
    id: "readStatus",
    path: "/api/orders/{orderId}/status",
    summary: "Where an order stands",
    description:
      "Its stage, the stage of every piece, how many pieces reached which stage, the promised day, and what it waits for.",
    scope: "status:read",
    answer: { kind: "json", name: "Status", schema: statusSchema, words: "Where it stands." },
    problems: [404],
    example: "/api/orders/ORDER/status",
  },
  {
    id: "followEvents",
    path: "/api/orders/{orderId}/events",
    summary: "What happens to an order, live",
    description:
      "Server-sent events: id, event (stage, pieces, payment, reading, quote, message, nest, run or shipping) and data, a JSON object with at least the instant in at. Without Last-Event-ID the stream begins with what happens from now on. It ends after ten minutes; ask again with the last id, as an EventSource does by itself.",
    scope: "events:read",
    headers: [
      {
        name: "Last-Event-ID",
        description: "The last event that was received: the stream goes on behind it.",
      },
    ],
    answer: { kind: "other", mediaType: "text/event-stream", words: "The stream." },
    problems: [404],
    example: "/api/orders/ORDER/events",
  },
  {
    id: "downloadDrawing",
    path: "/api/orders/{orderId}/drawings/{drawingId}",
    summary: "An original drawing",
    description: "The bytes as they were uploaded.",
    scope: "drawings:read",
    answer: { kind: "other", mediaType: "application/octet-stream", words: "The file." },
    problems: [404],
    example: "/api/orders/ORDER/drawings/DRAWING",
  },
];

/** Names between braces in an operation's path. */
export const pathParametersOf = ({ path }: ApiOperation): string[] =>
  [...path.matchAll(/\{(\w+)\}/g)].map(([, name = ""]) => name);
