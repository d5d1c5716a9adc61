import {
  type Candidate,
  candidatesOf,
  crossValidated,
  crossValidatedError,
  least,
  pairedExcess,
} from './candidate';
import type { SearchResult } from './searchResult';

/** A candidate by its values, with its cross-validated error as a share of the desired signal's power. */
export interface Rated {
  length: number;
  delay: number;
  regularisation: number;
  nmse: number;
}

/** One step of the length: what the best filter of it loses against the best of all. */
export interface LengthStep extends Rated {
  /** Paired, as shares of the desired signal's power. */
  excess: number;
  standardError: number;
}

export interface Suggestion {
  chosen: Rated;
  /** Relative standard error of its error; null for fewer than four blocks. */
  relativeError: number | null;
  /** By how much it exceeds the best of all, and the standard error of that. */
  excess: number;
  standardError: number;
  best: Rated;
  /** The best filter of each length that could be solved, shortest first. */
  steps: LengthStep[];
}

/**
 * 0.05 dB, as a share of the best error: blocks of a long recording tell smaller differences from zero, but they are not
 * worth a tap (common practice).
 */
const negligible = 0.01157945425989968;

/**
 * The one-standard-error rule (Hastie, Tibshirani & Friedman, *The Elements of Statistical Learning*, 2nd ed., 7.10) on
 * paired block differences: the smallest length whose error exceeds the best of all by at most one standard error, then
 * the delay of least error, then the largest regularisation that keeps to the same bound. Differences that blocks tell
 * from zero but that are {@link negligible} count as none.
 * @param keptDelay place of the only delay that may be suggested (a horizon is not free to choose); null for any
 * @returns null where no candidate could be solved on every fold
 */
export function suggest(result: SearchResult, keptDelay: number | null): Suggestion | null {
  const { grid } = result;
  const delays = keptDelay === null ? undefined : [keptDelay];
  const error = (candidate: Candidate) => crossValidated(result, candidate);
  const best = least(candidatesOf(result, undefined, delays), error);
  if (best === null) return null;
  const rated = (candidate: Candidate): Rated => ({
    length: grid.lengths[candidate.length],
    delay: grid.delays[candidate.delay],
    regularisation: grid.regularisations[candidate.regularisation],
    nmse: error(candidate),
  });
  const within = (candidate: Candidate) => {
    const { excess, standardError } = pairedExcess(result, candidate, best);
    return excess <= Math.max(standardError, negligible * error(best));
  };
  const ofLength = grid.lengths.map((_, length) => least(candidatesOf(result, [length], delays), error));
  const shortest = ofLength.find((candidate) => candidate !== null && within(candidate)) ?? best;
  let chosen = shortest;
  for (let place = grid.regularisations.length - 1; place > shortest.regularisation; place--) {
    const stronger = { ...shortest, regularisation: place };
    if (!within(stronger)) continue;
    chosen = stronger;
    break;
  }
  return {
    chosen: rated(chosen),
    relativeError: crossValidatedError(result, chosen),
    ...pairedExcess(result, chosen, best),
    best: rated(best),
    steps: ofLength
      .filter((candidate) => candidate !== null)
      .map((candidate) => ({ ...rated(candidate), ...pairedExcess(result, candidate, best) })),
  };
}
