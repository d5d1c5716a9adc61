/**
 * Probability that a chi-square variate exceeds a value: the upper incomplete gamma function, by its series below the mean
 * and by its continued fraction above (Press et al., *Numerical Recipes*, ch. 6, from memory). Relative error about 1e-10
 * down to 1e-300. For figures and findings only: engines differ in the last digits.
 * @param degrees of freedom, above 0, not whole in general
 */
export function chiSquareTail(value: number, degrees: number): number {
  const a = degrees / 2;
  const x = value / 2;
  if (!(x > 0)) return 1;
  const scale = Math.exp(a * Math.log(x) - x - logGamma(a));
  if (x < a + 1) {
    let term = 1 / a;
    let sum = term;
    for (let k = 1; k < 100_000 && term > 1e-17 * sum; k++) {
      term *= x / (a + k);
      sum += term;
    }
    return Math.max(0, 1 - scale * sum);
  }
  // Lentz's method.
  let b = x + 1 - a;
  let c = 1e300;
  let d = 1 / b;
  let fraction = d;
  for (let k = 1; k < 100_000; k++) {
    const numerator = -k * (k - a);
    b += 2;
    d = 1 / (numerator * d + b);
    c = b + numerator / c;
    const step = c * d;
    fraction *= step;
    if (Math.abs(step - 1) < 1e-16) break;
  }
  return scale * fraction;
}

/** `ln Γ(x)`, x > 0, by Stirling's series once x is large enough (Abramowitz & Stegun 6.1.41, from memory). */
function logGamma(x: number): number {
  let shift = 0;
  let z = x;
  for (; z < 12; z++) shift += Math.log(z);
  const r = 1 / (z * z);
  const series = (1 / 12 - r * (1 / 360 - r * (1 / 1260 - r * (1 / 1680 - r / 1188)))) / z;
  return (z - 0.5) * Math.log(z) - z + 0.5 * Math.log(2 * Math.PI) + series - shift;
}
