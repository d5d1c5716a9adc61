import { Matrix, QrDecomposition } from 'ml-matrix';
import { describe, expect, it } from 'vitest';
import type { Windowing } from '../../../core/document/pairingDocument';
import { fitFigure } from '../../../core/evaluation/fitFigure';
import { type BandFilter, bandFilter } from '../../../core/pair/bandFilter';
import type { Take } from '../../../core/pair/take';
import { relativeGap } from '../../support/leastSquaresCases';
import { normals } from '../../support/random';
import { convolve, pace, solveTakes, takeOf } from '../../support/takes';

const rate = 1000;
const length = 9;
const delay = 2;
const regularisation = 1e-7;

const band = bandFilter({ from: 60, to: 260 }, rate) as BandFilter;

interface Source {
  take: Take;
  rows: Float64Array[];
}

/** A path of two inputs, and a tone of 400 Hz that has nothing to do with them. */
function sourceOf(seed: number, samples: number, fit: Take['fit']): Source {
  const x = [normals(seed, samples), convolve(normals(seed + 1, samples), [1, 0.7, -0.2])];
  const y = [convolve(x[0], [0, 0.5, 1, -0.3]), convolve(x[1], [0, 0, 0, 0.4, 0.2])];
  const noise = normals(seed + 2, samples);
  const d = y[0].map((v, n) => v + y[1][n] + 0.05 * noise[n] + 3 * Math.sin(0.8 * Math.PI * n));
  return { take: takeOf(x, d, { fit }), rows: [...x, d] };
}

const sources = [
  sourceOf(10, 1500, [
    { from: 0, to: 500 },
    { from: 620, to: 1400 },
  ]),
  sourceOf(20, 900, [{ from: 150, to: 800 }]),
];
const takes = sources.map(({ take }) => take);

/** Σ_j b[j] row[n-j] with zeros before the start, written out. */
function passed(row: Float64Array): Float64Array {
  return convolve(row, band.taps);
}

/**
 * The reference: filtered data in full, one equation a sample; the floor as equations of the raw data, a hundredth of
 * their size, with 0 on the right; regularisation as one equation a tap; ml-matrix's Householder QR.
 */
function tapsByQr(windowing: Windowing): Float64Array {
  const equations: number[][] = [];
  const right: number[] = [];
  let count = 0;
  const add = (rows: Float64Array[], n: number, factor: number, wanted: number) => {
    equations.push([0, 1].flatMap((r) => Array.from({ length }, (_, k) => factor * (rows[r][n - k] ?? 0))));
    right.push(wanted);
  };
  for (const { take, rows } of sources) {
    for (const { from, to } of take.fit) {
      count += to - from;
      if (windowing === 'covariance') {
        const filtered = rows.map(passed);
        // What lies before the first interval is history; what lies between two must not be used.
        const start = from === take.fit[0].from ? 0 : from;
        const first = Math.max(from, start + band.history + Math.max(length - 1, delay));
        count -= first - from;
        for (let n = first; n < to; n++) {
          add(filtered, n, 1, filtered[2][n - delay]);
          add(rows, n, 1e-2, 0);
        }
      } else {
        const alone = rows.map((row) => row.map((v, n) => (n >= from && n < to ? v : 0)));
        const longer = alone.map((row) =>
          Float64Array.from({ length: row.length + 2000 }, (_, n) => row[n] ?? 0),
        );
        const filtered = longer.map(passed);
        for (let n = from; n < to + length + band.history; n++) {
          add(filtered, n, 1, filtered[2][n - delay] ?? 0);
          add(longer, n, 1e-2, 0);
        }
      }
    }
  }
  for (let r = 0; r < 2; r++) {
    let squares = 0;
    let samples = 0;
    for (const { take, rows } of sources) {
      for (const { from, to } of take.fit) {
        for (let n = from; n < to; n++) squares += rows[r][n] * rows[r][n];
        samples += to - from;
      }
    }
    for (let k = 0; k < length; k++) {
      const row = new Array(2 * length).fill(0);
      row[r * length + k] = Math.sqrt((count * regularisation * squares) / samples);
      equations.push(row);
      right.push(0);
    }
  }
  const solution = new QrDecomposition(new Matrix(equations)).solve(Matrix.columnVector(right));
  return Float64Array.from(solution.to1DArray());
}

async function tapsOf(windowing: Windowing, weighted: boolean) {
  const shape = { length, delay, windowing, band: weighted ? band : null };
  const { solution } = await solveTakes(takes, shape, regularisation);
  if ('smallestRegularisation' in solution) throw new Error('not solved');
  return solution.coefficients;
}

describe('weighting the error to a band', () => {
  it.each(['covariance', 'autocorrelation'] as const)(
    '%s: finds the taps of weighted least squares (dense QR on explicitly filtered data)',
    async (windowing) => {
      const taps = (await tapsOf(windowing, true)).flatMap((row) => [...row]);
      expect(relativeGap(taps, tapsByQr(windowing))).toBeLessThan(1e-9);
    },
  );

  it('lowers the error in the band and bounds the gain outside it', async () => {
    const means = { inputs: [0, 0], desired: 0 };
    const figure = async (weighted: boolean) => {
      const coefficients = await tapsOf('covariance', weighted);
      const { nmseDb } = await fitFigure(takes, 'covariance', { coefficients, delay, means, band }, pace);
      return { nmseDb, coefficients };
    };
    const plain = await figure(false);
    const weighted = await figure(true);
    expect(weighted.nmseDb).toBeLessThan(plain.nmseDb - 1);
    const gain = (row: Float64Array, f: number) => {
      const part = (wave: (t: number) => number) =>
        row.reduce((sum, w, k) => sum + w * wave((2 * Math.PI * f * k) / rate), 0);
      return Math.hypot(part(Math.cos), part(Math.sin));
    };
    for (const row of weighted.coefficients) {
      for (let f = 0; f <= rate / 2; f += 5) expect(gain(row, f)).toBeLessThan(4);
    }
  });

  it('takes the fit error over the filtered signals (written out)', async () => {
    const means = { inputs: [0, 0], desired: 0 };
    const coefficients = await tapsOf('covariance', true);
    const got = await fitFigure(takes, 'covariance', { coefficients, delay, means, band }, pace);
    let error = 0;
    let desired = 0;
    let samples = 0;
    for (const { take, rows } of sources) {
      const [x0, x1, d] = rows.map(passed);
      const y0 = convolve(x0, coefficients[0]);
      const y1 = convolve(x1, coefficients[1]);
      for (const { from, to } of take.fit) {
        const start = from === take.fit[0].from ? 0 : from;
        for (let n = Math.max(from, start + band.history + length - 1); n < to; n++) {
          error += (d[n - delay] - y0[n] - y1[n]) ** 2;
          desired += d[n - delay] ** 2;
          samples++;
        }
      }
    }
    expect(got.samples).toBe(samples);
    expect(got.mse).toBeCloseTo(error / samples, 12);
    expect(got.nmseDb).toBeCloseTo(10 * Math.log10(error / desired), 9);
  });
});
