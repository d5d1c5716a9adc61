import { clamp, roundHalfUp, type WordRange } from './words';

/**
 * What rounding costs: `δᵀ H δ` for integers that are off their real targets by δ steps.
 * H is symmetric and positive definite, in the units of one step of each coefficient.
 */
export interface RoundingCost {
  size: number;
  /** Element of H; asked for i ≥ j only. */
  element(i: number, j: number): number;
  /**
   * H by products, where it is too large for its elements to be looked up one by one; its diagonal beside them, and
   * elements near to its own off the diagonal, which single steps go by; asked for i > j only.
   */
  products?: {
    diagonal: Float64Array;
    multiply(v: Float64Array): Float64Array;
    near(i: number, j: number): number;
  };
  /** Lower-triangular G with `H = G Gᵀ`, row-major; null where none is at hand. */
  factor: Float64Array | null;
}

/** The first nearly always finds all there is. */
const mostRounds = 4;

/**
 * Chooses integers near real targets so that the error they cause is small: nearest-plane rounding through the factor
 * (Babai, *Combinatorica* 6, 1986, from memory: from the last unknown to the first, each rounded as it is found), then
 * single steps of ±1 as long as one lowers the cost; the same steps from plain rounding; the better of the two. Never
 * costs more than plain rounding. Without a factor only the steps from plain rounding are taken; by elements near to the
 * true ones in a few rounds, each of which begins with the true gradient.
 * 2 size² multiply-adds and 2 size for each step taken.
 * @param targets real coefficients in steps (times 2^F)
 * @param range that every integer must keep to
 */
export function roundErrorAware(targets: Float64Array, cost: RoundingCost, range: WordRange): Float64Array {
  const plain = targets.map((value) => clamp(roundHalfUp(value) + 0, range));
  if (cost.products !== undefined) return improvedByRounds(plain, targets, cost, range);
  improve(plain, targets, cost, range);
  if (cost.factor === null) return plain;
  const plane = nearestPlane(targets, cost.size, cost.factor, range);
  improve(plane, targets, cost, range);
  return roundingCost(plane, targets, cost) <= roundingCost(plain, targets, cost) ? plane : plain;
}

/** `δᵀ H δ` for δ = values - targets. */
export function roundingCost(values: Float64Array, targets: Float64Array, cost: RoundingCost): number {
  const gradient = gradientOf(values, targets, cost);
  return gradient.reduce((sum, g, i) => sum + g * (values[i] - targets[i]), 0);
}

/** `H δ`. */
export function gradientOf(
  values: Float64Array,
  targets: Float64Array,
  { size, element, products }: RoundingCost,
): Float64Array {
  if (products !== undefined) return products.multiply(values.map((value, i) => value - targets[i]));
  const gradient = new Float64Array(size);
  for (let i = 0; i < size; i++) {
    const delta = values[i] - targets[i];
    let sum = element(i, i) * delta;
    for (let j = 0; j < i; j++) {
      const h = element(i, j);
      sum += h * (values[j] - targets[j]);
      gradient[j] += h * delta;
    }
    gradient[i] += sum;
  }
  return gradient;
}

/** Row j of Gᵀ is column j of G: `Gᵀ δ` is made small part by part from the last δ up. */
function nearestPlane(
  targets: Float64Array,
  size: number,
  factor: Float64Array,
  range: WordRange,
): Float64Array {
  const values = new Float64Array(size);
  // carried[j] = Σ_(i>j) G[i][j] (targets[i] - values[i]), gathered row by row so that memory is read in order.
  const carried = new Float64Array(size);
  for (let i = size - 1; i >= 0; i--) {
    const row = i * size;
    values[i] = clamp(roundHalfUp(targets[i] + carried[i] / factor[row + i]) + 0, range);
    const left = targets[i] - values[i];
    for (let j = 0; j < i; j++) carried[j] += factor[row + j] * left;
  }
  return values;
}

/**
 * Rounds of steps by near elements, as long as they lower the true cost. By elements near enough a round takes a step for
 * one unknown in twenty; where the fit has little more samples than unknowns, or an input hardly any power, they may
 * promise gains without end.
 */
function improvedByRounds(
  plain: Float64Array,
  targets: Float64Array,
  cost: RoundingCost,
  range: WordRange,
): Float64Array {
  let best = plain;
  let least = roundingCost(best, targets, cost);
  for (let round = 0; round < mostRounds; round++) {
    const next = best.slice();
    const taken = improve(next, targets, cost, range, cost.size);
    if (taken === 0) break;
    const reached = roundingCost(next, targets, cost);
    if (!(reached < least)) break;
    best = next;
    least = reached;
    // Elements that never come to an end are not near enough to go by once more.
    if (taken === cost.size) break;
  }
  return best;
}

/** Takes the single step of ±1 that lowers the cost most, again and again; changes `values`. Returns the steps taken. */
function improve(
  values: Float64Array,
  targets: Float64Array,
  cost: RoundingCost,
  { min, max }: WordRange,
  most = 16 * cost.size,
): number {
  const { size } = cost;
  const gradient = gradientOf(values, targets, cost);
  const diagonal = diagonalOf(cost);
  // Every step lowers the cost, so that there is an end; the bound only keeps a poor start from taking long.
  let taken = 0;
  for (; taken < most; taken++) {
    let best = -1;
    let largest = 0;
    for (let i = 0; i < size; i++) {
      const gain = 2 * Math.abs(gradient[i]) - diagonal[i];
      if (gain <= largest || gain <= 1e-12 * diagonal[i]) continue;
      const stepped = values[i] + (gradient[i] > 0 ? -1 : 1);
      if (stepped < min || stepped > max) continue;
      best = i;
      largest = gain;
    }
    if (best < 0) break;
    const step = gradient[best] > 0 ? -1 : 1;
    takeStep(values, gradient, cost, best, step);
  }
  return taken;
}

/** What a step of each value alone would cost. */
export function diagonalOf({ size, element, products }: RoundingCost): Float64Array {
  return products?.diagonal ?? Float64Array.from({ length: size }, (_, i) => element(i, i));
}

/** Moves one value and keeps the gradient true, or near to that. */
export function takeStep(
  values: Float64Array,
  gradient: Float64Array,
  { size, element, products }: RoundingCost,
  at: number,
  step: number,
): void {
  values[at] += step;
  const lookUp = products?.near ?? element;
  for (let i = 0; i < at; i++) gradient[i] += step * lookUp(at, i);
  // Of near elements too the diagonal is the true one: otherwise a step and its return could both seem to gain.
  gradient[at] += step * (products?.diagonal[at] ?? element(at, at));
  for (let i = at + 1; i < size; i++) gradient[i] += step * lookUp(i, at);
}
