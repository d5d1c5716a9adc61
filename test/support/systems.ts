import { usedSegments } from '../../core/pair/usedSegments';
import type { ShiftStructure } from '../../core/solvers/displacement';
import { elementsOf, type NormalSystem } from '../../core/solvers/normalSystem';
import { type Method, prepare } from '../../core/solvers/prepare';
import { refine } from '../../core/solvers/refine';
import { normals } from './random';
import { type Solved, solveTakes, takeOf } from './takes';

/** Rows of a symmetric matrix by its elements. */
export function denseRows(system: NormalSystem, regularisation: number): number[][] {
  const element = elementsOf(system, regularisation);
  return Array.from({ length: system.size }, (_, i) =>
    Array.from({ length: system.size }, (_value, j) => element(Math.max(i, j), Math.min(i, j))),
  );
}

/** What a system's matrix is rebuilt from; throws where it has no shift structure. */
export function structureOf({ matrix }: NormalSystem): ShiftStructure {
  if ('toeplitz' in matrix || matrix.structure === undefined) throw new Error('no shift structure');
  return matrix.structure;
}

/** The taps of a system by one method, input by input; throws where the method breaks down. */
export function tapsBy(method: Method, system: NormalSystem, regularisation: number): Float64Array {
  const prepared = prepare(method, system, regularisation);
  if ('order' in prepared) throw new Error(`${method} broke down at order ${prepared.order}`);
  const { multiply, inverse, refinements } = prepared;
  const { solution } = refine(multiply, inverse, system.right, refinements);
  return solution.map((value, i) => value / system.scale[i]);
}

export interface SystemShape {
  inputs: number;
  length: number;
  /** Stretches of 3·length samples each and more. */
  stretches: number;
  windowing?: 'covariance' | 'autocorrelation';
  /** Of the recursion x[n] = pole x[n-1] + white noise. */
  pole?: number;
}

/** Normal equations of coloured noise, one fit interval a stretch. */
export async function noiseSystem(shape: SystemShape, seed: number): Promise<Solved> {
  const { inputs, length, stretches, windowing = 'covariance', pole = 0.7 } = shape;
  const samples = Math.max(2000, 3 * length * inputs) + stretches * 2 * length;
  const x = Array.from({ length: inputs }, (_, r) => {
    const row = normals(seed + r, samples);
    for (let n = 1; n < samples; n++) row[n] += pole * row[n - 1];
    return row;
  });
  const noise = normals(seed + 100, samples);
  const d = noise.map((value, n) => x.reduce((sum, row, r) => sum + (row[n - 3 * r] ?? 0) / (r + 1), value));
  const each = Math.floor(samples / stretches);
  const fit = Array.from({ length: stretches }, (_, i) => ({ from: i * each, to: (i + 1) * each - 7 }));
  const take = takeOf(x, d, { fit });
  if (windowing === 'covariance' && usedSegments(take, fit, length, 0).length !== stretches) {
    throw new Error('got stretches without usable samples');
  }
  return solveTakes([take], { length, delay: 0, windowing });
}
