import { db } from "~/db/client.server";
import { findSettings } from "~/models/settings.server";
import { navFor, rolesInWords } from "./areas";
import type { Person } from "./session.server";

/** Until the shop has settings of its own. */
const ZONE = "UTC";

/** What the frame of every page needs to know: who is there, their ways, the shop's zone. */
export async function areaFacts(person: Person | null) {
  const zone = (await findSettings(db))?.content.shop.timeZone ?? ZONE;
  return {
    who: person && { name: person.name, role: rolesInWords(person.roles) },
    nav: person ? navFor(person.roles) : [],
    shownUnit: person?.shownUnit ?? "mm",
    zone,
    unverified: person !== null && !person.emailVerified,
  };
}

export type AreaFacts = Awaited<ReturnType<typeof areaFacts>>;
