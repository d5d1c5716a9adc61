import { type TargetFilter, targetInput, targetSimulator } from '../numbers/targetFilter';
import { type SignalReader, signalReader } from '../pair/signals';
import type { Take } from '../pair/take';
import { type Filter, filterLength } from './filter';
import type { TargetTally } from './targetTally';

/** Reads a take once for both the ideal filter and the target's. */
export interface TargetReader {
  /** Signals with their means taken off, with the filter's history. */
  read: SignalReader;
  /** The target's output over `[from, to)` of what was read last, in counts. */
  counts(from: number, to: number): Float64Array;
}

/** @param tally receives what the target's bit-true run counted */
export function targetReader(
  take: Take,
  filter: Filter,
  target: TargetFilter,
  tally: TargetTally,
): TargetReader {
  const { means, delay } = filter;
  const none = { inputs: means.inputs.map(() => 0), desired: 0 };
  const readRaw = signalReader(take, { means: none, delay, reuse: true });
  const simulate = targetSimulator(target);
  const history = filterLength(filter) - 1;
  let start = 0;
  let output: Float64Array = new Float64Array(0);
  return {
    async read(from, to) {
      const raw = await readRaw(from, to, history);
      const simulation = simulate(raw.inputs.map((samples, r) => targetInput(target, r, samples)));
      tally.count(simulation);
      ({ output } = simulation);
      start = from;
      raw.inputs.forEach((samples, r) => {
        subtract(samples, means.inputs[r]);
      });
      subtract(raw.desired, means.desired);
      return raw;
    },
    counts: (from, to) => output.subarray(from - start, to - start),
  };
}

function subtract(samples: Float64Array, mean: number): void {
  if (mean === 0) return;
  for (let k = 0; k < samples.length; k++) samples[k] -= mean;
}
