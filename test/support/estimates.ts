import type { Estimate } from '../../core/confidence/estimate';
import { residualSums } from '../../core/confidence/residualSums';
import {
  type ResidualTests,
  residualLags,
  residualTests,
  residualWindow,
} from '../../core/confidence/residuals';
import type { Job } from '../../core/document/pairingDocument';
import type { Take } from '../../core/pair/take';
import { newFold } from '../../core/solvers/fold';
import type { FilterShape } from '../../core/statistics/gatherSums';
import { pace, solveTakes } from './takes';

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

/** The tests of the residual of such a fit, as the pipeline makes them. */
export async function residualTestsOf(
  takes: readonly Take[],
  shape: FilterShape,
  job: Job = 'identify',
  regularisation = 1e-6,
): Promise<ResidualTests> {
  const estimate = await estimateOf(takes, shape, regularisation);
  const window = residualWindow(takes.reduce((sum, { desired }) => sum + desired.recording.samples, 0));
  const lags = residualLags(shape.length, window);
  const sums = await residualSums(takes, shape.windowing, estimate.filter, lags, pace);
  return residualTests(estimate, sums, window, job);
}
