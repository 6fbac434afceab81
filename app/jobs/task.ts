/** What a task host is sent: one task at a time. */
export interface Task {
  /** URL of a module whose default export takes the input and gives the result. */
  readonly file: string;
  readonly input: unknown;
  readonly timeLimitMs: number;
}

/** Why a task came to no result. */
export type TaskRefusal = "too-long" | "too-much-memory" | "broke-off";

export type TaskResult<Result> =
  | { readonly ok: true; readonly result: Result }
  | { readonly ok: false; readonly reason: TaskRefusal; readonly detail: string };
