/** The schedule as its page shows it: plain JSON, days as the shop's own YYYY-MM-DD, minutes of the router. */

export interface ScheduledRun {
  readonly id: string;
  readonly version: number;
  readonly sheetId: string;
  readonly nestId: string;
  /** `N-6·1`: nest and sheet. */
  readonly label: string;
  readonly material: string;
  readonly materialIndex: number;
  readonly machine: string;
  readonly machineId: string;
  readonly day: string;
  readonly plannedMinutes: number;
  readonly startedAt: string | null;
  readonly finishedAt: string | null;
  readonly actualMinutes: number | null;
  readonly orders: readonly OnSheet[];
  /** Its day is over and it is not cut. */
  readonly overdue: boolean;
  /** References of the orders whose promised day is before the run's. */
  readonly tooLateFor: readonly string[];
}

export interface OnSheet {
  readonly id: string;
  readonly reference: string;
  readonly name: string;
  readonly pieces: number;
}

export interface MachineDay {
  readonly day: string;
  readonly words: string;
  readonly isToday: boolean;
  readonly openMinutes: number;
  readonly bookedMinutes: number;
  /** Working minutes of today that have gone by; null on other days. */
  readonly gone: number | null;
  readonly runs: readonly ScheduledRun[];
}

export interface LooseSheet {
  readonly id: string;
  readonly nestId: string;
  readonly label: string;
  readonly material: string;
  readonly minutes: number;
  readonly orders: readonly OnSheet[];
  /** The earliest promise among its orders, YYYY-MM-DD. */
  readonly due: string | null;
}
