import { useEffect, useRef, useState } from "react";
import { plainField } from "../field";
import { TextField } from "../text-field";

interface ScanFieldProps {
  readonly label: string;
  readonly hint: string;
  /** Given what was scanned or typed, when Enter ends it; answers what came of it. */
  readonly onScan: (typed: string) => string;
  readonly size?: "normal" | "floor";
}

const TYPES_ITSELF = "input, textarea, select, [contenteditable]";

/** A field for a scanner that types: what it types arrives here wherever the page's focus is, and Enter ends it. */
export function ScanField({ label, hint, onScan, size = "normal" }: ScanFieldProps) {
  const form = useRef<HTMLFormElement>(null);
  const [said, setSaid] = useState("");
  useEffect(() => {
    const catchKeys = (event: KeyboardEvent) => {
      const { target, key } = event;
      if (event.ctrlKey || event.metaKey || event.altKey || key.length !== 1 || key === " ") return;
      if (target instanceof Element && (target.matches(TYPES_ITSELF) || target.closest("dialog"))) return;
      form.current?.querySelector("input")?.focus();
    };
    document.addEventListener("keydown", catchKeys);
    return () => document.removeEventListener("keydown", catchKeys);
  }, []);
  return (
    <form
      ref={form}
      className="min-w-0"
      onSubmit={(event) => {
        event.preventDefault();
        const input = event.currentTarget.querySelector("input");
        if (!input || input.value.trim() === "") return;
        setSaid(onScan(input.value));
        input.value = "";
      }}
    >
      {size === "floor" && (
        <p aria-hidden="true" className="mb-1 text-floor">
          {label}. {hint}
        </p>
      )}
      <TextField
        field={plainField("scan", { id: "scan" })}
        label={label}
        labelHidden={size === "floor"}
        hint={size === "floor" ? undefined : hint}
        autoComplete="off"
        autoFocus
        size={size}
      />
      <p aria-live="assertive" className={`mt-1 min-h-6 ${size === "floor" ? "text-floor" : "text-small"}`}>
        {said}
      </p>
    </form>
  );
}
