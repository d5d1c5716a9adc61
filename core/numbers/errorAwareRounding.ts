import { clamp, roundHalfUp, wordRange } from './words';

/**
 * The cost of rounding: `cost(δ) = δᵀ A δ` for integer coefficients that are off by δ steps, with
 * `A = H`, given through its lower-triangular factor (`A = G Gᵀ`) in the units of one step each.
 */
export interface RoundingCost {
  size: number;
  /** G, row-major, lower triangle. */
  factor: Float64Array;
}

/**
 * Chooses integers near real targets so that the error they cause is small: nearest-plane rounding through the factor
 * (Babai, *Combinatorica* 6, 1986: from the last unknown to the first, each rounded as it is found), then single steps of
 * ±1 as long as one lowers the cost; the same steps from plain rounding; the better of the two. Never costs more than
 * plain rounding. 2 size² multiply-adds and size for each step taken.
 * @param targets real coefficients in steps (times 2^F)
 * @param word bits that every integer must fit
 */
export function roundErrorAware(targets: Float64Array, cost: RoundingCost, word: number): Float64Array {
  const range = wordRange(word);
  const plain = targets.map((value) => clamp(roundHalfUp(value) + 0, range));
  const plane = nearestPlane(targets, cost, word);
  improve(plain, targets, cost, word);
  improve(plane, targets, cost, word);
  return roundingCost(plane, targets, cost) <= roundingCost(plain, targets, cost) ? plane : plain;
}

/** `‖Gᵀ δ‖²` for δ = values - targets. */
export function roundingCost(
  values: Float64Array,
  targets: Float64Array,
  { size, factor }: RoundingCost,
): number {
  let total = 0;
  for (let j = 0; j < size; j++) {
    let sum = 0;
    for (let i = j; i < size; i++) sum += factor[i * size + j] * (values[i] - targets[i]);
    total += sum * sum;
  }
  return total;
}

/** Column j of G holds row j of the upper triangle Gᵀ: `Gᵀ δ` is solved for small parts from the last δ up. */
function nearestPlane(targets: Float64Array, { size, factor }: RoundingCost, word: number): Float64Array {
  const range = wordRange(word);
  const values = new Float64Array(size);
  for (let j = size - 1; j >= 0; j--) {
    let carried = 0;
    for (let i = j + 1; i < size; i++) carried += factor[i * size + j] * (targets[i] - values[i]);
    values[j] = clamp(roundHalfUp(targets[j] + carried / factor[j * size + j]) + 0, range);
  }
  return values;
}

/** Takes the single step of ±1 that lowers the cost most, again and again; changes `values`. */
function improve(values: Float64Array, targets: Float64Array, cost: RoundingCost, word: number): void {
  const { size } = cost;
  const { min, max } = wordRange(word);
  const matrix = gram(cost);
  const gradient = new Float64Array(size);
  for (let i = 0; i < size; i++) {
    for (let j = 0; j < size; j++) gradient[i] += matrix[i * size + j] * (values[j] - targets[j]);
  }
  for (let pass = 0; pass < 64 * size; pass++) {
    let best = -1;
    let bestGain = 0;
    for (let i = 0; i < size; i++) {
      const step = gradient[i] > 0 ? -1 : 1;
      if (values[i] + step < min || values[i] + step > max) continue;
      const gain = 2 * Math.abs(gradient[i]) - matrix[i * size + i];
      if (gain > bestGain) {
        best = i;
        bestGain = gain;
      }
    }
    if (!(bestGain > 1e-12 * matrix[best * size + best])) return;
    const step = gradient[best] > 0 ? -1 : 1;
    values[best] += step;
    for (let i = 0; i < size; i++) gradient[i] += step * matrix[i * size + best];
  }
}

function gram({ size, factor }: RoundingCost): Float64Array {
  const matrix = new Float64Array(size * size);
  for (let i = 0; i < size; i++) {
    for (let j = 0; j <= i; j++) {
      let sum = 0;
      for (let k = 0; k <= j; k++) sum += factor[i * size + k] * factor[j * size + k];
      matrix[i * size + j] = sum;
      matrix[j * size + i] = sum;
    }
  }
  return matrix;
}
