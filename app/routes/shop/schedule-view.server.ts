import type { LooseSheet, MachineDay, ScheduledRun } from "~/components/shop/schedule-view";
import { db } from "~/db/client.server";
import { addDays, dayOf, localTime, minutesOn, shiftsOn, shownDay, weekdayOf } from "~/domain/scheduling";
import { listMachines, type Machine } from "~/models/machines.server";
import { listMaterials } from "~/models/materials.server";
import { listOrdersOnSheets } from "~/models/queue.server";
import { listRuns, listSheetsToSchedule } from "~/models/runs.server";
import { currentSettings } from "~/models/settings.server";

/** How far back runs that were never cut are looked for, in days. */
const LOOK_BACK = 90;

type RunRow = Awaited<ReturnType<typeof listRuns>>[number];
type OnSheets = Awaited<ReturnType<typeof listOrdersOnSheets>>;

interface Frame {
  readonly today: string;
  readonly clock: string;
  readonly zone: string;
  readonly materials: readonly string[];
}

/** A week of the machines, what is late from before it, and the sheets that wait for a day. */
export async function scheduleView(asked: string | null, now = new Date()) {
  const { shop } = await currentSettings(db);
  const { day: today, clock } = localTime(now, shop.timeZone);
  const from = mondayOf(asked ?? today);
  const to = addDays(from, 6);
  const machines = await listMachines(db);
  const runs = await listRuns(db, { from, to });
  const before = (await listRuns(db, { from: addDays(today, -LOOK_BACK), to: addDays(today, -1) })).filter(
    ({ run }) => run.finishedAt === null,
  );
  const loose = await listSheetsToSchedule(db);
  const onSheets = await listOrdersOnSheets(db, [
    ...[...runs, ...before].map(({ sheet }) => sheet.id),
    ...loose.map(({ sheet }) => sheet.id),
  ]);
  const frame: Frame = {
    today,
    clock,
    zone: shop.timeZone,
    materials: (await listMaterials(db)).map(({ id }) => id),
  };
  const days = Array.from({ length: 7 }, (_, index) => addDays(from, index));
  return {
    from,
    words: `${shownDay(from)} to ${shownDay(to)}`,
    earlier: addDays(from, -7),
    later: addDays(from, 7),
    isThisWeek: from === mondayOf(today),
    machines: machines.map((machine) => ({
      id: machine.id,
      name: machine.name,
      bed: { length: machine.bedLength, width: machine.bedWidth },
      days: days.flatMap((day) => machineDay(machine, day, { runs, onSheets, frame })),
    })),
    late: before.map((row) => scheduledRun(row, onSheets, frame)),
    loose: loose.map(({ sheet, nest, material }): LooseSheet => {
      const orders = onSheets.filter(({ sheetId }) => sheetId === sheet.id);
      const promised = orders.flatMap(({ promisedFor }) =>
        promisedFor ? [dayOf(promisedFor, frame.zone)] : [],
      );
      return {
        id: sheet.id,
        nestId: nest.id,
        label: `N-${nest.number}·${sheet.number}`,
        material: material.name,
        minutes: sheet.estimatedMinutes,
        orders: orders.map(onSheet),
        due: promised.toSorted()[0] ?? null,
      };
    }),
    /* Days that a sheet can be put on: those of the week shown that are not over. */
    days: days
      .filter((day) => day >= today && machines.some(({ calendar }) => minutesOn(day, calendar) > 0))
      .map((day) => ({ day, words: shownDay(day) })),
  };
}
export type ScheduleView = Awaited<ReturnType<typeof scheduleView>>;

const mondayOf = (day: string): string => addDays(day, -((weekdayOf(day) + 6) % 7));

const onSheet = ({ orderId, reference, name, pieces }: OnSheets[number]) => ({
  id: orderId,
  reference,
  name,
  pieces,
});

interface Week {
  readonly runs: readonly RunRow[];
  readonly onSheets: OnSheets;
  readonly frame: Frame;
}

/** A day of a machine; nothing for a day that it does not work and nothing lies on. */
function machineDay(machine: Machine, day: string, { runs, onSheets, frame }: Week): MachineDay[] {
  const here = runs.filter((row) => row.machine.id === machine.id && row.run.day === day);
  const openMinutes = minutesOn(day, machine.calendar);
  if (openMinutes === 0 && here.length === 0) return [];
  return [
    {
      day,
      words: shownDay(day),
      isToday: day === frame.today,
      openMinutes,
      bookedMinutes: here.reduce((total, { run }) => total + run.plannedMinutes, 0),
      gone: day === frame.today ? goneBy(machine, frame) : null,
      runs: here.map((row) => scheduledRun(row, onSheets, frame)),
    },
  ];
}

const sinceMidnight = (clock: string): number => {
  const [hours = 0, minutes = 0] = clock.split(":").map(Number);
  return hours * 60 + minutes;
};

/** Working minutes of today before the clock on the wall. */
const goneBy = ({ calendar }: Machine, { today, clock }: Frame): number =>
  shiftsOn(today, calendar).reduce((gone, { from, to }) => {
    const until = Math.min(sinceMidnight(clock), sinceMidnight(to));
    return gone + Math.max(0, until - sinceMidnight(from));
  }, 0);

function scheduledRun(
  { run, machine, sheet, nest, material }: RunRow,
  onSheets: OnSheets,
  frame: Frame,
): ScheduledRun {
  const orders = onSheets.filter(({ sheetId }) => sheetId === sheet.id);
  const done = run.finishedAt !== null;
  return {
    id: run.id,
    version: run.version,
    sheetId: sheet.id,
    nestId: nest.id,
    label: `N-${nest.number}·${sheet.number}`,
    material: material.name,
    materialIndex: Math.max(0, frame.materials.indexOf(material.id)),
    machine: machine.name,
    machineId: machine.id,
    day: run.day,
    plannedMinutes: run.plannedMinutes,
    startedAt: run.startedAt?.toISOString() ?? null,
    finishedAt: run.finishedAt?.toISOString() ?? null,
    actualMinutes: run.actualMinutes,
    orders: orders.map(onSheet),
    overdue: !done && run.day < frame.today,
    tooLateFor: done
      ? []
      : orders
          .filter(({ promisedFor }) => promisedFor !== null && dayOf(promisedFor, frame.zone) < run.day)
          .map(({ reference }) => reference),
  };
}
