/** A JSON answer that is the caller's alone. */
export const answer = (body: object, headers: Readonly<Record<string, string>> = {}): Response =>
  Response.json(body, {
    headers: { "Cache-Control": "private, no-store", Vary: "Authorization, Cookie", ...headers },
  });
