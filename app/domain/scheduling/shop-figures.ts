import { dayOf } from "./local-time";

export interface CutRun {
  readonly machine: string;
  readonly plannedMinutes: number;
  readonly actualMinutes: number;
}

export interface MinutesFigures {
  readonly machine: string;
  readonly runs: number;
  readonly planned: number;
  readonly actual: number;
  /** Actual over planned; null where nothing was planned. */
  readonly ratio: number | null;
}

/** Planned and actual minutes of finished runs, a row for each machine, by name. */
export function minutesByMachine(runs: readonly CutRun[]): readonly MinutesFigures[] {
  const machines = [...new Set(runs.map(({ machine }) => machine))].toSorted();
  return machines.map((machine) => {
    const own = runs.filter((run) => run.machine === machine);
    const planned = own.reduce((sum, run) => sum + run.plannedMinutes, 0);
    const actual = own.reduce((sum, run) => sum + run.actualMinutes, 0);
    return { machine, runs: own.length, planned, actual, ratio: planned > 0 ? actual / planned : null };
  });
}

/** How many orders left the shop, and how many of them by the end of the day they were promised for, in its zone. */
export function onTimeShare(
  shipped: readonly { readonly shippedAt: Date; readonly promisedFor: Date }[],
  timeZone: string,
): { readonly shipped: number; readonly onTime: number } {
  const onTime = shipped.filter(
    ({ shippedAt, promisedFor }) => dayOf(shippedAt, timeZone) <= dayOf(promisedFor, timeZone),
  );
  return { shipped: shipped.length, onTime: onTime.length };
}
