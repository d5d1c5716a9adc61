import { gainDb } from '../confidence/residualFindings';
import type { CrossCorrelation, ResidualTests } from '../confidence/residuals';
import { type TapErrors, toldFromZero } from '../confidence/tapErrors';
import { errorShares } from '../evaluation/errorShares';
import { roundedDecibels } from '../figures/decibels';
import { decibelError, responseWithErrors } from '../figures/responseErrors';
import type { DesignResult } from '../pipeline/designResult';
import type { Json } from './jsonText';

/** Autocorrelation is written up to this lag. */
const writtenLags = 20;

/** How sure the taps are. Standard errors of taps are in their unit, those of the response in dB and degrees. */
export function confidenceJson({ coefficients, confidence }: DesignResult): Json {
  const { errors, window } = confidence;
  if ('withheld' in errors) return { withheld: errors.withheld };
  return {
    withheld: null,
    lagWindow: window,
    standardErrors: errors.standardErrors.map((row) => Array.from(row, (value) => rounded(value, 6))),
    notToldFromZero: coefficients.map((row, r) =>
      Array.from(row, (w, k) => (toldFromZero(w, errors.standardErrors[r][k]) ? -1 : k)).filter(
        (k) => k >= 0,
      ),
    ),
    response: coefficients.map((row, r) => responseJson(row, errors.response, r)),
  };
}

/** At `points` frequencies from 0 Hz to half the sample rate; null where the magnitude cannot be told from zero. */
function responseJson(row: Float64Array, { points, inputs }: TapErrors['response'], r: number): Json {
  const { magnitude, magnitudeError, phaseError } = responseWithErrors(row, inputs[r]);
  const inDecibels = Array.from(magnitude, (size, i) => decibelError(size, magnitudeError[i]));
  return {
    points,
    magnitudeErrorDb: inDecibels.map(roundedDecibels),
    phaseErrorDegrees: inDecibels.map((known, i) =>
      known === null ? null : rounded((180 / Math.PI) * phaseError[i], 3),
    ),
  };
}

/** Whether anything is left in the residual of the fit, and how the error shown in the pictures is spread. */
export function residualsJson({ confidence, inputs, spectra }: DesignResult): Json {
  const { residuals } = confidence;
  const { samples, autocorrelation, bound, whiteness } = residuals;
  return {
    samples,
    autocorrelation: Array.from(autocorrelation.subarray(0, writtenLags + 1), (value) => rounded(value, 4)),
    bound: rounded(bound, 4),
    ljungBox: whiteness && {
      lags: whiteness.lags,
      statistic: rounded(whiteness.statistic, 6),
      degreesOfFreedom: whiteness.degreesOfFreedom,
      probability: rounded(whiteness.probability, 3),
    },
    crossCorrelation: residuals.inputs.map((of, r) => crossJson(of, residuals, inputs[r], r)),
    bands: errorShares(spectra).map(({ from, to, shareDb }) => ({
      from,
      to,
      shareDb: roundedDecibels(shareDb),
    })),
  };
}

function crossJson(
  { bound, inside, fromRegularisation }: CrossCorrelation,
  { extra }: ResidualTests,
  input: string,
  r: number,
): Json {
  const side = (name: 'before' | 'after'): Json => {
    const found = extra?.find((of) => of.side === name && of.input === r);
    if (found === undefined) return null;
    return {
      lags: found.lags,
      probability: rounded(found.probability, 3),
      gainDb: roundedDecibels(gainDb(found)),
    };
  };
  return {
    input,
    bound: rounded(bound, 4),
    inside: rounded(inside, 4),
    fromRegularisation: rounded(fromRegularisation, 4),
    before: side('before'),
    after: side('after'),
  };
}

/** To so many significant digits. */
function rounded(value: number, digits: number): number {
  return Number(value.toPrecision(digits));
}
