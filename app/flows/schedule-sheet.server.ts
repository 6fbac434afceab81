import { transact } from "~/db/client.server";
import { mayDo } from "~/domain/orders";
import { minutesOn } from "~/domain/scheduling";
import { formatMinutes } from "~/domain/units";
import { recordEvent } from "~/models/events.server";
import { findMachine } from "~/models/machines.server";
import { findSheet, listPiecesOnSheet } from "~/models/nests.server";
import { findRunOfSheet, insertRun, moveRun, plannedMinutesOn, type Run } from "~/models/runs.server";
import type { Actor } from "./actor";
import { CHANGED, refuse, type Verdict } from "./verdict";

export interface ScheduleSheetOptions {
  readonly actor: Actor;
  readonly sheetId: string;
  readonly machineId: string;
  /** The shop's calendar day, YYYY-MM-DD. */
  readonly day: string;
  /** Of the run the sheet has already; 0 when it has none. */
  readonly runVersion: number;
  /** The operator knows that the day is full and wants it so. */
  readonly overbook?: boolean;
}

/** Gives a sheet its turn on a machine's day, last of it, or moves it to another while it has not begun. */
export async function scheduleSheet(
  options: ScheduleSheetOptions,
): Promise<Verdict<{ run: Run; bookedMinutes: number; openMinutes: number }>> {
  const { actor, sheetId, machineId, day, runVersion } = options;
  if (!mayDo(actor.roles, "schedule.edit"))
    return refuse("not-allowed", "The schedule is the operators' work.");
  return transact(async (tx): Promise<Verdict<{ run: Run; bookedMinutes: number; openMinutes: number }>> => {
    const found = await findSheet(tx, sheetId);
    const machine = await findMachine(tx, machineId);
    if (!found || !machine) return refuse("not-found", "There is no such sheet or machine.");
    const { sheet, nest } = found;
    if (sheet.status !== "planned" || (nest.status !== "locked" && nest.status !== "cutting"))
      return refuse("wrong-stage", `This sheet is ${sheet.status} and cannot be scheduled.`);
    if (sheet.length > machine.bedLength || sheet.width > machine.bedWidth)
      return refuse("no-room", `The sheet is larger than the bed of ${machine.name}.`);
    const openMinutes = minutesOn(day, machine.calendar);
    if (openMinutes === 0) return refuse("no-room", `${machine.name} does not work that day.`);
    const plannedMinutes = sheet.estimatedMinutes * machine.calibration;
    const before = await plannedMinutesOn(tx, { machineId, day, exceptSheetId: sheetId });
    const bookedMinutes = before + plannedMinutes;
    if (bookedMinutes > openMinutes && !options.overbook)
      return refuse(
        "no-room",
        `${machine.name} has ${formatMinutes(Math.max(0, openMinutes - before))} left that day; the sheet takes ${formatMinutes(plannedMinutes)}.`,
      );
    const plan = { sheetId, machineId, day, plannedMinutes };
    const old = await findRunOfSheet(tx, sheetId);
    if ((old?.version ?? 0) !== runVersion) return CHANGED;
    if (old && !(await moveRun(tx, old, plan))) return refuse("wrong-stage", "This run has begun.");
    const run = old ? await findRunOfSheet(tx, sheetId) : await insertRun(tx, plan);
    if (!run) throw new Error("The run was not stored.");
    const orderIds = new Set((await listPiecesOnSheet(tx, sheetId)).map((piece) => piece.orderId));
    for (const orderId of orderIds)
      await recordEvent(tx, {
        orderId,
        kind: "run",
        audience: "staff",
        data: { machine: machine.name, day },
      });
    return { ok: true, run, bookedMinutes, openMinutes };
  });
}
