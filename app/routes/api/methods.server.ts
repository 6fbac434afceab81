import type { MiddlewareFunction } from "react-router";

/** Middleware of a route that takes only these methods: 405 with `Allow` for any other. HEAD goes where GET goes. */
export function only(...methods: readonly ("GET" | "POST")[]): MiddlewareFunction<Response> {
  const taken: readonly string[] = methods.includes("GET") ? [...methods, "HEAD"] : methods;
  return ({ request }, next) =>
    taken.includes(request.method)
      ? next()
      : Promise.resolve(
          new Response(`${request.method} is not taken here.`, {
            status: 405,
            headers: { Allow: taken.join(", ") },
          }),
        );
}
