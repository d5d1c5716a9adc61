/** Mean of the natural logarithms of values above 0; minus infinity where one is 0. For figures only. */
export function meanLogarithm(values: Float64Array): number {
  let sum = 0;
  for (let k = 0; k < values.length; k++) sum += Math.log(values[k]);
  return sum / values.length;
}

/** e^value. For figures only. */
export function exponential(value: number): number {
  return Math.exp(value);
}
