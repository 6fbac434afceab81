/** One measured thing: what we take, what the reference measured in the same run takes or the aim is, and ours over it. */
export interface BenchRow {
  readonly name: string;
  readonly ours: number;
  readonly reference: number | null;
  readonly ratio: number | null;
  /** What `ours` and `reference` are counted in. */
  readonly unit: string;
}

export interface BenchTopic {
  readonly name: string;
  /** Rows of the table; `say` tells a person what is under way or left out. */
  readonly run: (say: (words: string) => void) => Promise<readonly BenchRow[]>;
}

export const row = (name: string, unit: string, ours: number, reference: number | null): BenchRow => ({
  name,
  ours,
  reference,
  ratio: reference === null || reference === 0 ? null : ours / reference,
  unit,
});
