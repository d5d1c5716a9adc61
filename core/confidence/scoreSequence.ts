import { sizeFor, transformOf } from '../statistics/transform';
import type { ResidualSums } from './residualSums';

/**
 * The covariance of `x_r[n-k] e[n]` and `x_s[m-l] e[m]`, summed over m, as a sequence over k-l: for each r and s its values
 * from -(lags - 1) to lags - 1. The correlation of the residual, through Parzen's window, convolved with those of the
 * inputs, part by part; by transforms.
 * @param window lags at which the window reaches zero; the sums must have `lags + window` of them
 * @returns `[r][s][lags - 1 + (k - l)]`, per sample
 */
export function scoreSequences(
  { parts }: Pick<ResidualSums, 'parts'>,
  window: number,
  lags: number,
): Float64Array[][] {
  const inputs = parts[0].inputs - 1;
  const count = parts.reduce((sum, part) => sum + part.count, 0);
  const reach = lags + window;
  const size = sizeFor(2 * reach);
  const transform = transformOf(size);
  const empty = () => ({ re: new Float64Array(size), im: new Float64Array(size) });
  const sums = Array.from({ length: inputs }, (_, r) =>
    Array.from({ length: inputs }, (_value, s) => (s < r ? null : empty())),
  );
  for (const { correlations, count: own } of parts) {
    const residual = empty();
    for (let j = 0; j < window; j++) {
      const value = (parzen(j / window) * correlations[inputs][inputs][j]) / (own * count);
      residual.re[j] = value;
      if (j > 0) residual.re[size - j] = value;
    }
    // Even, so that its spectrum is real.
    transform.forward(residual.re, residual.im);
    for (let r = 0; r < inputs; r++) {
      for (let s = r; s < inputs; s++) {
        const between = empty();
        between.re.set(correlations[r][s].subarray(0, reach));
        for (let k = 1; k < reach; k++) between.re[size - k] = correlations[s][r][k];
        transform.forward(between.re, between.im);
        const sum = sums[r][s] ?? empty();
        for (let f = 0; f < size; f++) {
          sum.re[f] += residual.re[f] * between.re[f];
          sum.im[f] += residual.re[f] * between.im[f];
        }
      }
    }
  }
  const ahead = sums.map((row) =>
    row.map((sum) => {
      if (sum === null) return new Float64Array(0);
      transform.inverse(sum.re, sum.im);
      return Float64Array.from({ length: 2 * lags - 1 }, (_, i) => sum.re[(i + 1 - lags + size) % size]);
    }),
  );
  // s_sr[τ] = s_rs[-τ].
  return ahead.map((row, r) => row.map((sequence, s) => (s < r ? ahead[s][r].slice().reverse() : sequence)));
}

/** Parzen's window, 1 at 0 and 0 at 1. */
function parzen(share: number): number {
  const rest = 1 - share;
  return share <= 0.5 ? 1 - 6 * share * share * rest : 2 * rest * rest * rest;
}
