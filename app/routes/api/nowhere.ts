import { only } from "./methods.server";

export const middleware = [only("GET", "POST")];

/** Every address under /api that is none. */
export function loader() {
  return notThere();
}

export function action() {
  return notThere();
}

const notThere = () => new Response("There is no such address in the API.", { status: 404 });
