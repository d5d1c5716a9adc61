import { relativeStandardError } from '../evaluation/errorTally';
import type { SearchResult } from './searchResult';

/** A candidate by its places in the grid. */
export interface Candidate {
  length: number;
  delay: number;
  regularisation: number;
}

/** Σ e² of a candidate, one number a left-out block; NaN where its fit cannot be solved. A view. */
export function blockErrors({ grid, blocks, errors }: SearchResult, candidate: Candidate): Float64Array {
  const { length, delay, regularisation } = candidate;
  const place = (length * grid.delays.length + delay) * grid.regularisations.length + regularisation;
  return errors.subarray(place * blocks, (place + 1) * blocks);
}

/** Cross-validated normalised error: Σ e² over Σ d² of all left-out blocks; NaN where a fit cannot be solved. */
export function crossValidated(result: SearchResult, candidate: Candidate): number {
  return total(blockErrors(result, candidate)) / total(blockDesired(result, candidate));
}

/** Relative standard error of the same from the left-out blocks; null for fewer than four. */
export function crossValidatedError(result: SearchResult, candidate: Candidate): number | null {
  const error = blockErrors(result, candidate);
  return relativeStandardError({ error, desired: blockDesired(result, candidate) });
}

/** Normalised error of the fit on everything, over what it was fitted to. */
export function fitted({ grid, fit, fitDesired }: SearchResult, candidate: Candidate): number {
  const { length, delay, regularisation } = candidate;
  const place = (length * grid.delays.length + delay) * grid.regularisations.length + regularisation;
  return fit[place] / fitDesired[delay];
}

/**
 * By how much the cross-validated error of one candidate exceeds another's, and the standard error of that: from the
 * differences block by block, so that what makes a block hard for both (its level, say) does not count.
 */
export function pairedExcess(
  result: SearchResult,
  candidate: Candidate,
  other: Candidate,
): { excess: number; standardError: number } {
  const [first, second] = [candidate, other].map((one) => {
    const desired = total(blockDesired(result, one));
    return blockErrors(result, one).map((energy) => energy / desired);
  });
  const differences = first.map((share, b) => share - second[b]);
  const blocks = differences.length;
  const excess = total(differences);
  const squares = differences.reduce(
    (sum, gap) => sum + (gap - excess / blocks) * (gap - excess / blocks),
    0,
  );
  return { excess, standardError: Math.sqrt((squares * blocks) / (blocks - 1)) };
}

/** The candidate of least value among those given; null where none has one. */
export function least(
  candidates: Iterable<Candidate>,
  value: (candidate: Candidate) => number,
): Candidate | null {
  let best: Candidate | null = null;
  let lowest = Number.POSITIVE_INFINITY;
  for (const candidate of candidates) {
    const own = value(candidate);
    if (!(own < lowest)) continue;
    best = candidate;
    lowest = own;
  }
  return best;
}

/** All candidates of some lengths and delays, by their places. */
export function* candidatesOf(
  { grid }: SearchResult,
  lengths: readonly number[] = grid.lengths.map((_, l) => l),
  delays: readonly number[] = grid.delays.map((_, d) => d),
): Iterable<Candidate> {
  for (const length of lengths) {
    for (const delay of delays) {
      for (let regularisation = 0; regularisation < grid.regularisations.length; regularisation++) {
        yield { length, delay, regularisation };
      }
    }
  }
}

function blockDesired({ blocks, desired }: SearchResult, { delay }: Candidate): Float64Array {
  return desired.subarray(delay * blocks, (delay + 1) * blocks);
}

function total(row: Float64Array): number {
  return row.reduce((sum, value) => sum + value, 0);
}
