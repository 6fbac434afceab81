import type { ReactNode } from "react";
import { isRouteErrorResponse } from "react-router";
import { ButtonLink } from "./button-link";

interface ErrorWords {
  readonly title: string;
  readonly words: string;
}

const WORDS: Readonly<Record<number, ErrorWords>> = {
  400: {
    title: "That could not be read",
    words: "Something in the request is not as it should be. Go back and try it again.",
  },
  401: {
    title: "Sign in first",
    words: "This page belongs to somebody. Sign in, and it opens if it is yours.",
  },
  403: {
    title: "Not yours to open",
    words: "Your sign-in does not reach this page. Ask the shop if you think it should.",
  },
  404: {
    title: "Nothing stands here",
    words: "The page was moved, or it never was. The number in the address may be mistyped.",
  },
  405: {
    title: "That cannot be done here",
    words: "This address does not take that act. Go back and use the page's own buttons.",
  },
  409: {
    title: "Somebody was quicker",
    words: "This was changed while you had it open. Load the page again to see how it stands now.",
  },
  410: { title: "No longer kept", words: "What stood here has run out or was removed." },
  413: {
    title: "Too large to take in",
    words:
      "The file is over the limit. Purge unused blocks and layers in your CAD program, or send it in parts.",
  },
  429: { title: "Slow down a moment", words: "Too many tries from this place. Wait a minute, then go on." },
  503: {
    title: "Closed for a moment",
    words: "The desk is being worked on. Nothing is lost; try again in a minute.",
  },
};
const FAULT: ErrorWords = {
  title: "This one is our fault",
  words:
    "The desk could not finish that. Nothing you sent is lost, and the fault has been noted. Try once more; if it stays, write to the shop.",
};

interface ErrorPanelProps {
  /** What an ErrorBoundary was given. Only its status is read, and words that were written for a reader. */
  readonly error: unknown;
  /** Where to go on from here. */
  readonly children?: ReactNode;
}

/**
 * The face of every error boundary. A thrown `data({ words }, { status })` may carry its own sentence; anything
 * else is answered by its status alone, so that no stack or inner message reaches a page.
 */
export function ErrorPanel({ error, children }: ErrorPanelProps) {
  const status = isRouteErrorResponse(error) ? error.status : 500;
  const { title, words } = WORDS[status] ?? (status < 500 ? WORDS[400] : undefined) ?? FAULT;
  return (
    <div className="mx-auto max-w-xl py-16">
      <p className="measure text-small text-soft">{status}</p>
      <h1 className="text-title font-semibold">{title}</h1>
      <p className="mt-2 text-body">{ownWords(error) ?? words}</p>
      <div className="mt-6 flex flex-wrap gap-2">
        {children ?? (
          <ButtonLink to="/" variant="plain">
            To the first page
          </ButtonLink>
        )}
      </div>
    </div>
  );
}

/** The sentence written for the reader, where the thrower gave one. */
function ownWords(error: unknown): string | null {
  if (!isRouteErrorResponse(error) || typeof error.data !== "object" || error.data === null) return null;
  const { words } = error.data as { readonly words?: unknown };
  return typeof words === "string" && error.status < 500 ? words : null;
}
