import { chiSquareTail } from '../figures/chiSquare';

/** A portmanteau test for whiteness. */
export interface Portmanteau {
  /** Lags 1 to this together. */
  lags: number;
  statistic: number;
  degreesOfFreedom: number;
  /** Probability of that much or more where the residual is white. */
  probability: number;
}

/**
 * `Q = N (N + 2) Σ_k ρ[k]² / (N - k)` over lags 1 to `lags`, chi-square with `lags - fitted` degrees of freedom where the
 * signal is white (Ljung & Box, *Biometrika* 65, 1978).
 * @param correlation `Σ e[n-k] e[n]` for k = 0.. `lags`
 * @param samples N, more than `lags`
 * @param fitted coefficients that were fitted to the signal's own past; 0 where it was explained by others
 */
export function ljungBox(
  correlation: Float64Array,
  samples: number,
  lags: number,
  fitted: number,
): Portmanteau {
  let sum = 0;
  for (let k = 1; k <= lags; k++) {
    const rho = correlation[k] / correlation[0];
    sum += (rho * rho) / (samples - k);
  }
  const statistic = samples * (samples + 2) * sum;
  const degreesOfFreedom = lags - fitted;
  return { lags, statistic, degreesOfFreedom, probability: chiSquareTail(statistic, degreesOfFreedom) };
}
