import type { Pace } from '../pace';
import { newRunningMoments, type RunningMoments } from '../statistics/runningMoments';
import type { Means } from './signals';
import { noMeans, signalReader } from './signals';
import type { Take } from './take';

/** Means and powers of the signals over the fit intervals of all takes together. */
export interface Moments {
  means: Means;
  /** Mean square of each input after mean removal (of the raw input where means are kept). */
  inputPowers: number[];
  /** Of the desired signal, likewise. */
  desiredPower: number;
}

const block = 65536;

/**
 * One pass over the fit intervals.
 * @param removeMean whether the means are to be taken off; if not, they are given as 0
 */
export async function measureMoments(
  takes: readonly Take[],
  removeMean: boolean,
  pace: Pace,
): Promise<Moments> {
  const inputs = takes[0].inputs.map(() => newRunningMoments());
  const desired = newRunningMoments();
  for (const take of takes) {
    const none = noMeans(take.inputs.length);
    const read = signalReader(take, { means: none, delay: 0, reuse: true });
    for (const { from, to } of take.fit) {
      for (let start = from; start < to; start += block) {
        const signals = await read(start, Math.min(to, start + block));
        signals.inputs.forEach((samples, r) => {
          inputs[r].add(samples);
        });
        desired.add(signals.desired);
        await pace.step('levels', start - from, to - from);
      }
    }
  }
  const power = (tally: RunningMoments) =>
    tally.squares / tally.count + (removeMean ? 0 : tally.mean * tally.mean);
  return {
    means: {
      inputs: inputs.map((tally) => (removeMean ? tally.mean : 0)),
      desired: removeMean ? desired.mean : 0,
    },
    inputPowers: inputs.map(power),
    desiredPower: power(desired),
  };
}
