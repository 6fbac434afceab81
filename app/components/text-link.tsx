import { Link, type LinkProps } from "react-router";

/** A link in running words or in a table cell. */
export function TextLink(props: Omit<LinkProps, "className" | "style">) {
  return (
    <Link
      {...props}
      className="text-blue underline decoration-1 underline-offset-[0.2em] hover:decoration-2"
    />
  );
}
