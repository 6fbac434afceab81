import type { SubmissionResult } from "@conform-to/react";
import { parseWithZod } from "@conform-to/zod/v4";
import { data, redirect } from "react-router";
import type { z } from "zod";
import { REFUSAL_STATUS, type RefusalReason, refuse, type Verdict } from "~/flows/verdict";

/** What a page is told of the act it sent. */
export type ActReply =
  | { readonly ok: true; readonly intent: string; readonly words: string | null }
  | {
      readonly ok: false;
      readonly intent: string | null;
      /** Null when only fields of the form are at fault. */
      readonly reason: RefusalReason | null;
      readonly words: string | null;
      /** The form as it came, with what is wrong with its fields. */
      readonly result: SubmissionResult<string[]> | null;
    };

/** Where a done act leads, or what it has to say; it stays on the page when it leads nowhere. */
export type Done = Verdict<{ readonly leadsTo?: string; readonly words?: string }>;
type Act = (intent: string, formData: FormData) => Promise<ReturnType<typeof answer>>;

/** One act of a page: the form it takes, and the flow that does it. */
export function formAct<Output>(schema: z.ZodType<Output>, run: (value: Output) => Promise<Done>): Act {
  return async (intent, formData) => {
    const submission = parseWithZod(formData, { schema });
    if (submission.status !== "success")
      return answer({ ok: false, intent, reason: null, words: null, result: submission.reply() }, 400);
    const done = await run(submission.value);
    if (!done.ok) {
      const { reason, words } = done;
      return answer({ ok: false, intent, reason, words, result: submission.reply() }, REFUSAL_STATUS[reason]);
    }
    if (done.leadsTo !== undefined) throw redirect(done.leadsTo);
    return answer({ ok: true, intent, words: done.words ?? null }, 200);
  };
}

/** Does what a page's form asks by its `intent`: 400 for a form that is not right, the refusal's status, or done. */
export async function dispatchAct(formData: FormData, acts: Readonly<Record<string, Act>>) {
  const intent = formData.get("intent");
  const act = typeof intent === "string" && Object.hasOwn(acts, intent) ? acts[intent] : undefined;
  if (typeof intent === "string" && act) return act(intent, formData);
  const { reason, words } = refuse("invalid", "There is no such act.");
  return answer({ ok: false, intent: null, reason, words, result: null }, REFUSAL_STATUS[reason]);
}

const answer = (reply: ActReply, status: number) => data<ActReply>(reply, { status });
