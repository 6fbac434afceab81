import { db } from "~/db/client.server";
import { mayDo } from "~/domain/orders";
import { listUnreadOrders } from "~/models/messages.server";
import { countTroubledMails } from "~/models/outbox.server";
import { findSettings } from "~/models/settings.server";
import { navFor, rolesInWords } from "./areas";
import type { Person } from "./session.server";

/** Until the shop has settings of its own. */
const ZONE = "UTC";
/** For how long a mail that did not arrive is counted; it stays in the list after that. */
const TROUBLE_MS = 14 * 24 * 3_600_000;

/** What the frame of every page needs to know: who is there, their ways, the shop's zone. */
export async function areaFacts(person: Person | null) {
  const zone = (await findSettings(db))?.content.shop.timeZone ?? ZONE;
  return {
    who: person && { name: person.name, role: rolesInWords(person.roles) },
    nav: person ? await navOf(person) : [],
    shownUnit: person?.shownUnit ?? "mm",
    zone,
    unverified: person !== null && !person.emailVerified,
  };
}

export type AreaFacts = Awaited<ReturnType<typeof areaFacts>>;

/** A person's ways, with how much waits there: orders with unread messages, mails that did not arrive. */
async function navOf(person: Person) {
  const { id: userId, roles } = person;
  const waiting: Record<string, number> = {};
  if (mayDo(roles, "order.create"))
    waiting["/orders"] = (await listUnreadOrders(db, { userId, scope: { kind: "builder", userId } })).length;
  if (mayDo(roles, "queue.read"))
    waiting["/shop"] = (await listUnreadOrders(db, { userId, scope: { kind: "staff" } })).length;
  if (mayDo(roles, "mail.resend"))
    waiting["/owner"] = await countTroubledMails(db, new Date(Date.now() - TROUBLE_MS));
  return navFor(roles).map((way) => ({ ...way, waiting: waiting[way.to] ?? 0 }));
}
