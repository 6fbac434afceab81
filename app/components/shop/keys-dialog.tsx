import { type RefObject, useId } from "react";
import { Button } from "../button";

const KEYS: readonly (readonly [keys: string, does: string])[] = [
  ["j or ↓", "next order"],
  ["k or ↑", "order before"],
  ["Enter", "open the order"],
  ["/", "to the search"],
  ["?", "these keys"],
  ["Esc", "close"],
];

/** The keys of the queue, shown by ? and by its button. */
export function KeysDialog({ dialog }: { readonly dialog: RefObject<HTMLDialogElement | null> }) {
  const title = useId();
  return (
    <dialog
      ref={dialog}
      aria-labelledby={title}
      className="m-auto w-80 max-w-[calc(100vw-2rem)] rounded-sheet border border-edge bg-sheet p-5 text-ink backdrop:bg-ink/30"
    >
      <h2 id={title} className="text-body font-semibold">
        Keys
      </h2>
      <dl className="my-3 text-small">
        {KEYS.map(([keys, does]) => (
          <div key={keys} className="flex justify-between gap-4 py-1">
            <dt className="measure">{keys}</dt>
            <dd>{does}</dd>
          </div>
        ))}
      </dl>
      <form method="dialog">
        <Button size="small">Close</Button>
      </form>
    </dialog>
  );
}
