import { Matrix, solve as solveDense } from 'ml-matrix';
import { describe, expect, it } from 'vitest';
import { conditionsOf, gainConditions, holdConditions } from '../../../core/solvers/fixedGain';
import { foldSystem, newFold, unfold } from '../../../core/solvers/fold';
import { elementsOf, type NormalSystem, normalSystem } from '../../../core/solvers/normalSystem';
import { type Solution, solve } from '../../../core/solvers/solve';
import { normals } from '../../support/random';
import { solveTakes, takeOf } from '../../support/takes';

const inputs = 2;

/** A system of two coloured inputs, and its parts in the units of the recordings for ml-matrix. */
async function systemOf(length: number, seed: number): Promise<NormalSystem> {
  const x = [normals(seed, 600), normals(seed + 1, 600)].map((white) => {
    const coloured = white.slice();
    for (let n = 1; n < coloured.length; n++) coloured[n] += 0.7 * coloured[n - 1];
    return coloured;
  });
  const d = x[0].map((v, n) => v + 0.5 * (x[1][n - 1] ?? 0) + 0.3 * (x[0][n - 3] ?? 0));
  const { sums, moments } = await solveTakes([takeOf(x, d)], { length, delay: 1, windowing: 'covariance' });
  return normalSystem(sums, moments.inputPowers);
}

/** `(Φ/L + ρ diag P)` and `θ/L`, dense. */
function dense(system: NormalSystem, regularisation: number): { a: Matrix; b: Matrix } {
  const { size, scale, right } = system;
  const element = elementsOf(system, regularisation);
  const a = Matrix.zeros(size, size);
  const b = Matrix.zeros(size, 1);
  for (let i = 0; i < size; i++) {
    b.set(i, 0, right[i] * scale[i]);
    for (let j = 0; j <= i; j++) {
      const value = element(i, j) * scale[i] * scale[j];
      a.set(i, j, value);
      a.set(j, i, value);
    }
  }
  return { a, b };
}

/** The minimum under `C w = g` from the whole system of optimality (Lagrange), by ml-matrix's LU. */
function constrained({ a, b }: { a: Matrix; b: Matrix }, c: number[][], g: number[]): number[] {
  const n = a.rows;
  const whole = Matrix.zeros(n + c.length, n + c.length);
  whole.setSubMatrix(a, 0, 0);
  c.forEach((row, j) => {
    row.forEach((value, i) => {
      whole.set(n + j, i, value);
      whole.set(i, n + j, value);
    });
  });
  const right = new Matrix([...b.to1DArray(), ...g].map((value) => [value]));
  return solveDense(whole, right).to1DArray().slice(0, n);
}

/** Conditions that say `w[k] ∓ w[M-1-k] = 0` for every input. */
function mirrorRows(length: number, sign: number): number[][] {
  const rows: number[][] = [];
  for (let r = 0; r < inputs; r++) {
    for (let k = 0; k <= length - 1 - k; k++) {
      if (sign > 0 && k === length - 1 - k) continue;
      const row = new Array(inputs * length).fill(0);
      row[r * length + k] += 1;
      row[r * length + length - 1 - k] -= sign;
      rows.push(row);
    }
  }
  return rows;
}

function solved(system: NormalSystem, regularisation: number): Solution {
  const solution = solve(system, inputs, regularisation);
  if ('smallestRegularisation' in solution) throw new Error('not solved');
  return solution;
}

const flat = (rows: readonly Float64Array[]) => rows.flatMap((row) => Array.from(row));

function expectNear(got: number[], want: number[]) {
  const size = Math.hypot(...want);
  expect(Math.hypot(...got.map((value, i) => value - want[i])) / size).toBeLessThan(1e-10);
}

describe('mirrored taps', () => {
  it.each([
    ['even', 6],
    ['even', 7],
    ['odd', 6],
    ['odd', 7],
  ] as const)(
    '%s, %i taps: are the least squares under that condition (ml-matrix)',
    async (symmetry, length) => {
      for (const regularisation of [0, 0.01]) {
        const system = await systemOf(length, 10 + length);
        const fold = newFold(length, symmetry);
        const taps = unfold(fold, solved(foldSystem(system, inputs, fold), regularisation).coefficients);
        const rows = mirrorRows(length, symmetry === 'even' ? 1 : -1);
        // The middle of odd taps appears as w = -w.
        expectNear(
          flat(taps),
          constrained(
            dense(system, regularisation),
            rows,
            rows.map(() => 0),
          ),
        );
        for (const row of taps) {
          row.forEach((w, k) => {
            expect(row[length - 1 - k]).toBe(symmetry === 'even' ? w : 0 - w);
          });
        }
      }
    },
  );

  it('are the system itself without symmetry', async () => {
    const system = await systemOf(4, 3);
    expect(foldSystem(system, inputs, newFold(4, 'none'))).toBe(system);
  });
});

describe('a fixed gain', () => {
  /** The response of taps at a frequency, by the engine's own functions. */
  function response(taps: Float64Array, turns: number): { re: number; im: number } {
    let re = 0;
    let im = 0;
    taps.forEach((w, k) => {
      re += w * Math.cos(2 * Math.PI * turns * k);
      im -= w * Math.sin(2 * Math.PI * turns * k);
    });
    return { re, im };
  }

  it.each([
    ['none', 6, 0],
    ['none', 6, 0.5],
    ['none', 6, 0.13],
    ['even', 7, 0],
    ['even', 6, 0.21],
  ] as const)(
    '%s symmetry, %i taps, at %f of the rate: is held at the least cost (ml-matrix)',
    async (symmetry, length, turns) => {
      const delay = 2;
      const system = await systemOf(length, 40 + length);
      const fold = newFold(length, symmetry);
      const folded = foldSystem(system, inputs, fold);
      const free = solved(folded, 0.001).coefficients;
      const gain = gainConditions(fold, turns, 0.8, delay);
      if (gain === null) throw new Error('no conditions');
      const held = holdConditions(free, 1, gain, (column) => {
        const right = Float64Array.from(flat(column), (value, i) => value / folded.scale[i]);
        return solved({ ...folded, right }, 0.001).coefficients;
      });
      const taps = unfold(fold, held);
      // The gain itself, with the phase of the delay or of the symmetry.
      const { re, im } = response(taps[1], turns);
      const centre = symmetry === 'even' ? (length - 1) / 2 : delay;
      expect(re).toBeCloseTo(0.8 * Math.cos(2 * Math.PI * turns * centre), 12);
      expect(im).toBeCloseTo(-0.8 * Math.sin(2 * Math.PI * turns * centre), 12);
      expect(conditionsOf(gain, held[1])[0]).toBeCloseTo(0.8, 12);
      // The least cost under that and the mirror.
      const angle = (k: number) => 2 * Math.PI * turns * (k - centre);
      const row = (part: (angle: number) => number) => [
        ...new Array(length).fill(0),
        ...Array.from({ length }, (_, k) => part(angle(k))),
      ];
      const both = symmetry === 'none' && turns !== 0 && turns !== 0.5;
      const rows = [row(Math.cos), ...(both ? [row(Math.sin)] : [])];
      const values = both ? [0.8, 0] : [0.8];
      const mirror = symmetry === 'even' ? mirrorRows(length, 1) : [];
      const want = constrained(
        dense(system, 0.001),
        [...rows, ...mirror],
        [...values, ...mirror.map(() => 0)],
      );
      expectNear(flat(taps), want);
    },
  );

  it('does not exist at half the rate for an even number of even taps', () => {
    expect(gainConditions(newFold(8, 'even'), 0.5, 1, 0)).toBeNull();
    expect(gainConditions(newFold(9, 'even'), 0.5, 1, 0)).not.toBeNull();
  });
});
