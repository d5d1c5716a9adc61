import { normalMatrix } from '../statistics/normalMatrix';
import type { NormalSums } from '../statistics/normalSums';
import { type ShiftStructure, shiftStructure } from './displacement';

/**
 * The normal equations made free of units: with `D = diag(√P_r)`,
 * `D⁻¹ (Φ/L) D⁻¹ (D w) = D⁻¹ θ/L`; regularisation adds ρ to the diagonal.
 */
export interface NormalSystem {
  size: number;
  /** Right-hand side `D⁻¹ θ/L`. */
  right: Float64Array;
  /** √P_r for every unknown: `w = solution / scale`. */
  scale: Float64Array;
  /**
   * `A = D⁻¹ (Φ/L) D⁻¹`: its first column where it is Toeplitz, otherwise row-major with the lower triangle filled.
   * Where what its shift updates need is at hand, the matrix is formed only when it is first asked for.
   */
  matrix: { toeplitz: Float64Array } | { readonly dense: Float64Array; structure?: ShiftStructure };
}

/**
 * @param powers P_r of each input, all above 0
 */
export function normalSystem(sums: NormalSums, powers: readonly number[]): NormalSystem {
  const { inputs, length, count } = sums;
  const size = inputs * length;
  const scale = new Float64Array(size);
  const right = new Float64Array(size);
  for (let r = 0; r < inputs; r++) {
    const root = Math.sqrt(powers[r]);
    for (let k = 0; k < length; k++) {
      scale[r * length + k] = root;
      right[r * length + k] = sums.cross[r][k] / count / root;
    }
  }
  if (inputs === 1 && sums.edges.length === 0) {
    const toeplitz = sums.correlations[0][0].map((value) => value / count / powers[0]);
    return { size, right, scale, matrix: { toeplitz } };
  }
  let formed: Float64Array | null = null;
  const matrix = {
    structure: shiftStructure(sums, powers),
    get dense() {
      formed ??= denseMatrix(sums, scale);
      return formed;
    },
  };
  return { size, right, scale, matrix };
}

function denseMatrix(sums: NormalSums, scale: Float64Array): Float64Array {
  const size = scale.length;
  const dense = normalMatrix(sums);
  for (let i = 0; i < size; i++) {
    for (let j = 0; j <= i; j++) dense[i * size + j] /= sums.count * scale[i] * scale[j];
  }
  return dense;
}

/** Elements (i, j), i ≥ j, of `A + ρ I`. The first of them forms A where it is not Toeplitz. */
export function elementsOf(
  { size, matrix }: NormalSystem,
  regularisation: number,
): (i: number, j: number) => number {
  if ('toeplitz' in matrix) {
    const { toeplitz } = matrix;
    return (i, j) => (i === j ? toeplitz[0] + regularisation : toeplitz[i - j]);
  }
  let dense: Float64Array | null = null;
  return (i, j) => {
    dense ??= matrix.dense;
    return i === j ? dense[i * size + i] + regularisation : dense[i * size + j];
  };
}

/** `(A + ρ I) v`, element by element. */
export function multiply(system: NormalSystem, regularisation: number, v: Float64Array): Float64Array {
  const { size } = system;
  const product = new Float64Array(size);
  const element = elementsOf(system, regularisation);
  for (let i = 0; i < size; i++) {
    let sum = element(i, i) * v[i];
    for (let j = 0; j < i; j++) {
      const a = element(i, j);
      sum += a * v[j];
      product[j] += a * v[i];
    }
    product[i] += sum;
  }
  return product;
}
