/** What became of inputs. */
export interface Tally {
  inputs: number;
  bytes: number;
  /** How often each reader found each code; `opened`, `read` and `mark` count inputs that were accepted. */
  codes: Record<string, number>;
  /** MiB that the inputs took at most. */
  peak: number;
  slowest: { number: number; milliseconds: number; bytes: number };
}

export function newTally(): Tally {
  return { inputs: 0, bytes: 0, codes: {}, peak: 0, slowest: { number: -1, milliseconds: 0, bytes: 0 } };
}

/** Counts a code once an input, however often it was found. */
export function countCodes({ codes }: Tally, reader: string, found: readonly string[]): void {
  for (const code of new Set(found)) {
    const name = `${reader}: ${code}`;
    codes[name] = (codes[name] ?? 0) + 1;
  }
}

/** Adds one tally to another. */
export function addTally(to: Tally, { inputs, bytes, codes, peak, slowest }: Tally): void {
  to.inputs += inputs;
  to.bytes += bytes;
  to.peak = Math.max(to.peak, peak);
  if (slowest.milliseconds > to.slowest.milliseconds) to.slowest = slowest;
  for (const [name, count] of Object.entries(codes)) to.codes[name] = (to.codes[name] ?? 0) + count;
}
