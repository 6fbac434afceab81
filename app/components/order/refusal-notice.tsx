import { Notice } from "../notice";

interface RefusalNoticeProps {
  readonly refusal: { readonly reason: string; readonly words: string } | null;
}

/** Why an act was not done, read out where it was pressed. */
export function RefusalNotice({ refusal }: RefusalNoticeProps) {
  if (!refusal) return null;
  return (
    <Notice live title={refusal.reason === "changed" ? "Changed meanwhile" : undefined}>
      {refusal.words}
    </Notice>
  );
}
