import { useEffect } from "react";

/** Marks the link or button of a row that the keys move between. */
export const ROW_MARK = { "data-row": "" } as const;

const typing = (target: EventTarget | null): boolean =>
  target instanceof HTMLElement && target.matches("input, textarea, select, [contenteditable]");

/**
 * j and k (or the arrows) move between the marked rows of a page, Enter opens the one in focus as it does any
 * link, / goes to the search, ? is the caller's. Letters typed into a field stay letters.
 */
export function useRowKeys({ searchId, onHelp }: { searchId: string; onHelp: () => void }): void {
  useEffect(() => {
    const step = (by: 1 | -1) => {
      const rows = [...document.querySelectorAll<HTMLElement>("[data-row]")];
      const { activeElement } = document;
      const at = activeElement instanceof HTMLElement ? rows.indexOf(activeElement) : -1;
      const next = rows[at === -1 ? (by === 1 ? 0 : rows.length - 1) : at + by];
      next?.focus();
      next?.scrollIntoView({ block: "nearest" });
    };
    const actOf = (key: string): (() => void) | undefined => {
      switch (key) {
        case "j":
        case "ArrowDown":
          return () => step(1);
        case "k":
        case "ArrowUp":
          return () => step(-1);
        case "/":
          return () => document.getElementById(searchId)?.focus();
        case "?":
          return onHelp;
        default:
          return undefined;
      }
    };
    const onKey = (event: KeyboardEvent) => {
      if (event.ctrlKey || event.metaKey || event.altKey || typing(event.target)) return;
      const act = actOf(event.key);
      if (!act || document.querySelector("dialog[open]")) return;
      event.preventDefault();
      act();
    };
    document.addEventListener("keydown", onKey);
    return () => document.removeEventListener("keydown", onKey);
  }, [searchId, onHelp]);
}
