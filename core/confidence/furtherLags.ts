import { inner } from '../solvers/vectors';
import type { Estimate } from './estimate';
import type { ResidualSums } from './residualSums';

/** Input samples at lags outside the filter, and what the taps inside can already make of them. */
export interface FurtherLags {
  /** Mean products with the residual, what the inputs inside the filter have of it taken out: one a lag. */
  cross: Float64Array;
  /** Mean products among the lags, likewise: row-major. */
  products: Float64Array;
  /**
   * For each lag what `cross` is made of: one row an input, over lags from `origin` on, of the products of input and
   * residual.
   */
  influences: Float64Array[][];
}

/**
 * @param input whose lags are looked at, from 0
 * @param lags outside 0..M-1, rising and without a gap
 * @param origin first lag of the rows of `influences`
 * @param length of these rows
 * @param solve v ↦ A⁻¹ v for the normal matrix of all taps; null where it is too dear, and nothing is taken out
 */
export function furtherLags(
  { filter, whole }: Estimate,
  { total }: ResidualSums,
  input: number,
  lags: readonly number[],
  origin: number,
  length: number,
  solve: ((v: Float64Array) => Float64Array) | null,
): FurtherLags {
  const inputs = filter.coefficients.length;
  const taps = filter.coefficients[0].length;
  const { correlations, count } = total;
  const between = (s: number, lag: number) =>
    (lag < 0 ? correlations[s][input][-lag] : correlations[input][s][lag]) / count;
  const withResidual = (s: number, lag: number) =>
    (lag < 0 ? correlations[inputs][s][-lag] : correlations[s][inputs][lag]) / count;

  const inside = whole.scale.map((scale, i) => {
    const s = Math.floor(i / taps);
    return withResidual(s, i - s * taps) / scale;
  });
  const known = lags.map((lag) =>
    whole.scale.map((scale, i) => {
      const s = Math.floor(i / taps);
      return between(s, lag - (i - s * taps)) / scale;
    }),
  );
  const explained = known.map((row) => solve?.(row) ?? new Float64Array(row.length));
  return {
    cross: Float64Array.from(lags, (lag, i) => withResidual(input, lag) - inner(explained[i], inside)),
    products: Float64Array.from({ length: lags.length * lags.length }, (_, at) => {
      const i = Math.floor(at / lags.length);
      const j = at - i * lags.length;
      return between(input, lags[i] - lags[j]) - inner(explained[i], known[j]);
    }),
    influences: lags.map((lag, i) => {
      const rows = Array.from({ length: inputs }, () => new Float64Array(length));
      explained[i].forEach((value, at) => {
        const s = Math.floor(at / taps);
        rows[s][at - s * taps - origin] = -value / whole.scale[at];
      });
      rows[input][lag - origin] += 1;
      return rows;
    }),
  };
}
