import type { Job } from '../document/pairingDocument';
import { type Estimate, unknownsOf } from './estimate';
import { type ExtraLags, extraLags, testExtraLags } from './extraLags';
import { inverseOf } from './inverse';
import { ljungBox, type Portmanteau } from './portmanteau';
import type { ResidualSums } from './residualSums';
import { scoreCovariance } from './scoreCovariance';
import { mostForErrors, normal95 } from './tapErrors';

/** Whether anything is left in the residual of a fit. */
export interface ResidualTests {
  /** Number of n. */
  samples: number;
  /** Autocorrelation coefficients of the residual from lag 0 on; 95 % of those of white noise lie within ±`bound`. */
  autocorrelation: Float64Array;
  bound: number;
  /** Null where there are too few samples. */
  whiteness: Portmanteau | null;
  inputs: CrossCorrelation[];
  /** Taps at further lags; null where there are too few samples. */
  extra: ExtraLags[] | null;
}

/** Cross-correlation coefficients of one input and the residual. */
export interface CrossCorrelation {
  /** Lag of the first: below 0 the input is ahead of the filter. */
  from: number;
  values: Float64Array;
  /**
   * 95 % of them lie within ± this where residual and input have nothing in common: Bartlett's formula for two coloured
   * signals (Bartlett 1946; Box & Jenkins, *Time Series Analysis*, ch. 11, from memory).
   */
  bound: number;
  /** Largest size over the lags of the filter, which orthogonality makes zero, and the part regularisation makes of it. */
  inside: number;
  fromRegularisation: number;
}

/** Lags of the portmanteau test (common practice). */
const whitenessLags = 20;

/** Fewer samples for each lag tested leave chi-square laws rough (common practice). */
const samplesPerLag = 10;

/** Autocorrelation is told up to this lag. */
const shownLags = 200;

/**
 * Lags of the residual's own correlation that count: a thirty-second of the samples, so that its spectrum is known to
 * about 13 % (0.54 window/samples of its square: Parzen 1961), and no more than responses are long.
 */
export function residualWindow(samples: number): number {
  return Math.max(8, Math.min(1024, Math.floor(samples / 32)));
}

/** Lags that the sums of the residual need: 0 up to what the tests and the standard errors ask for. */
export function residualLags(length: number, window: number): number {
  return length + Math.max(extraLags, whitenessLags + 1) + window;
}

/**
 * @param sums of {@link residualLags} lags
 * @param job for `predict` the residual is tested as that of an autoregression, and the input ahead of the filter is what
 *   is to be predicted
 */
export function residualTests(
  estimate: Estimate,
  sums: ResidualSums,
  window: number,
  job: Job,
): ResidualTests {
  const { total, samples } = sums;
  const { coefficients } = estimate.filter;
  const inputs = coefficients.length;
  const length = coefficients[0].length;
  const { count } = total;
  const own = total.correlations[inputs][inputs];
  const fitted = job === 'predict' ? length : 0;
  const freedom = unknownsOf(estimate);
  const known = count - (freedom * count) / samples;
  const score =
    known >= samplesPerLag * extraLags ? scoreCovariance(sums, window, length + extraLags, freedom) : null;
  const sides: ExtraLags['side'][] = job === 'predict' ? ['after'] : ['before', 'after'];
  const { whole, regularisation } = estimate;
  const inverse = whole.size > mostForErrors ? null : inverseOf(whole, regularisation);
  return {
    samples: count,
    autocorrelation: own.slice(0, shownLags + 1).map((value) => value / own[0]),
    bound: normal95 / Math.sqrt(count),
    whiteness:
      known >= samplesPerLag * whitenessLags ? ljungBox(own, count, fitted + whitenessLags, fitted) : null,
    inputs: coefficients.map((_, r) =>
      crossCorrelation(estimate, sums, r, score?.deviation(r) ?? Number.NaN),
    ),
    extra:
      score && sides.flatMap((side) => testExtraLags(estimate, sums, score, side, inverse?.apply ?? null)),
  };
}

function crossCorrelation(
  { filter, whole, regularisation }: Estimate,
  { total }: ResidualSums,
  r: number,
  deviation: number,
): CrossCorrelation {
  const inputs = filter.coefficients.length;
  const taps = filter.coefficients[r];
  const { correlations, count } = total;
  const power = correlations[r][r][0] / count;
  const unit = Math.sqrt(power * (correlations[inputs][inputs][0] / count));
  const from = -extraLags;
  const values = Float64Array.from({ length: taps.length + 2 * extraLags }, (_, i) => {
    const lag = from + i;
    const sum = lag < 0 ? correlations[inputs][r][-lag] : correlations[r][inputs][lag];
    return sum / count / unit;
  });
  // θ - Φ w = L ρ P_r w.
  const root = whole.scale[r * taps.length];
  const largest = (row: Float64Array) => row.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
  return {
    from,
    values,
    bound: (normal95 * deviation) / Math.sqrt(count) / unit,
    inside: largest(values.subarray(extraLags, extraLags + taps.length)),
    fromRegularisation: (regularisation * root * root * largest(taps)) / unit,
  };
}
