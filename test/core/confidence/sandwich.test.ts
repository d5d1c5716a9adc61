import { inverse, Matrix } from 'ml-matrix';
import { describe, expect, it } from 'vitest';
import type { Estimate } from '../../../core/confidence/estimate';
import { type ResidualSums, residualSums } from '../../../core/confidence/residualSums';
import { tapErrors } from '../../../core/confidence/tapErrors';
import type { Symmetry } from '../../../core/document/pairingDocument';
import { measureMoments } from '../../../core/pair/moments';
import { gainConditions, holdConditions } from '../../../core/solvers/fixedGain';
import { foldSystem, newFold, unfold } from '../../../core/solvers/fold';
import { elementsOf, normalSystem } from '../../../core/solvers/normalSystem';
import { solve } from '../../../core/solvers/solve';
import { gatherSums } from '../../../core/statistics/gatherSums';
import { normals } from '../../support/random';
import { convolve, pace, takeOf } from '../../support/takes';

// The sandwich by dense matrices (ml-matrix), written from its definition, against the one by transforms.

const samples = 1500;
const length = 7;
const window = 20;
const regularisation = 1e-3;

const x = [convolve(normals(1, samples), [1, 0.8, 0.3]), normals(2, samples).map((v) => 50 * v)];
const noise = convolve(normals(3, samples), [1, -0.9, 0.5]);
const d = noise.map((v, n) => v + x[0][n] - 0.5 * (x[0][n - 3] ?? 0) + 0.01 * (x[1][n - 1] ?? 0));
const take = takeOf(x, d);

/** Solves as the pipeline does, with the shape asked for; a gain of 2 at an eighth of the rate for the first input. */
async function estimateFor(symmetry: Symmetry, held: boolean): Promise<Estimate> {
  const moments = await measureMoments([take], false, pace);
  const shape = { length, delay: 0, windowing: 'covariance' as const };
  const whole = normalSystem(await gatherSums([take], shape, moments.means, pace), moments.inputPowers);
  const fold = newFold(length, symmetry);
  const system = foldSystem(whole, 2, fold);
  const solveFor = (right: Float64Array) => {
    const solution = solve({ ...system, right }, 2, regularisation);
    if ('smallestRegularisation' in solution) throw new Error('not solved');
    return solution;
  };
  const { coefficients } = solveFor(system.right);
  const conditions = held ? gainConditions(fold, 0.125, 2, 0) : null;
  const free =
    conditions === null
      ? coefficients
      : holdConditions(coefficients, 0, conditions, (column) => {
          const flat = column.flatMap((row) => [...row]);
          return solveFor(Float64Array.from(flat, (value, i) => value / system.scale[i])).coefficients;
        });
  return {
    filter: { coefficients: unfold(fold, free), delay: 0, means: moments.means },
    fold,
    gain: conditions && { conditions, input: 0 },
    whole,
    system,
    regularisation,
  };
}

/** Covariance of all taps. */
function denseCovariance({ whole, fold, gain }: Estimate, { parts, samples }: ResidualSums): Matrix {
  const size = 2 * length;
  const element = elementsOf(whole, regularisation);
  const A = Matrix.zeros(size, size);
  const S = Matrix.zeros(size, size);
  const free = 2 * fold.free;
  const unknowns = free - (gain?.conditions.columns.length ?? 0);
  const parzen = (z: number) => (z <= 0.5 ? 1 - 6 * z * z + 6 * z ** 3 : 2 * (1 - z) ** 3);
  for (let i = 0; i < size; i++) {
    for (let j = 0; j < size; j++) {
      A.set(i, j, element(Math.max(i, j), Math.min(i, j)) * whole.scale[i] * whole.scale[j]);
      const [r, s] = [Math.floor(i / length), Math.floor(j / length)];
      const lag = (i % length) - (j % length);
      let sum = 0;
      for (const { correlations: c, count } of parts) {
        for (let m = 1 - window; m < window; m++) {
          const t = lag - m;
          const between = t < 0 ? c[s][r][-t] : c[r][s][t];
          sum += (parzen(Math.abs(m) / window) * c[2][2][Math.abs(m)] * between) / count;
        }
      }
      S.set(i, j, sum / (samples - unknowns));
    }
  }
  // w = F v, v the free taps, under C v = g: what is left free is N u.
  const F = Matrix.zeros(size, free);
  for (let a = 0; a < free; a++) {
    const r = Math.floor(a / fold.free);
    for (const { tap, sign } of fold.members(a % fold.free)) F.set(r * length + tap, a, sign);
  }
  const inner = inverse(F.transpose().mmul(A).mmul(F));
  let B = inner;
  if (gain !== null) {
    const C = Matrix.zeros(gain.conditions.columns.length, free);
    gain.conditions.columns.forEach((column, j) => {
      column.forEach((value, a) => {
        C.set(j, a, value);
      });
    });
    const middle = inverse(C.mmul(inner).mmul(C.transpose()));
    B = Matrix.sub(inner, inner.mmul(C.transpose()).mmul(middle).mmul(C).mmul(inner));
  }
  const G = F.mmul(B).mmul(F.transpose());
  return G.mmul(S).mmul(G).div(samples);
}

describe('the sandwich', () => {
  it.each([
    ['none', false],
    ['even', false],
    ['odd', false],
    ['none', true],
    ['even', true],
  ] as [Symmetry, boolean][])('symmetry %s, gain fixed: %s', async (symmetry, held) => {
    const estimate = await estimateFor(symmetry, held);
    const sums = await residualSums([take], 'covariance', estimate.filter, length + window, pace);
    expect(sums.parts.length).toBeGreaterThan(3);
    const got = await tapErrors(estimate, sums, window, pace);
    if ('withheld' in got) throw new Error(got.withheld);
    const covariance = denseCovariance(estimate, sums);
    got.standardErrors
      .flatMap((row) => [...row])
      .forEach((error, i) => {
        const expected = Math.sqrt(Math.max(0, covariance.get(i, i)));
        expect(Math.abs(error - expected)).toBeLessThanOrEqual(1e-9 * expected + 1e-12);
      });
    const { points, inputs } = got.response;
    for (const i of [0, 1, 40, 77, points - 1]) {
      for (const r of [0, 1]) {
        const wave = (part: (turn: number) => number) =>
          Matrix.columnVector(
            Array.from({ length: 2 * length }, (_, at) =>
              Math.floor(at / length) === r ? part((Math.PI * i * (at % length)) / (points - 1)) : 0,
            ),
          );
        const re = wave(Math.cos);
        const im = wave((turn) => -Math.sin(turn));
        const form = (a: Matrix, b: Matrix) => a.transpose().mmul(covariance).mmul(b).get(0, 0);
        const scale = form(re, re) + form(im, im) + 1e-12;
        expect(Math.abs(inputs[r].real[i] - form(re, re)) / scale).toBeLessThan(1e-9);
        expect(Math.abs(inputs[r].imaginary[i] - form(im, im)) / scale).toBeLessThan(1e-9);
        expect(Math.abs(inputs[r].both[i] - form(re, im)) / scale).toBeLessThan(1e-9);
      }
    }
  });

  it('leaves no error in a gain that is fixed', async () => {
    const estimate = await estimateFor('none', true);
    const sums = await residualSums([take], 'covariance', estimate.filter, length + window, pace);
    const got = await tapErrors(estimate, sums, window, pace);
    if ('withheld' in got) throw new Error(got.withheld);
    const { points, inputs } = got.response;
    const i = (points - 1) / 4;
    for (const row of [inputs[0].real, inputs[0].imaginary]) {
      expect(row[i]).toBeLessThan(1e-12 * row[i + 20]);
    }
    expect(inputs[1].real[i]).toBeGreaterThan(1e-3 * inputs[1].real[i + 20]);
  });

  it('is withheld where there are too many taps or too few samples', async () => {
    const estimate = await estimateFor('none', false);
    const sums = await residualSums([take], 'covariance', estimate.filter, length + window, pace);
    const large = { ...estimate, system: { ...estimate.system, size: 2049 } };
    expect(await tapErrors(large, sums, window, pace)).toEqual({ withheld: 'too-many-taps' });
    sums.samples = 27;
    expect(await tapErrors(estimate, sums, window, pace)).toEqual({ withheld: 'too-few-samples' });
  });
});
