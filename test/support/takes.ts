import { newPace } from '../../core/pace';
import { type Moments, measureMoments } from '../../core/pair/moments';
import type { Take } from '../../core/pair/take';
import type { Recording } from '../../core/recordings/recording';
import { type NormalSystem, normalSystem } from '../../core/solvers/normalSystem';
import { type Solution, solve, type Unsolvable } from '../../core/solvers/solve';
import { type FilterShape, gatherSums } from '../../core/statistics/gatherSums';
import type { NormalSums } from '../../core/statistics/normalSums';

export const pace = newPace();

/** A recording whose samples are in memory. */
export function recordingOf(channels: readonly Float64Array[], sampleRate: number | null = 1000): Recording {
  return {
    file: 'memory',
    format: 'memory',
    pcm: false,
    lineEndsIgnored: false,
    sampleRate,
    samples: channels[0].length,
    channels: channels.map(() => null),
    read: async (wanted, from, to) => {
      if (from < 0 || to > channels[0].length || to < from) throw new Error(`read of [${from}, ${to})`);
      return wanted.map((c) => channels[c].slice(from, to));
    },
  };
}

/** A take of one recording: inputs first, the desired signal last. */
export function takeOf(
  inputs: readonly Float64Array[],
  desired: Float64Array,
  intervals: Partial<Pick<Take, 'fit' | 'heldOut' | 'disturbanceOnly'>> = {},
): Take {
  const recording = recordingOf([...inputs, desired]);
  return {
    name: 'take',
    inputs: inputs.map((_, channel) => ({ recording, channel })),
    desired: { recording, channel: inputs.length },
    fit: [{ from: 0, to: desired.length }],
    heldOut: [],
    disturbanceOnly: [],
    ...intervals,
  };
}

export interface Solved {
  moments: Moments;
  sums: NormalSums;
  system: NormalSystem;
  solution: Solution | Unsolvable;
}

/** Statistics and solution of takes by the public functions. */
export async function solveTakes(
  takes: readonly Take[],
  shape: FilterShape,
  regularisation = 0,
  removeMean = false,
): Promise<Solved> {
  const moments = await measureMoments(takes, removeMean, pace);
  const sums = await gatherSums(takes, shape, moments.means, pace);
  const system = normalSystem(sums, moments.inputPowers);
  return { moments, sums, system, solution: solve(system, sums.inputs, regularisation) };
}

/** The taps of {@link solveTakes}; throws where the system could not be solved. */
export async function tapsOf(...args: Parameters<typeof solveTakes>): Promise<Float64Array[]> {
  const { solution } = await solveTakes(...args);
  if (!('coefficients' in solution)) throw new Error(`not solvable: ${JSON.stringify(solution)}`);
  return solution.coefficients;
}

/** Σ_r Σ_k w_r[k] x_r[n-k] with zeros before the start. */
export function convolve(x: Float64Array, w: ArrayLike<number>): Float64Array {
  return x.map((_, n) => {
    let sum = 0;
    for (let k = 0; k < Math.min(w.length, n + 1); k++) sum += w[k] * x[n - k];
    return sum;
  });
}
