import { diagonalOf, gradientOf, type RoundingCost, takeStep } from './errorAwareRounding';
import type { WordRange } from './words';

/** A weighted sum that the integers must have exactly: `Σ weights[i] values[i] = total`, weights -2 to 2. */
export interface HeldSum {
  weights: Float64Array;
  total: number;
}

/** One value moved by ±1. */
interface Move {
  at: number;
  step: number;
  /** Rise of the cost. */
  rise: number;
}

/** Moves of each kind that are tried in pairs. */
const tried = 24;

/**
 * Brings integers to a sum at little cost: single steps, the cheapest first, until the sum is right, then pairs of steps
 * that leave it as it is, as long as one lowers the cost. Changes `values`.
 * @returns whether the sum could be reached: where all weights are even an odd one cannot, and none beyond the range
 */
export function holdSum(
  values: Float64Array,
  targets: Float64Array,
  cost: RoundingCost,
  range: WordRange,
  held: HeldSum,
): boolean {
  const gradient = gradientOf(values, targets, cost);
  const diagonal = diagonalOf(cost);
  const { weights } = held;
  let missing = weights.reduce((sum, weight, i) => sum - weight * values[i], held.total);
  while (missing !== 0) {
    const towards = Math.sign(missing);
    const gains = Math.abs(missing) > 1 ? [towards, 2 * towards] : [towards];
    const [move] = gains.flatMap((gain) => cheapest(values, gradient, diagonal, range, weights, gain, 1));
    if (move === undefined) return false;
    missing -= weights[move.at] * move.step;
    takeStep(values, gradient, cost, move.at, move.step);
  }
  for (let taken = 0; taken < 4 * cost.size; taken++) {
    const pair = bestPair(values, gradient, diagonal, cost, range, weights);
    if (pair === null) break;
    for (const { at, step } of pair) takeStep(values, gradient, cost, at, step);
  }
  return true;
}

/** Moves that change the sum by `gain`, the cheapest first. */
function cheapest(
  values: Float64Array,
  gradient: Float64Array,
  diagonal: Float64Array,
  { min, max }: WordRange,
  weights: Float64Array,
  gain: number,
  most: number,
): Move[] {
  const moves: Move[] = [];
  for (let at = 0; at < values.length; at++) {
    if (Math.abs(weights[at]) !== Math.abs(gain)) continue;
    const step = gain / weights[at];
    if (values[at] + step < min || values[at] + step > max) continue;
    moves.push({ at, step, rise: 2 * step * gradient[at] + diagonal[at] });
  }
  return moves.sort((a, b) => a.rise - b.rise).slice(0, most);
}

/** The pair of moves that leaves the sum and lowers the cost most, among the cheapest of each kind. */
function bestPair(
  values: Float64Array,
  gradient: Float64Array,
  diagonal: Float64Array,
  cost: RoundingCost,
  range: WordRange,
  weights: Float64Array,
): [Move, Move] | null {
  let best: [Move, Move] | null = null;
  let least = 0;
  for (const gain of [1, 2]) {
    const ups = cheapest(values, gradient, diagonal, range, weights, gain, tried);
    const downs = cheapest(values, gradient, diagonal, range, weights, -gain, tried);
    for (const a of ups) {
      for (const b of downs) {
        if (a.at === b.at) continue;
        const cross = a.at > b.at ? cost.element(a.at, b.at) : cost.element(b.at, a.at);
        const rise = a.rise + b.rise + 2 * a.step * b.step * cross;
        const floor = -1e-9 * (diagonal[a.at] + diagonal[b.at]);
        if (rise < least && rise < floor) {
          least = rise;
          best = [a, b];
        }
      }
    }
  }
  return best;
}
