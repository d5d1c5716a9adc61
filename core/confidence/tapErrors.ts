import type { Pace } from '../pace';
import { tapInfluences } from './bread';
import { type Estimate, unknownsOf } from './estimate';
import { inverseOf } from './inverse';
import type { ResidualSums } from './residualSums';
import { gatherResponses, type ResponseErrors } from './responseErrors';
import { scoreCovariance } from './scoreCovariance';

/** How sure the taps of a fit are. */
export interface TapErrors {
  /** Standard error of each tap, one row an input, newest-first, in the unit of the taps. */
  standardErrors: Float64Array[];
  response: ResponseErrors;
}

/** Why there are none. */
export type ErrorsWithheld = 'too-many-taps' | 'too-few-samples' | 'not-invertible';

/** Unknowns up to which they are told: a second or so, half a minute where the matrix has no structure. */
export const mostForErrors = 2048;

/** Samples for each unknown below which the residual says too little of the noise (common practice). */
const samplesPerUnknown = 2;

/** 95 % of a normal distribution lie within so many standard errors. */
export const normal95 = 1.959963984540054;

/** Whether a tap can be told from zero (95 %). */
export function toldFromZero(tap: number, standardError: number): boolean {
  return Math.abs(tap) > normal95 * standardError;
}

/**
 * Standard errors by the sandwich `A⁻¹ S A⁻¹ / L` for a coloured residual, A being the regularised normal matrix and S
 * that of {@link scoreCovariance}. Regularisation pulls the taps towards zero: the errors are those about where it leaves
 * them, and so are those of a filter shorter than the path. O(n² log n) where the matrix has a shift structure, O(n³)
 * otherwise.
 * @param sums of at least M lags and the window's
 * @param window lags of the residual's correlation that count
 */
export async function tapErrors(
  estimate: Estimate,
  sums: ResidualSums,
  window: number,
  pace: Pace,
): Promise<TapErrors | { withheld: ErrorsWithheld }> {
  const { fold, filter, system, regularisation } = estimate;
  const inputs = filter.coefficients.length;
  const freedom = unknownsOf(estimate);
  const { samples } = sums;
  if (system.size > mostForErrors) return { withheld: 'too-many-taps' };
  if (samples < samplesPerUnknown * freedom) return { withheld: 'too-few-samples' };
  const inverse = inverseOf(system, regularisation);
  if (inverse === null) return { withheld: 'not-invertible' };
  const score = scoreCovariance(sums, window, fold.length, freedom);
  const responses = gatherResponses(score, inputs, fold.length);
  const standardErrors = Array.from({ length: inputs }, () => new Float64Array(fold.length));
  let done = 0;
  for (const { input, members, rows } of tapInfluences(estimate, inverse)) {
    const spectra = score.spectrum(rows);
    const error = Math.sqrt(Math.max(0, score.form(spectra, spectra) / samples));
    for (const { tap } of members) standardErrors[input][tap] = error;
    responses.add(input, members, spectra);
    await pace.step('standard errors', ++done, system.size);
  }
  return { standardErrors, response: await responses.errors(samples, pace) };
}
