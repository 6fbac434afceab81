/**
 * `npm run seed`: the invented shop with its people and orders, made through the flows that serve real ones. The
 * local stand-ins must be running; a shop that is there already is left alone.
 */
import { closeDatabase, db, transact } from "~/db/client.server";
import { migrateDatabase } from "~/db/migrate.server";
import { insertShop } from "~/db/seed/insert-shop.server";
import { shiftOrderTimes } from "~/db/seed/shift-times.server";
import { addDays, dayOf, instantAt, workingDayFrom } from "~/domain/scheduling";
import { closePool } from "~/jobs/pool.server";
import { findOrder } from "~/models/orders.server";
import { currentSettings, findSettings } from "~/models/settings.server";
import { afterwards } from "./seed/aftermath";
import { carryOrder, type DemoOrder } from "./seed/carry";
import { demoOrders } from "./seed/orders";
import { seedPeople } from "./seed/people";
import { talk } from "./seed/talk";

async function seed(): Promise<string> {
  await migrateDatabase();
  if (await findSettings(db)) return "The shop is there already; nothing was added.\n";
  const now = new Date();
  await transact((tx) => insertShop(tx, now));
  const people = await seedPeople();
  const { shop, lead } = await currentSettings(db);
  const today = dayOf(now, shop.timeZone);
  const plan = demoOrders(people);
  let waiting = 0;
  for (const { daysAgo, dueIn, late = 0, aftermath, talk: messages, ...demo } of plan) {
    const ahead =
      demo.to === "scheduled" ? plan.filter(({ to }) => to === "scheduled").length - waiting++ : 0;
    const day = workingDayFrom(addDays(today, ahead % 3), lead.holidays);
    const { id } = await carryOrder(demo, { operator: people.operator, clerk: people.clerk, day });
    const order = await findOrder(db, id, { kind: "staff" });
    if (aftermath && order) await afterwards(order, aftermath, people);
    const due = dueIn === undefined ? null : workingDayFrom(addDays(today, dueIn), lead.holidays);
    const promisedFor = due === null ? null : instantAt(due, "12:00", shop.timeZone);
    await transact((tx) =>
      shiftOrderTimes(tx, {
        orderId: id,
        days: daysAgo,
        until: lastMove(demo, promisedFor, late, now),
        promisedFor,
        now,
      }),
    );
    if (messages) await talk(id, demo.builder, people, messages, now);
  }
  return `Made ${Object.keys(people).length} people and ${plan.length} orders.\n`;
}

const HOUR_MS = 60 * 60_000;

/** What was shipped left the shop on the morning of its day, or as many days late; everything else moved an hour ago. */
function lastMove({ to }: DemoOrder, promisedFor: Date | null, late: number, now: Date): Date {
  if (to !== "shipped" || promisedFor === null) return new Date(now.getTime() - HOUR_MS);
  return new Date(promisedFor.getTime() + (late * 24 - 2) * HOUR_MS);
}

const began = Date.now();
try {
  const words = await seed();
  process.stdout.write(`${words}${((Date.now() - began) / 1000).toFixed(1)} s\n`);
} finally {
  closePool();
  closeDatabase();
}
