import type { Estimate } from '../../core/confidence/estimate';
import type { Take } from '../../core/pair/take';
import { newFold } from '../../core/solvers/fold';
import type { FilterShape } from '../../core/statistics/gatherSums';
import { solveTakes } from './takes';

/** Taps fitted to takes by the public functions, with all that their standard errors need; no symmetry, no fixed gain. */
export async function estimateOf(
  takes: readonly Take[],
  shape: FilterShape,
  regularisation = 0,
): Promise<Estimate> {
  const { moments, system, solution } = await solveTakes(takes, shape, regularisation);
  if ('smallestRegularisation' in solution) throw new Error('not solved');
  return {
    filter: {
      coefficients: solution.coefficients,
      delay: shape.delay,
      means: moments.means,
      band: shape.band ?? null,
    },
    fold: newFold(shape.length, 'none'),
    gain: null,
    whole: system,
    system,
    regularisation,
  };
}
