import { Matrix, solve } from 'ml-matrix';
import { type Complex, conjugate, power, times } from './phasor';

/**
 * How recorded signals come about: independent white sources and sinusoids, each with its response to every signal.
 * The signals are the inputs in order, then the desired one.
 */
export interface LinearModel {
  /** Impulse responses, long enough to have died away; the variance of the source is 1. */
  white: { responses: Float64Array[] }[];
  /** Complex amplitudes; `turn` is the rotation per sample. */
  lines: { turn: Complex; gains: Complex[] }[];
}

/** E{ s_a[n] s_b[n - shift] } of two signals of a model. */
export function correlation(model: LinearModel, a: number, b: number, shift: number): number {
  let total = 0;
  for (const { responses } of model.white) {
    const from = Math.max(0, shift);
    const to = Math.min(responses[a].length, responses[b].length + shift);
    for (let n = from; n < to; n++) total += responses[a][n] * responses[b][n - shift];
  }
  for (const { turn, gains } of model.lines) {
    total += 0.5 * times(times(gains[a], conjugate(gains[b])), power(turn, shift)).re;
  }
  return total;
}

/**
 * The filter of least mean squared error, from the model's own correlations and no sample of a recording: the exact
 * solution of R w = p (Wiener 1949), for several conditions weighted by their share of the fit.
 * @returns one row an input, newest-first
 */
export function wienerFilter(
  conditions: readonly { model: LinearModel; weight: number }[],
  { inputs, length, delay }: { inputs: number; length: number; delay: number },
): number[][] {
  const expect = (a: number, b: number, shift: number) =>
    conditions.reduce((total, { model, weight }) => total + weight * correlation(model, a, b, shift), 0);
  const size = inputs * length;
  const normal = Matrix.zeros(size, size);
  const right = Matrix.zeros(size, 1);
  for (let r = 0; r < inputs; r++) {
    for (let s = 0; s < inputs; s++) {
      for (let shift = 1 - length; shift < length; shift++) {
        const value = expect(r, s, shift);
        for (let k = Math.max(0, -shift); k < length - Math.max(0, shift); k++) {
          normal.set(r * length + k, s * length + k + shift, value);
        }
      }
    }
    for (let k = 0; k < length; k++) right.set(r * length + k, 0, expect(r, inputs, delay - k));
  }
  const taps = solve(normal, right).to1DArray();
  return Array.from({ length: inputs }, (_, r) => taps.slice(r * length, (r + 1) * length));
}
