import type { Pace } from '../pace';
import type { JointSums, Layout, Statistics } from './blockSums';
import { fitEnergies } from './fitEnergies';
import type { Grid } from './grid';
import { crossSums, desiredEnergies, inputSums } from './jointParts';
import { type LengthFits, nestedFitter } from './nestedFits';
import { product } from './product';
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
  const floor = statistics.floor && fitEnergies(inputSums(statistics.floor, layout));
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
      outputsOf: fitEnergies(inputSums(sums, layout)),
    })),
  };
}

function noteErrors(result: SearchResult, fold: Fold, from: number, rho: number, fits: LengthFits): void {
  const { grid, blocks, inputs, errors } = result;
  const delays = grid.delays.length;
  const outputs = new Float64Array(delays);
  fold.leftOut.forEach(({ energies, cross, outputsOf }, b) => {
    outputsOf(fits, outputs);
    for (let d = 0; d < delays; d++) {
      const both = product(fits.taps[d], cross[d], fits.length * inputs);
      const place = (fits.place * delays + d) * grid.regularisations.length + rho;
      errors[place * blocks + from + b] = Math.max(0, energies[d] - 2 * both + outputs[d]);
    }
  });
}

/** Of the samples that it was fitted to: `(Φ + F) w = θ - L ρ w`, F the floor, leaves `Σ d² - wᵀθ - L ρ ‖w‖² - wᵀFw`. */
function noteFit(
  result: SearchResult,
  cross: readonly Float64Array[],
  floor: ReturnType<typeof fitEnergies> | null,
  rho: number,
  fits: LengthFits,
): void {
  const { grid, inputs, samples, fit, fitDesired, freedom } = result;
  const regularisation = grid.regularisations[rho];
  const unknowns = fits.length * inputs;
  const floors = new Float64Array(grid.delays.length);
  floor?.(fits, floors);
  for (let d = 0; d < grid.delays.length; d++) {
    const taps = fits.taps[d];
    const penalty = samples * regularisation * product(taps, taps, unknowns) + floors[d];
    const place = (fits.place * grid.delays.length + d) * grid.regularisations.length + rho;
    fit[place] = Math.max(0, fitDesired[d] - product(taps, cross[d], unknowns) - penalty);
  }
  freedom[fits.place * grid.regularisations.length + rho] = unknowns - regularisation * fits.inverseTrace;
}
