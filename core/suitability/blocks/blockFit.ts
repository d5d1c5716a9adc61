import { factorCholesky, solveCholesky } from '../../solvers/cholesky';
import type { Block } from './blockSums';

/** One row an input, newest-first. */
export type Coefficients = Float64Array[];

/** Regularisation of the fits that are compared: 60 dB below the input, so that directions without energy stay quiet. */
export const leastRegularisation = 1e-6;

/** Amplitude relative to the loudest input below which only the rounding of the sums may be left. */
const silence = 1e-12;

/** Share of Σ d² below which errors are not told apart: what the regularisation leaves may be as large. */
export const leastError = 1e-6;

/**
 * The least-squares filter over some blocks.
 * @param skip taps at the newest end that are held at zero: the filter then begins that many samples later
 * @returns null where an input is silent, samples are fewer than three a tap, or the system cannot be solved
 */
export function fitBlocks(
  blocks: readonly Block[],
  regularisation = leastRegularisation,
  skip = 0,
): Coefficients | null {
  if (blocks.length === 0) return null;
  const { inputs, length } = blocks[0].sums;
  const kept = length - skip;
  const size = inputs * kept;
  const count = blocks.reduce((sum, { sums }) => sum + sums.count, 0);
  if (count < 3 * size) return null;
  const { matrix, right } = totals(blocks, inputs, length, skip);
  // Φ is about the same on all of an input's diagonal: its first element is the input's energy.
  const scale = Float64Array.from({ length: size }, (_, i) => {
    const first = Math.floor(i / kept) * kept;
    return Math.sqrt(matrix[first * size + first]);
  });
  const loudest = scale.reduce((a, b) => Math.max(a, b), 0);
  if (!scale.every((root) => root > silence * loudest)) return null;
  for (let i = 0; i < size; i++) {
    for (let j = 0; j <= i; j++) matrix[i * size + j] /= scale[i] * scale[j];
    matrix[i * size + i] += regularisation;
    right[i] /= scale[i];
  }
  const factor = factorCholesky(matrix, size);
  if ('order' in factor) return null;
  const solution = solveCholesky(factor, right);
  return Array.from({ length: inputs }, (_, r) => {
    const row = new Float64Array(length);
    for (let k = 0; k < kept; k++) row[skip + k] = solution[r * kept + k] / scale[r * kept + k];
    return row;
  });
}

/** Normal matrix and right-hand side over all blocks, without the taps left out. */
function totals(
  blocks: readonly Block[],
  inputs: number,
  length: number,
  skip: number,
): { matrix: Float64Array; right: Float64Array } {
  const kept = length - skip;
  const size = inputs * kept;
  const place = Int32Array.from(
    { length: size },
    (_, i) => Math.floor(i / kept) * length + skip + (i % kept),
  );
  const matrix = new Float64Array(size * size);
  const right = new Float64Array(size);
  for (const block of blocks) {
    for (let i = 0; i < size; i++) {
      const row = place[i] * inputs * length;
      for (let j = 0; j <= i; j++) matrix[i * size + j] += block.matrix[row + place[j]];
      right[i] += block.sums.cross[Math.floor(i / kept)][skip + (i % kept)];
    }
  }
  return { matrix, right };
}

/** Σ e² of a filter over a block, found from its sums to about 1e-13 of Σ d²; not below 1e-6 (-60 dB) of it. */
export function errorOver(block: Block, filter: Coefficients): number {
  const { cross, desiredEnergy } = block.sums;
  let energy = desiredEnergy + outputEnergy(block, filter);
  filter.forEach((row, r) => {
    for (let k = 0; k < row.length; k++) energy -= 2 * row[k] * cross[r][k];
  });
  return Math.max(leastError * desiredEnergy, energy);
}

/** Σ y² of a filter over a block. */
export function outputEnergy({ sums, matrix }: Block, filter: Coefficients): number {
  const { inputs, length } = sums;
  const size = inputs * length;
  const taps = new Float64Array(size);
  filter.forEach((row, r) => {
    taps.set(row, r * length);
  });
  let energy = 0;
  for (let i = 0; i < size; i++) {
    let row = matrix[i * size + i] * taps[i];
    for (let j = 0; j < i; j++) row += 2 * matrix[i * size + j] * taps[j];
    energy += taps[i] * row;
  }
  return energy;
}
