/** A line of the benchmark: our code and the reference on the same work. */
export interface Row {
  name: string;
  /** What our time over the reference's may be at most. */
  goal: number;
  /** Makes the data that both sides read, once, in the folder. */
  prepare(folder: string): Promise<void> | void;
  /** Does our work once and returns its time in seconds. */
  ours(folder: string): Promise<number>;
  /** Does the reference's work once and returns its time in seconds. */
  reference(folder: string): Promise<number>;
  /** Takes minutes: run once, and only where a word on the command line asks for it. */
  long?: true;
  /** Further figures of the last run, for example peak memory. */
  remark?(): string;
}

/** Seconds that a piece of work took. */
export async function timed(work: () => Promise<unknown> | unknown): Promise<number> {
  const began = performance.now();
  await work();
  return (performance.now() - began) / 1000;
}
