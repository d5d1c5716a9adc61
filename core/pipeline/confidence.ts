import type { Estimate } from '../confidence/estimate';
import { residualSums } from '../confidence/residualSums';
import { type ResidualTests, residualLags, residualTests, residualWindow } from '../confidence/residuals';
import { type ErrorsWithheld, type TapErrors, tapErrors } from '../confidence/tapErrors';
import { fitStretches } from '../evaluation/fitStretches';
import type { Pace } from '../pace';
import type { Fit } from './fitPair';
import type { Pairing } from './pairing';

/** How sure the taps are and whether anything is left in the residual of the fit. */
export interface Confidence {
  /** Lags of the residual's correlation that count. */
  window: number;
  errors: TapErrors | { withheld: ErrorsWithheld };
  residuals: ResidualTests;
}

/** Runs the filter over the fit once more, or over a sample of it where it is long. */
export async function confidenceOf({ document, takes }: Pairing, fit: Fit, pace: Pace): Promise<Confidence> {
  const { windowing, regularisation, fixedGain, length } = document.filter;
  const { filter, fold, gain, whole, system } = fit;
  const estimate: Estimate = {
    filter,
    fold,
    gain: gain && { conditions: gain, input: (fixedGain?.input ?? 1) - 1 },
    whole,
    system,
    regularisation,
  };
  const samples = fitStretches(takes, windowing, filter).reduce((sum, { count }) => sum + count, 0);
  const window = residualWindow(samples);
  const sums = await residualSums(takes, windowing, filter, residualLags(length, window), pace);
  return {
    window,
    errors: await tapErrors(estimate, sums, window, pace),
    residuals: residualTests(estimate, sums, window, document.job),
  };
}
