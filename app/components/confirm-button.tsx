import { type ReactNode, useRef } from "react";
import { Button } from "./button";
import { type ButtonSize, type ButtonVariant, buttonLook } from "./button-look";

interface ConfirmButtonProps {
  /** The first press: "Refund". */
  readonly label: string;
  /** What will happen, in one or two sentences with its measures. */
  readonly question: ReactNode;
  /** The second press, saying the act: "Refund $244.55". */
  readonly confirm: string;
  readonly keep?: string;
  /** Name and value of the submit button inside the form that holds this. */
  readonly name?: string;
  readonly value?: string;
  readonly variant?: ButtonVariant;
  readonly size?: ButtonSize;
  readonly pending?: boolean;
  /** Fields that belong to the second step: a reason, an amount. */
  readonly children?: ReactNode;
}

/** An act in two steps, inside the form that does it. Works before any script has loaded. */
export function ConfirmButton({
  label,
  question,
  confirm,
  keep = "Leave it",
  name,
  value,
  variant = "danger",
  size = "normal",
  pending = false,
  children,
}: ConfirmButtonProps) {
  const details = useRef<HTMLDetailsElement>(null);
  const close = () => {
    if (!details.current) return;
    details.current.open = false;
    details.current.querySelector("summary")?.focus();
  };
  return (
    <details
      ref={details}
      className="group min-w-0 open:w-full"
      onKeyDown={(event) => {
        if (event.key === "Escape") close();
      }}
    >
      <summary className={`${buttonLook(variant, size)} group-open:hidden`}>{label}</summary>
      <div className="space-y-3 border-l-4 border-amber bg-amber-wash px-4 py-3 text-small">
        <div>{question}</div>
        {children}
        <div className="flex flex-wrap gap-2">
          <Button name={name} value={value} variant="danger" size={size} pending={pending}>
            {confirm}
          </Button>
          <Button type="button" variant="plain" size={size} onClick={close}>
            {keep}
          </Button>
        </div>
      </div>
    </details>
  );
}
