/**
 * Earliest due date first: the order that makes the largest lateness smallest on one machine (Jackson 1955).
 * Equal dates keep the order they came in.
 */
export const byDueDate = <Job extends { readonly due: number }>(jobs: readonly Job[]): Job[] =>
  jobs.toSorted((one, other) => one.due - other.due);

/** How late the latest of the jobs ends when one follows the other from time 0; negative when all are early. */
export function maxLateness(jobs: readonly { readonly due: number; readonly takes: number }[]): number {
  let time = 0;
  let latest = -Infinity;
  for (const { due, takes } of jobs) {
    time += takes;
    latest = Math.max(latest, time - due);
  }
  return latest;
}
