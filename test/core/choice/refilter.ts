import { expect } from 'vitest';
import { gatherStatistics } from '../../../core/choice/blockSums';
import { cutFolds, type Fold, type Folds, type Part } from '../../../core/choice/folds';
import type { Grid } from '../../../core/choice/grid';
import { type SearchOptions, search } from '../../../core/choice/search';
import type { SearchResult } from '../../../core/choice/searchResult';
import type { BandFilter } from '../../../core/pair/bandFilter';
import { bandReader } from '../../../core/pair/bandSignals';
import type { Interval } from '../../../core/pair/intervals';
import { type Moments, measureMoments } from '../../../core/pair/moments';
import { signalReader } from '../../../core/pair/signals';
import type { Take } from '../../../core/pair/take';
import { normalSystem } from '../../../core/solvers/normalSystem';
import { solve } from '../../../core/solvers/solve';
import { gatherSums } from '../../../core/statistics/gatherSums';
import { normals } from '../../support/random';
import { convolve, pace } from '../../support/takes';

export interface Case {
  takes: Take[];
  grid: Grid;
  band?: BandFilter;
}

interface Searched {
  moments: Moments;
  folds: Folds;
  result: SearchResult;
}

export async function searched(
  { takes, grid, band }: Case,
  options: Partial<SearchOptions> = {},
): Promise<Searched> {
  const length = grid.lengths.at(-1) ?? 0;
  const history = band?.history ?? 0;
  const folds = cutFolds(takes, { length, delays: grid.delays, history, measured: null });
  const moments = await measureMoments(takes, true, pace);
  const layout = { inputs: takes[0].inputs.length, length, delays: grid.delays };
  const statistics = await gatherStatistics(takes, folds, layout, moments, pace, band);
  return { moments, folds, result: await search(statistics, layout, grid, { first: 0, pace, ...options }) };
}

/** The takes with the parts as their fit intervals and everything else listed too, so that nothing is a gap. */
function takesOf(takes: readonly Take[], parts: readonly Part[]): Take[] {
  return parts.map(({ take, intervals }) => {
    const all = takes[take];
    const samples = all.desired.recording.samples;
    const rest: Interval[] = [];
    let from = 0;
    for (const interval of intervals) {
      if (interval.from > from) rest.push({ from, to: interval.from });
      from = interval.to;
    }
    if (from < samples) rest.push({ from, to: samples });
    return { ...all, fit: intervals, heldOut: rest };
  });
}

async function filtered(
  takes: readonly Take[],
  { training, blocks }: Fold,
  moments: Moments,
  length: number,
  delay: number,
  regularisation: number,
  band?: BandFilter,
): Promise<number[]> {
  const { means, inputPowers, desiredPower } = moments;
  const sums = await gatherSums(
    takesOf(takes, training),
    { length, delay, windowing: 'covariance', band: band ?? null },
    means,
    pace,
  );
  const solution = solve(normalSystem(sums, inputPowers), sums.inputs, regularisation);
  if (!('coefficients' in solution)) throw new Error('not solvable');
  const errors: number[] = [];
  for (const { take, intervals } of blocks) {
    const raw = signalReader(takes[take], { means, delay });
    const read = band === undefined ? raw : bandReader(raw, band);
    let energy = 0;
    for (const { from, to } of intervals) {
      const { inputs, desired } = await read(from, to, length - 1);
      for (let n = 0; n < desired.length; n++) {
        let e = desired[n];
        solution.coefficients.forEach((row, r) => {
          for (let k = 0; k < length; k++) e -= row[k] * inputs[r][n + length - 1 - k];
        });
        energy += e * e;
      }
    }
    errors.push(energy / desiredPower);
  }
  return errors;
}

export async function largestGap(given: Case): Promise<{ gap: number; nmseDb: number }> {
  const { moments, folds, result } = await searched(given);
  const { takes, grid } = given;
  let gap = 0;
  let best = Number.POSITIVE_INFINITY;
  for (const [l, length] of grid.lengths.entries()) {
    for (const [d, delay] of grid.delays.entries()) {
      for (const [r, rho] of grid.regularisations.entries()) {
        let block = 0;
        for (const fold of folds.folds) {
          for (const energy of await filtered(takes, fold, moments, length, delay, rho, given.band)) {
            const place = (l * grid.delays.length + d) * grid.regularisations.length + r;
            const got = result.errors[place * folds.blocks + block];
            gap = Math.max(gap, Math.abs(got - energy) / energy);
            best = Math.min(best, energy / result.desired[d * folds.blocks + block]);
            block++;
          }
        }
        expect(block).toBe(folds.blocks);
      }
    }
  }
  return { gap, nmseDb: 10 * Math.log10(best) };
}

const path = Float64Array.from({ length: 20 }, (_, k) => Math.cos(1.1 * k) * 0.9 ** k);

/** Noise through a resonance, and what the path makes of it. */
export function pathTake(
  seed: number,
  samples: number,
  noise: number,
  coloured = true,
): [Float64Array, Float64Array] {
  const x = normals(seed, samples);
  if (coloured) for (let n = 2; n < samples; n++) x[n] += 1.2 * x[n - 1] - 0.7 * x[n - 2];
  const white = normals(seed + 1000, samples);
  const clean = convolve(x, path);
  const power = Math.sqrt(clean.reduce((sum, v) => sum + v * v, 0) / samples);
  return [x, clean.map((value, n) => 0.3 + value + noise * power * white[n])];
}
