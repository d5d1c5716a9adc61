import { decibelsOfE, powerDecibels } from '../figures/decibels';
import { type Candidate, candidatesOf, fitted, least } from './candidate';
import type { SearchResult } from './searchResult';

export type Criterion = 'aic' | 'mdl' | 'gcv';

/** What a criterion would choose from the fit alone. */
export interface Opinion {
  criterion: Criterion;
  length: number;
  delay: number;
  regularisation: number;
}

/**
 * Second opinions, from the error of the fit E over N samples and the q unknowns that the regularisation leaves free
 * (trace of the matrix that turns d into y; all unknowns where it is 0). All assume a white error and so tend to longer
 * filters than cross-validation where it is not:
 * - AIC `N ln E + 2q` (Akaike, *IEEE Trans. Automatic Control* 19, 1974)
 * - MDL `N ln E + q ln N` (Rissanen, *Automatica* 14, 1978)
 * - generalised cross-validation `E / (1 - q/N)²` (Golub, Heath & Wahba, *Technometrics* 21, 1979)
 *
 * Formulas from memory.
 * @param keptDelay as for `suggest`
 */
export function secondOpinions(result: SearchResult, keptDelay: number | null): Opinion[] {
  const { grid, samples, freedom } = result;
  const delays = keptDelay === null ? undefined : [keptDelay];
  const logOf = (share: number) => powerDecibels(share) / decibelsOfE;
  const unknowns = ({ length, regularisation }: Candidate) =>
    freedom[length * grid.regularisations.length + regularisation];
  const misfit = (candidate: Candidate) => samples * logOf(fitted(result, candidate));
  const criteria: Record<Criterion, (candidate: Candidate) => number> = {
    aic: (candidate) => misfit(candidate) + 2 * unknowns(candidate),
    mdl: (candidate) => misfit(candidate) + logOf(samples) * unknowns(candidate),
    gcv: (candidate) => {
      const left = 1 - unknowns(candidate) / samples;
      return left > 0 ? fitted(result, candidate) / (left * left) : Number.NaN;
    },
  };
  return (Object.keys(criteria) as Criterion[]).flatMap((criterion) => {
    const chosen = least(candidatesOf(result, undefined, delays), criteria[criterion]);
    if (chosen === null) return [];
    return [
      {
        criterion,
        length: grid.lengths[chosen.length],
        delay: grid.delays[chosen.delay],
        regularisation: grid.regularisations[chosen.regularisation],
      },
    ];
  });
}
