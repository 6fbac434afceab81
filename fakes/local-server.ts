/** What every fake's HTTP side is made of: a server on 127.0.0.1, bodies with a limit, answers, escaped HTML. */
import { createServer, type IncomingMessage, type Server, type ServerResponse } from "node:http";
import type { AddressInfo } from "node:net";

/** A request that the fake does not know; tests assert that there was none. */
export interface Unexpected {
  method: string;
  path: string;
  why: string;
}

/** What every started fake offers. `unexpected` grows as unknown requests arrive. */
export interface RunningFake {
  url: string;
  port: number;
  unexpected: Unexpected[];
  stop(): Promise<void>;
}

export interface ListenOptions {
  /** 0 takes any free port. */
  port: number;
  host?: "127.0.0.1" | undefined;
}

type Handler = (request: IncomingMessage, response: ServerResponse) => Promise<void>;

/** Listens and answers with the base URL, the port and a stop that also closes idle and open sockets. */
export async function listen(handler: Handler, options: ListenOptions) {
  const host = options.host ?? "127.0.0.1";
  const server = createServer((request, response) => {
    // Browsers ask for it unbidden; no fake has one.
    if (request.url === "/favicon.ico") return send(response, 404, "text/plain", "");
    handler(request, response).catch((error: unknown) => {
      console.error("A local stand-in failed:", error);
      if (response.headersSent) response.destroy();
      else send(response, 500, "text/plain; charset=utf-8", "The local stand-in failed; see its terminal.");
    });
  });
  await new Promise<void>((resolve, reject) => {
    server.once("error", reject);
    server.listen(options.port, host, resolve);
  });
  const { port } = server.address() as AddressInfo;
  return { url: `http://${host}:${port}`, port, stop: () => close(server) };
}

function close(server: Server): Promise<void> {
  return new Promise((resolve, reject) => {
    server.close((error) => (error ? reject(error) : resolve()));
    server.closeAllConnections();
  });
}

/** Reads a whole body as text. Throws past `limit` bytes. */
export async function readBody(request: IncomingMessage, limit = 1_000_000): Promise<string> {
  const chunks: Buffer[] = [];
  let size = 0;
  for await (const chunk of request) {
    size += (chunk as Buffer).length;
    if (size > limit) throw new Error(`A body of more than ${limit} bytes was sent to a local stand-in.`);
    chunks.push(chunk as Buffer);
  }
  return Buffer.concat(chunks).toString("utf8");
}

export function send(response: ServerResponse, status: number, contentType: string, body: string) {
  response.writeHead(status, { "Content-Type": contentType, "Content-Length": Buffer.byteLength(body) });
  response.end(body);
}

export function sendJson(response: ServerResponse, status: number, body: unknown) {
  send(response, status, "application/json", JSON.stringify(body));
}

export function sendHtml(response: ServerResponse, status: number, body: string) {
  send(response, status, "text/html; charset=utf-8", body);
}

export function redirect(response: ServerResponse, location: string) {
  response.writeHead(303, { Location: location, "Content-Length": 0 });
  response.end();
}

/** Text made safe inside HTML text and double-quoted attributes. */
export function escapeHtml(text: string): string {
  return text
    .replaceAll("&", "&amp;")
    .replaceAll("<", "&lt;")
    .replaceAll(">", "&gt;")
    .replaceAll('"', "&quot;");
}
