/** Inverse hyperbolic tangent, for figures: engines differ in the last digit. */
export function inverseTangent(value: number): number {
  return Math.atanh(value);
}

/** Hyperbolic tangent, for figures likewise. */
export function hyperbolicTangent(value: number): number {
  return Math.tanh(value);
}
