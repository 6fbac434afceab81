import { Link, type LinkProps } from "react-router";
import { type ButtonSize, type ButtonVariant, buttonLook } from "./button-look";

interface ButtonLinkProps extends Omit<LinkProps, "className" | "style"> {
  readonly variant?: ButtonVariant;
  readonly size?: ButtonSize;
  readonly wide?: boolean;
}

/** A way to another page that weighs as much as an act. */
export function ButtonLink({ variant = "plain", size = "normal", wide = false, ...rest }: ButtonLinkProps) {
  return <Link {...rest} className={buttonLook(variant, size, wide)} />;
}
