/** Where the weight of one input's coefficients lies. */
export interface ResponseShape {
  /** Index of the largest coefficient. */
  peak: number;
  /** Share of Σ w² in the last eighth of the taps (at least one tap), 0 to 1. */
  lastEighth: number;
}

/** @param coefficients newest-first; all zero gives a share of 0 */
export function responseShape(coefficients: Float64Array): ResponseShape {
  const edge = coefficients.length - Math.max(1, Math.floor(coefficients.length / 8));
  let peak = 0;
  let all = 0;
  let last = 0;
  coefficients.forEach((w, k) => {
    if (Math.abs(w) > Math.abs(coefficients[peak])) peak = k;
    all += w * w;
    if (k >= edge) last += w * w;
  });
  return { peak, lastEighth: all > 0 ? last / all : 0 };
}
