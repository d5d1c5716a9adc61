import type { Pace } from '../pace';
import type { JointSums, Layout, Statistics } from './blockSums';
import type { Grid } from './grid';
import { crossSums, desiredEnergies, inputSums } from './jointParts';
import { type LengthFits, nestedFitter } from './nestedFits';
import { type OutputEnergy, outputEnergy } from './outputEnergy';
import { emptyResult, type SearchResult } from './searchResult';

export interface SearchOptions {
  /** The regularisation that is computed first, so that its curves can be shown soonest. */
  first: number;
  pace: Pace;
  /** Called with the result so far as soon as all candidates of a regularisation are known. */
  onCurves?: (soFar: SearchResult, regularisation: number) => void;
}

/**
 * The error of every candidate on every left-out block, without filtering: `Σ d² - 2 wᵀθ + wᵀΦw` from the exact sums of
 * the block, w fitted on the rest. All lengths and delays of a fold and regularisation come from one factorisation.
 * Error about 1e-13 of Σ d².
 * @throws Stopped where the pace is stopped
 */
export async function search(
  statistics: Statistics,
  layout: Layout,
  grid: Grid,
  { first, pace, onCurves }: SearchOptions,
): Promise<SearchResult> {
  const result = emptyResult(statistics, layout, grid);
  const folds = [
    newFold(statistics.all, [], layout),
    ...statistics.folds.map(({ training, blocks }) => newFold(training, blocks, layout)),
  ];
  const cross = crossSums(statistics.all, layout);
  const floor = statistics.floor && outputEnergy(inputSums(statistics.floor, layout));
  result.fitDesired.set(desiredEnergies(statistics.all, layout));
  let block = 0;
  for (const { leftOut } of folds) {
    for (const { energies } of leftOut) {
      for (let d = 0; d < energies.length; d++) result.desired[d * result.blocks + block] = energies[d];
      block++;
    }
  }
  const order = grid.regularisations.map((_, i) => i);
  order.sort((a, b) => Number(b === first) - Number(a === first));
  for (const [done, rho] of order.entries()) {
    const regularisation = grid.regularisations[rho];
    let from = 0;
    for (const [f, fold] of folds.entries()) {
      for (const fits of fold.fits(regularisation, grid.lengths)) {
        if (f === 0) noteFit(result, cross, floor, rho, fits);
        else noteErrors(result, fold, from, rho, fits);
        await pace.step('cross-validation', done * folds.length + f, order.length * folds.length);
      }
      from += fold.leftOut.length;
    }
    onCurves?.(result, rho);
  }
  return result;
}

type Fold = ReturnType<typeof newFold>;

function newFold(training: JointSums, blocks: readonly JointSums[], layout: Layout) {
  return {
    fits: nestedFitter(training, layout),
    leftOut: blocks.map((sums) => ({
      energies: desiredEnergies(sums, layout),
      cross: crossSums(sums, layout),
      outputs: outputEnergy(inputSums(sums, layout)),
    })),
  };
}

function noteErrors(result: SearchResult, fold: Fold, from: number, rho: number, fits: LengthFits): void {
  const { grid, blocks, inputs, errors } = result;
  const delays = grid.delays.length;
  const outputs = new Float64Array(delays);
  fold.leftOut.forEach(({ energies, cross, outputs: energyOf }, b) => {
    energyOf(fits.taps, fits.length, outputs);
    for (let d = 0; d < delays; d++) {
      const product = inner(fits.taps[d], cross[d], fits.length * inputs);
      const place = (fits.place * delays + d) * grid.regularisations.length + rho;
      errors[place * blocks + from + b] = Math.max(0, energies[d] - 2 * product + outputs[d]);
    }
  });
}

/** Of the samples that it was fitted to: `(Φ + F) w = θ - L ρ w`, F the floor, leaves `Σ d² - wᵀθ - L ρ ‖w‖² - wᵀFw`. */
function noteFit(
  result: SearchResult,
  cross: readonly Float64Array[],
  floor: OutputEnergy | null,
  rho: number,
  fits: LengthFits,
): void {
  const { grid, inputs, samples, fit, fitDesired, freedom } = result;
  const regularisation = grid.regularisations[rho];
  const unknowns = fits.length * inputs;
  const floors = new Float64Array(grid.delays.length);
  floor?.(fits.taps, fits.length, floors);
  for (let d = 0; d < grid.delays.length; d++) {
    const taps = fits.taps[d];
    const penalty = samples * regularisation * inner(taps, taps, unknowns) + floors[d];
    const place = (fits.place * grid.delays.length + d) * grid.regularisations.length + rho;
    fit[place] = Math.max(0, fitDesired[d] - inner(taps, cross[d], unknowns) - penalty);
  }
  freedom[fits.place * grid.regularisations.length + rho] = unknowns - regularisation * fits.inverseTrace;
}

function inner(a: Float64Array, b: Float64Array, count: number): number {
  let even = 0;
  let odd = 0;
  const pairs = count - (count % 2);
  for (let k = 0; k < pairs; k += 2) {
    even += a[k] * b[k];
    odd += a[k + 1] * b[k + 1];
  }
  return even + odd + (pairs < count ? a[pairs] * b[pairs] : 0);
}
