import { z } from "zod";

/** RFC 9457: what an API route answers when it does not do what was asked. */
export const problemSchema = z
  .object({
    type: z.url().describe("Names the kind of problem; leads to its paragraph in the guide."),
    title: z.string().describe("The kind of problem, the same words each time."),
    status: z.int().min(400).max(599).describe("The status of the answer, once more."),
    detail: z.string().describe("What is wrong this time, in a sentence for a person."),
    instance: z.string().describe("The path that was asked for."),
    errors: z
      .array(z.object({ name: z.string(), words: z.string() }))
      .optional()
      .describe("With 422: what is wrong with which query parameter."),
  })
  .loose();
export type Problem = z.infer<typeof problemSchema>;

export const PROBLEM_MEDIA_TYPE = "application/problem+json";

interface ProblemKind {
  readonly slug: string;
  readonly title: string;
  /** When nothing more is known. */
  readonly detail: string;
}

export const PROBLEM_KINDS: Readonly<Record<number, ProblemKind>> = {
  400: {
    slug: "not-understood",
    title: "Not understood",
    detail: "The request is not in a form that can be read.",
  },
  401: { slug: "not-signed-in", title: "Not signed in", detail: "No key came with the request." },
  402: { slug: "unpaid", title: "Not paid", detail: "The order has to be paid first." },
  403: { slug: "not-allowed", title: "Not allowed", detail: "This is not yours to see or do." },
  404: { slug: "not-found", title: "Not found", detail: "There is nothing here, or nothing that is yours." },
  405: {
    slug: "wrong-method",
    title: "Not with this method",
    detail: "The Allow header names the methods this address takes.",
  },
  409: { slug: "conflict", title: "Not as it stands", detail: "The order is not at a stage for this." },
  410: { slug: "expired", title: "Ran out", detail: "The quote ran out." },
  413: { slug: "too-large", title: "Too large", detail: "More was sent than is taken." },
  422: {
    slug: "not-valid",
    title: "Cannot be done with these values",
    detail: "A value is not one that is taken here.",
  },
  429: {
    slug: "too-many-requests",
    title: "Too many requests",
    detail: "Wait for the seconds that the Retry-After header names.",
  },
  500: {
    slug: "server-error",
    title: "Something broke here",
    detail: "The fault is on this side and was written down. Try again later.",
  },
  503: { slug: "unavailable", title: "Not available", detail: "A service this needs does not answer." },
};

/** Where a kind of problem is explained: a fragment of the guide. */
export const problemAnchor = ({ slug }: ProblemKind): string => `problem-${slug}`;

interface ProblemFacts {
  readonly status: number;
  /** Path of the request. */
  readonly instance: string;
  /** Address of this site, without a slash at its end. */
  readonly site: string;
  /** What the route itself answered: text, or an object whose `detail`, `words` or `reason` is a sentence. */
  readonly given: unknown;
}

/** The problem document of an answer; what the route said besides stays beside it, as RFC 9457, section 3.2, allows. */
export function problemOf({ status, instance, site, given }: ProblemFacts): Problem {
  const broken = PROBLEM_KINDS[500];
  const kind = PROBLEM_KINDS[status] ?? (status >= 500 ? broken : PROBLEM_KINDS[400]);
  if (!kind) throw new Error("There is no kind of problem for this status.");
  const told = status === 500 ? null : toldBy(given);
  const own = {
    type: `${site}/api-guide#${problemAnchor(kind)}`,
    title: kind.title,
    status,
    detail: told?.words || kind.detail,
    instance,
  };
  return { ...own, ...told?.more, ...own };
}

function toldBy(given: unknown): { words: string | null; more: Record<string, unknown> } | null {
  if (typeof given === "string") return { words: given, more: {} };
  if (typeof given !== "object" || given === null) return null;
  const { detail, words, reason } = given as Record<string, unknown>;
  const said = [detail, words, reason].find((one) => typeof one === "string");
  // A fault that the router itself found says nothing in words of ours.
  if (typeof said !== "string" && !("files" in given)) return null;
  return { words: typeof said === "string" ? said : null, more: { ...given } };
}
