import { Matrix, QrDecomposition } from 'ml-matrix';
import type { Take } from '../../core/pair/take';
import { usedSegments } from '../../core/pair/usedSegments';
import { seededNormal, seededUniform } from './random';
import { takeOf } from './takes';

/** A least-squares problem of random shape. */
export interface LeastSquaresCase {
  takes: Take[];
  signals: { inputs: Float64Array[]; desired: Float64Array }[];
  length: number;
  delay: number;
  regularisation: number;
  removeMean: boolean;
  windowing: 'covariance' | 'autocorrelation';
}

export function randomCase(seed: number): LeastSquaresCase {
  const uniform = seededUniform(seed);
  const normal = seededNormal(seed + 1);
  const whole = (low: number, high: number) => low + Math.floor(uniform() * (high - low + 1));
  const inputs = whole(1, 3);
  const length = whole(1, 24);
  const delay = whole(-12, 12);
  const pole = 0.9 * uniform();
  const paths = Array.from({ length: inputs }, () => Array.from({ length: 8 }, normal));
  const signals = Array.from({ length: whole(1, 3) }, () => {
    const samples = whole(600, 2600);
    const x = Array.from({ length: inputs }, (_, r) => {
      const row = new Float64Array(samples);
      const offset = 3 * normal();
      let state = 0;
      for (let n = 0; n < samples; n++) {
        state = pole * state + normal();
        row[n] = (r + 1) * 10 * state + offset;
      }
      return row;
    });
    const desired = new Float64Array(samples);
    for (let n = 0; n < samples; n++) {
      desired[n] = 0.3 * normal() + 2;
      for (let r = 0; r < inputs; r++) {
        for (let k = 0; k < Math.min(8, n + 1); k++) desired[n] += paths[r][k] * x[r][n - k];
      }
    }
    return { inputs: x, desired };
  });
  const takes = signals.map(({ inputs: x, desired }) => {
    const n = desired.length;
    const cut = (part: number) => Math.floor(n * part);
    const fit =
      uniform() < 0.5
        ? [{ from: 0, to: cut(0.7) }]
        : [
            { from: cut(0.1), to: cut(0.35) },
            { from: cut(0.4), to: cut(0.75) },
          ];
    return takeOf(x, desired, { fit, heldOut: [{ from: cut(0.8), to: n }] });
  });
  return {
    takes,
    signals,
    length,
    delay,
    regularisation: uniform() < 0.5 ? 0 : 1e-4 * uniform(),
    removeMean: uniform() < 0.5,
    windowing: uniform() < 0.6 ? 'covariance' : 'autocorrelation',
  };
}

/**
 * Independent reference: the explicit data matrix, regularised by rows √(Lρ P_r), solved by ml-matrix's Householder QR.
 * The taps input by input.
 */
export function tapsByQr(c: LeastSquaresCase): Float64Array {
  const K = c.takes[0].inputs.length;
  const listed = c.takes.flatMap((take, t) => take.fit.map((interval) => ({ t, interval })));
  const over = (pick: (t: number) => Float64Array) => {
    let sum = 0;
    let squares = 0;
    let count = 0;
    for (const { t, interval } of listed) {
      for (let n = interval.from; n < interval.to; n++) sum += pick(t)[n];
      count += interval.to - interval.from;
    }
    const mean = c.removeMean ? sum / count : 0;
    for (const { t, interval } of listed) {
      for (let n = interval.from; n < interval.to; n++) squares += (pick(t)[n] - mean) ** 2;
    }
    return { mean, power: squares / count, count };
  };
  const inputs = Array.from({ length: K }, (_, r) => over((t) => c.signals[t].inputs[r]));
  const desired = over((t) => c.signals[t].desired);
  const rows: number[][] = [];
  const right: number[] = [];
  let L = 0;
  for (const [t, take] of c.takes.entries()) {
    const { inputs: x, desired: d } = c.signals[t];
    const addRow = (n: number, inside: (i: number) => boolean) => {
      rows.push(
        x.flatMap((row, r) =>
          Array.from({ length: c.length }, (_, k) => (inside(n - k) ? row[n - k] - inputs[r].mean : 0)),
        ),
      );
      right.push(inside(n - c.delay) ? d[n - c.delay] - desired.mean : 0);
    };
    if (c.windowing === 'covariance') {
      for (const { from, to } of usedSegments(take, take.fit, c.length, c.delay)) {
        for (let n = from; n < to; n++) addRow(n, () => true);
        L += to - from;
      }
    } else {
      for (const { from, to } of take.fit) {
        for (let n = from; n < to + c.length; n++) addRow(n, (i) => i >= from && i < to);
        L += to - from;
      }
    }
  }
  if (c.regularisation > 0) {
    for (let i = 0; i < K * c.length; i++) {
      const row = new Array(K * c.length).fill(0);
      row[i] = Math.sqrt(L * c.regularisation * inputs[Math.floor(i / c.length)].power);
      rows.push(row);
      right.push(0);
    }
  }
  return Float64Array.from(
    new QrDecomposition(new Matrix(rows)).solve(Matrix.columnVector(right)).to1DArray(),
  );
}

/** Relative difference of two vectors of taps, 2-norm. */
export function relativeGap(got: ArrayLike<number>, want: ArrayLike<number>): number {
  let gap = 0;
  let size = 0;
  for (let i = 0; i < want.length; i++) {
    gap += (want[i] - got[i]) ** 2;
    size += want[i] ** 2;
  }
  return Math.sqrt(gap / size);
}
