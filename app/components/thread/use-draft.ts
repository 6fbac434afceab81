import { useCallback, useEffect, useState } from "react";
import { z } from "zod";
import type { Draft } from "./use-thread";

const EMPTY: Draft = { body: "", note: false, pointing: null };

const draftSchema = z.object({
  body: z.string(),
  note: z.boolean(),
  pointing: z
    .object({
      partLabel: z.string().nullable(),
      spot: z.object({ x: z.number(), y: z.number() }).nullable(),
    })
    .nullable(),
});

/** What is being written, kept for this tab over reloads until it is sent: a note for the staff stays a note. */
export function useDraft(key: string) {
  const [draft, setDraft] = useState<Draft>(EMPTY);
  useEffect(() => setDraft(kept(key)), [key]);
  const change = useCallback(
    (part: Partial<Draft>) =>
      setDraft((now) => {
        const next = { ...now, ...part };
        keep(key, next);
        return next;
      }),
    [key],
  );
  const clear = useCallback(() => {
    keep(key, null);
    setDraft((now) => ({ ...EMPTY, note: now.note }));
  }, [key]);
  return { draft, change, clear };
}

function kept(key: string): Draft {
  try {
    const read = draftSchema.safeParse(JSON.parse(sessionStorage.getItem(key) ?? "null"));
    return read.success ? read.data : EMPTY;
  } catch {
    return EMPTY;
  }
}

/** A browser that keeps nothing loses the draft on a reload, and nothing else. */
function keep(key: string, draft: Draft | null): void {
  try {
    if (draft && (draft.body !== "" || draft.pointing)) sessionStorage.setItem(key, JSON.stringify(draft));
    else sessionStorage.removeItem(key);
  } catch {
    // Storage is turned off or full.
  }
}
