import type { Executor } from "~/db/client.server";
import type { ShopSettings } from "~/domain/orders";
import { dayOf, instantAt, promiseDate } from "~/domain/scheduling";
import { listMachines } from "~/models/machines.server";
import { minutesByDay, waitingMinutes } from "~/models/runs.server";
import { refuse, type Verdict } from "./verdict";

/** Local time by which an order is out of the door on its day. */
const CLOSING = "17:00";

/**
 * When an order that needs `machineMinutes` ships if it is paid at `paidAt`: after what is on the machines and what
 * is paid and waits for them.
 */
export async function promiseOrder(
  executor: Executor,
  { settings, machineMinutes, paidAt }: { settings: ShopSettings; machineMinutes: number; paidAt: Date },
): Promise<Verdict<{ promisedFor: Date; how: string }>> {
  const { timeZone } = settings.shop;
  const machines = await listMachines(executor);
  const load = await minutesByDay(executor, dayOf(paidAt, timeZone));
  const promised = promiseDate({
    approvedAt: paidAt,
    timeZone,
    lead: settings.lead,
    calendars: machines.map((machine) => machine.calendar),
    load: Object.fromEntries(load),
    minutes: machineMinutes + (await waitingMinutes(executor)),
  });
  if (!promised.ok) return refuse("no-room", promised.reason);
  return {
    ok: true,
    promisedFor: instantAt(promised.promise.shipsOn, CLOSING, timeZone),
    how: promised.promise.how,
  };
}
