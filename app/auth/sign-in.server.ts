import { APIError } from "better-auth/api";
import { auth } from "./auth.server";

export type SignedIn = { readonly ok: true; readonly headers: Headers } | { readonly ok: false };

/** Begins a session; `headers` carry its cookie to the reply. */
export async function signInWithPassword(
  request: Request,
  { email, password }: { email: string; password: string },
): Promise<SignedIn> {
  try {
    const { headers } = await auth().api.signInEmail({
      body: { email, password },
      headers: request.headers,
      returnHeaders: true,
    });
    return { ok: true, headers };
  } catch (error) {
    if (isRefusal(error)) return { ok: false };
    throw error;
  }
}

/** Whether the sign-in library refused what was sent, rather than failed. */
export const isRefusal = (error: unknown): boolean => error instanceof APIError && error.statusCode < 500;
