import { decibelsOfE, powerDecibels } from '../figures/decibels';
import { type Candidate, crossValidated, crossValidatedError, fitted } from './candidate';
import type { SearchResult } from './searchResult';

/** Errors of some candidates in dB; NaN where a candidate is not in the grid or could not be solved. */
export interface ErrorCurve {
  /** Cross-validated. */
  crossDb: Float64Array;
  /** Standard error of that; NaN for fewer than four blocks. */
  errorDb: Float64Array;
  /** Of the fit on everything. */
  fitDb: Float64Array;
}

export function errorCurve(search: SearchResult, candidates: readonly Candidate[]): ErrorCurve {
  const row = (value: (candidate: Candidate) => number) => Float64Array.from(candidates, value);
  return {
    crossDb: row((candidate) => crossDb(search, candidate)),
    errorDb: row((candidate) => decibelsOfE * (crossValidatedError(search, candidate) ?? Number.NaN)),
    fitDb: row((candidate) => powerDecibels(fitted(search, candidate))),
  };
}

/** Cross-validated error in dB; NaN where the candidate is not in the grid or could not be solved. */
export function crossDb(search: SearchResult, candidate: Candidate): number {
  const inGrid = candidate.length >= 0 && candidate.delay >= 0 && candidate.regularisation >= 0;
  return inGrid ? powerDecibels(crossValidated(search, candidate)) : Number.NaN;
}
