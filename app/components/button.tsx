import type { ComponentProps } from "react";
import { type ButtonSize, type ButtonVariant, buttonLook } from "./button-look";

interface ButtonProps extends Omit<ComponentProps<"button">, "className" | "style"> {
  readonly variant?: ButtonVariant;
  readonly size?: ButtonSize;
  /** As wide as what holds it: the one act of a rail. */
  readonly wide?: boolean;
  /** While the act is under way: says so, and takes no second press. */
  readonly pending?: boolean;
}

/** An act. A submit button unless `type` says otherwise. */
export function Button({
  variant = "plain",
  size = "normal",
  wide = false,
  pending = false,
  type = "submit",
  children,
  onClick,
  ...rest
}: ButtonProps) {
  return (
    <button
      {...rest}
      type={type}
      aria-disabled={pending || undefined}
      aria-busy={pending || undefined}
      onClick={pending ? (event) => event.preventDefault() : onClick}
      className={buttonLook(variant, size, wide)}
    >
      {pending ? (
        <span>
          {children}
          <span aria-hidden="true">…</span>
          <span className="sr-only">, working</span>
        </span>
      ) : (
        children
      )}
    </button>
  );
}
