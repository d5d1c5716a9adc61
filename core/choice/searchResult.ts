import type { Layout, Statistics } from './blockSums';
import type { Grid } from './grid';

/** Errors of all candidates. Energies are free of units: 1 is the power of the desired signal. */
export interface SearchResult {
  grid: Grid;
  /** K */
  inputs: number;
  /** Left-out blocks. */
  blocks: number;
  /** Number of n over which `fit` is taken. */
  samples: number;
  /** Σ e² at `((length · delays + delay) · regularisations + regularisation) · blocks + block`, by places in the grid; NaN where the fit cannot be solved, or has not been yet. */
  errors: Float64Array;
  /** Σ d² at `delay · blocks + block`. */
  desired: Float64Array;
  /** Σ e² of the fit on everything over everything, at `(length · delays + delay) · regularisations + regularisation`. */
  fit: Float64Array;
  /** Σ d² of it, one a delay. */
  fitDesired: Float64Array;
  /** Unknowns that the regularisation leaves free in effect, at `length · regularisations + regularisation`. */
  freedom: Float64Array;
}

/** Nothing known yet. */
export function emptyResult({ all, folds }: Statistics, { inputs }: Layout, grid: Grid): SearchResult {
  const blocks = folds.reduce((sum, fold) => sum + fold.blocks.length, 0);
  const [lengths, delays, rhos] = [grid.lengths.length, grid.delays.length, grid.regularisations.length];
  return {
    grid,
    inputs,
    blocks,
    samples: all.count,
    errors: new Float64Array(lengths * delays * rhos * blocks).fill(Number.NaN),
    desired: new Float64Array(delays * blocks),
    fit: new Float64Array(lengths * delays * rhos).fill(Number.NaN),
    fitDesired: new Float64Array(delays),
    freedom: new Float64Array(lengths * rhos).fill(Number.NaN),
  };
}
