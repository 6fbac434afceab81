import { PassThrough } from "node:stream";
import { createReadableStreamFromReadable } from "@react-router/node";
import { isbot } from "isbot";
import { renderToPipeableStream } from "react-dom/server";
import { type EntryContext, type RouterContextProvider, ServerRouter } from "react-router";
import { nonceContext } from "./server/nonce";

export const streamTimeout = 10_000;

/** Streams a page; robots get it whole. */
export default function handleRequest(
  request: Request,
  status: number,
  headers: Headers,
  routerContext: EntryContext,
  loadContext: RouterContextProvider,
): Promise<Response> {
  const nonce = loadContext.get(nonceContext);
  const whole = routerContext.isSpaMode || isbot(request.headers.get("user-agent") ?? "");
  return new Promise((resolve, reject) => {
    let responseStatus = status;
    let sent = false;
    const send = () => {
      sent = true;
      const body = new PassThrough();
      headers.set("Content-Type", "text/html");
      resolve(new Response(createReadableStreamFromReadable(body), { headers, status: responseStatus }));
      pipe(body);
    };
    const { pipe, abort } = renderToPipeableStream(
      <ServerRouter context={routerContext} url={request.url} nonce={nonce} />,
      {
        nonce,
        ...(whole ? { onAllReady: send } : { onShellReady: send }),
        onShellError: reject,
        onError(error) {
          responseStatus = 500;
          if (sent) console.error(error);
        },
      },
    );
    setTimeout(abort, streamTimeout + 1_000).unref();
  });
}

/** Errors that nobody threw on purpose; a request that was given up is none. */
export function handleError(error: unknown, { request }: { request: Request }): void {
  if (!request.signal.aborted) console.error(error);
}
