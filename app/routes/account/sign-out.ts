import { redirect } from "react-router";
import { auth } from "~/auth/auth.server";
import type { Route } from "./+types/sign-out";

/** Ends this session; without one there is nothing to end. */
export async function action({ request }: Route.ActionArgs) {
  const { headers } = await auth().api.signOut({ headers: request.headers, returnHeaders: true });
  throw redirect("/", { headers });
}

/** An address typed by hand signs nobody out. */
export function loader() {
  throw redirect("/");
}
