/** A straight line through points with weights, by least squares. */
export interface Line {
  slope: number;
  /** Value at {@link Line.at}. */
  value: number;
  /** Weighted mean of the places: there the value is known best. */
  at: number;
  /**
   * Of the slope, from the scatter of the points about the line, whether or not the weights are right: the third of
   * MacKinnon & White's estimators (Journal of Econometrics 29, 1985), which few points do not flatter.
   */
  standardError: number;
  /** Points less the two that the line takes. */
  freedom: number;
}

/**
 * @param places where the points stand
 * @param weights inversely proportional to the variances of the values, up to a common factor
 * @returns null for fewer than three points or where all stand at one place
 */
export function weightedLine(
  places: readonly number[],
  values: readonly number[],
  weights: readonly number[],
): Line | null {
  const total = weights.reduce((sum, w) => sum + w, 0);
  const mean = (row: readonly number[]) => row.reduce((sum, v, i) => sum + weights[i] * v, 0) / total;
  const at = mean(places);
  const value = mean(values);
  let spread = 0;
  let product = 0;
  places.forEach((place, i) => {
    spread += weights[i] * (place - at) * (place - at);
    product += weights[i] * (place - at) * (values[i] - value);
  });
  const freedom = places.length - 2;
  if (freedom < 1 || !(spread > 0)) return null;
  const slope = product / spread;
  let squares = 0;
  places.forEach((place, i) => {
    const away = place - at;
    const leverage = weights[i] / total + (weights[i] * away * away) / spread;
    const rest = (values[i] - value - slope * away) / Math.max(1 - leverage, 1 / places.length);
    squares += weights[i] * weights[i] * away * away * rest * rest;
  });
  return { slope, value, at, standardError: Math.sqrt(squares) / spread, freedom };
}
