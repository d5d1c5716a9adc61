/** Two or more samples in a row of exactly the same value. */
export interface FlatRun {
  value: number;
  from: number;
  length: number;
}

/** A run with up to {@link sideSamples} samples before and after it, fewer at the ends of the recording. */
export interface LongRun extends FlatRun {
  before: Float64Array;
  after: Float64Array;
}

export interface FlatRuns {
  add(samples: Float64Array, from: number): void;
  /** The recording ends here. */
  end(): void;
}

export interface RunVisitor {
  /**
   * Called for every run; the object is used again.
   * @param beside the sample so many before the run (-1 the nearest, down to -64) or after it; NaN past the block's end
   */
  run(run: Readonly<FlatRun>, beside: (offset: number) => number): void;
  /** Called for every run of {@link longRun} or more that the signal moves beside, once what follows is known. */
  longRun(run: LongRun): void;
}

export const longRun = 8;
export const sideSamples = 64;

/** Where so many steps beside a run are none the signal is slow, and the run is nothing to look at. */
const looked = 32;
const mostStill = 16;

const nothing: Float64Array = new Float64Array(0);

/** Finds runs of equal samples in a signal that comes by blocks. NaN equals nothing, and infinite ones are left out. */
export function newFlatRuns(visitor: RunVisitor): FlatRuns {
  const run: FlatRun = { value: 0, from: 0, length: 0 };
  /** The value and length of the run that is open where a block begins, the samples before it and those before the block. */
  let open = Number.NaN;
  let openLength = 0;
  let history = nothing;
  let tail = nothing;
  let next = 0;
  /** Long runs whose following samples are still to come. */
  let waiting: (LongRun & { filled: number })[] = [];
  let block = nothing;
  let at = 0;
  let to = 0;

  function beside(offset: number): number {
    if (offset > 0) return to + offset <= block.length ? block[to + offset - 1] : Number.NaN;
    if (at + offset >= 0) return block[at + offset];
    const earlier = before(block, at);
    return earlier.length + offset >= 0 ? earlier[earlier.length + offset] : Number.NaN;
  }

  /** Samples before place `end` of the block; before the open run where it began earlier. */
  function before(samples: Float64Array, end: number): Float64Array {
    if (end < 0) return history;
    if (end >= sideSamples) return samples.subarray(end - sideSamples, end);
    const kept = tail.subarray(Math.max(0, tail.length + end - sideSamples));
    const joined = new Float64Array(kept.length + end);
    joined.set(kept);
    joined.set(samples.subarray(0, end), kept.length);
    return joined;
  }

  /** The run of this value from place `at` (negative where it began in an earlier block) up to place `to`. */
  function close(value: number, from: number): void {
    if (value - value !== 0) return;
    run.value = value;
    run.from = from + at;
    run.length = to - at;
    visitor.run(run, beside);
    if (run.length < longRun || isStill(block, at - looked) || isStill(block, to)) return;
    const ahead = block.subarray(to, to + sideSamples);
    if (ahead.length === sideSamples) {
      visitor.longRun({ ...run, before: before(block, at), after: ahead });
      return;
    }
    const after = new Float64Array(sideSamples);
    after.set(ahead);
    waiting.push({ ...run, before: before(block, at).slice(), after, filled: ahead.length });
  }

  /** Gives the waiting runs the samples that follow them. */
  function serve(samples: Float64Array): void {
    for (const one of waiting) {
      const count = Math.min(sideSamples - one.filled, samples.length);
      one.after.set(samples.subarray(0, count), one.filled);
      one.filled += count;
      if (one.filled === sideSamples) visitor.longRun(one);
    }
    waiting = waiting.filter((one) => one.filled < sideSamples);
  }

  /** Every run that ends in the block; returns where the one that is open at its end began. */
  function walk(samples: Float64Array, from: number): number {
    const { length } = samples;
    let k = 0;
    while (k < length && samples[k] === open) k++;
    if (k === length) return -openLength;
    at = -openLength;
    to = k;
    if (to - at > 1) close(open, from);
    for (let last = samples[k++]; k < length; k++) {
      const value = samples[k];
      if (value !== last) {
        last = value;
        continue;
      }
      const begin = k - 1;
      while (k < length && samples[k] === samples[begin]) k++;
      if (k === length) return begin;
      at = begin;
      to = k;
      close(value, from);
      last = samples[k];
    }
    return length - 1;
  }

  return {
    add(samples, from) {
      if (samples.length === 0) return;
      if (waiting.length > 0) serve(samples);
      block = samples;
      const begin = walk(samples, from);
      if (begin >= 0) history = before(samples, begin).slice();
      tail = before(samples, samples.length).slice();
      open = samples[samples.length - 1];
      openLength = samples.length - begin;
      next = from + samples.length;
      block = nothing;
    },
    end() {
      at = -openLength;
      to = 0;
      if (openLength > 1) close(open, next);
      for (const one of waiting) visitor.longRun({ ...one, after: one.after.subarray(0, one.filled) });
      waiting = [];
    },
  };
}

/** Whether the signal hardly moves in the samples from here on; false where they are not all in the block. */
function isStill(samples: Float64Array, from: number): boolean {
  if (from < 0 || from + looked > samples.length) return false;
  let left = mostStill;
  for (let k = from + 1; k < from + looked && left > 0; k++) if (samples[k] === samples[k - 1]) left--;
  return left === 0;
}
