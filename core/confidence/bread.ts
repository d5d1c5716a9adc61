import { inner } from '../solvers/vectors';
import type { Estimate } from './estimate';
import type { Inverse } from './inverse';

/** How one free tap follows the data. */
export interface TapInfluence {
  /** Its input, from 0, and the taps that it stands for. */
  input: number;
  members: readonly { tap: number; sign: number }[];
  /**
   * u, one row an input: where the products of inputs and residual are off by `δ_r[k] = (1/L) Σ x_r[n-k] e[n]`, the tap is
   * off by `Σ u_r[k] δ_r[k]`, and so is every other that it stands for, by its sign.
   */
  rows: Float64Array[];
}

/**
 * The bread of the sandwich tap by tap: rows of `B = A⁻¹`, A the regularised normal matrix of the free taps; with
 * conditions on them `B - Bc (cᵀBc)⁻¹ cᵀB` for each column c in turn.
 */
export function* tapInfluences(estimate: Estimate, inverse: Inverse): Generator<TapInfluence> {
  const { system, whole, fold } = estimate;
  const { free, length } = fold;
  const inputs = system.size / free;
  const fixed = directions(estimate, inverse);
  for (const { unknown, row } of inverse.rows()) {
    const input = Math.floor(unknown / free);
    const members = fold.members(unknown - input * free);
    const rows = Array.from({ length: inputs }, (_, r) => {
      const taps = new Float64Array(length);
      for (let a = 0; a < free; a++) {
        const at = r * free + a;
        let value = row[at];
        for (const { direction, size } of fixed) value -= (direction[unknown] * direction[at]) / size;
        const group = fold.members(a);
        value /= system.scale[unknown] * Math.sqrt(group.length) * whole.scale[r * length];
        for (const { tap, sign } of group) taps[tap] = sign * value;
      }
      return taps;
    });
    yield { input, members, rows };
  }
}

/** For each condition c what it moves the taps along, Bc, and cᵀBc; those before it are kept. */
function directions(
  { system, fold, gain }: Estimate,
  { apply }: Inverse,
): { direction: Float64Array; size: number }[] {
  const found: { direction: Float64Array; size: number }[] = [];
  for (const column of gain?.conditions.columns ?? []) {
    const condition = new Float64Array(system.size);
    for (let a = 0; a < fold.free; a++) {
      const at = (gain?.input ?? 0) * fold.free + a;
      condition[at] = column[a] / system.scale[at];
    }
    const direction = apply(condition);
    for (const earlier of found) {
      const share = inner(earlier.direction, condition) / earlier.size;
      for (let i = 0; i < direction.length; i++) direction[i] -= share * earlier.direction[i];
    }
    found.push({ direction, size: inner(condition, direction) });
  }
  return found;
}
