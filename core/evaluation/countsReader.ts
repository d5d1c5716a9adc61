import { type TargetFilter, targetInput } from '../numbers/targetFilter';
import { noMeans, type SignalReader, signalReader, subtractMean } from '../pair/signals';
import type { Take } from '../pair/take';
import { type Filter, filterLength } from './filter';

/** Reads a take once for both the ideal filter and the target's. */
export interface CountsReader {
  /** Signals with their means taken off, with the filter's history. They hold until the next call. */
  read: SignalReader;
  /** What the target's filter sees of `[from, to)` of what was read last, with the same history, in counts. */
  counts(from: number, to: number): Float64Array[];
}

export function countsReader(take: Take, filter: Filter, target: TargetFilter): CountsReader {
  const { means, delay } = filter;
  const readRaw = signalReader(take, { means: noMeans(means.inputs.length), delay, reuse: true });
  const history = filterLength(filter) - 1;
  let start = 0;
  let rows: Float64Array[] = [];
  return {
    async read(from, to) {
      const raw = await readRaw(from, to, history);
      rows = raw.inputs.map((samples, r) => targetInput(target, r, samples));
      start = from;
      raw.inputs.forEach((samples, r) => {
        subtractMean(samples, means.inputs[r]);
      });
      subtractMean(raw.desired, means.desired);
      return raw;
    },
    counts: (from, to) => rows.map((row) => row.subarray(from - start, to - start + history)),
  };
}
