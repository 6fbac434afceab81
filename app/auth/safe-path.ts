const ANYWHERE = "http://here.invalid";

/**
 * The path to go on to after signing in, when it is one of this site; otherwise null. Another host, another scheme
 * and what a browser would read as one (`//host`, `/\host`) are refused.
 */
export function safePath(to: string | null | undefined): string | null {
  if (!to?.startsWith("/") || !URL.canParse(to, ANYWHERE)) return null;
  const { origin, pathname, search, hash } = new URL(to, ANYWHERE);
  return origin === ANYWHERE && !pathname.startsWith("//") ? `${pathname}${search}${hash}` : null;
}
