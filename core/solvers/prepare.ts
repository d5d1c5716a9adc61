import { type CholeskyFactor, factorCholesky, solveCholesky } from './cholesky';
import { largestEigenvalue, type Operator } from './conditionNumber';
import { generatorsOf, type ShiftStructure } from './displacement';
import { factorOnDemand } from './factorOnDemand';
import { invertBySchur } from './generalisedSchur';
import { gohbergSemencul } from './gohbergSemencul';
import { predictionErrors } from './levinson';
import { normalOperator } from './normalMultiply';
import { elementsOf, multiply, type NormalSystem } from './normalSystem';
import { prepareGradients, prepareToeplitzGradients } from './prepareGradients';
import { shiftSumOperator } from './shiftSum';
import { toeplitzOperator } from './toeplitz';

export type Method = 'levinson' | 'gradients' | 'schur' | 'cholesky';

/** A regularised system made ready for any right-hand side. */
export interface Prepared {
  /** v ↦ (A + ρ I) v */
  multiply: Operator;
  /** Close to v ↦ (A + ρ I)⁻¹ v */
  inverse: Operator;
  /**
   * The smallest eigenvalue of A + ρ I, from above.
   * @param settled change of four steps at which it is known well enough, as a share of it
   */
  smallestEigenvalue(settled: number): number;
  /** Steps of refinement that it takes at most. */
  refinements: number;
  /** Where the method has one. */
  factor: CholeskyFactor | null;
}

/** One or two steps are enough, four up to condition numbers that are refused; it ends where it gains nothing. */
const mostRefinements = 4;

/** Below this Cholesky's method is as fast. */
const fewestForSchur = 256;

/** Where conjugate gradients take over from recursions, whose time grows as the square. */
export interface Limits {
  /** Unknowns above which they are tried first. */
  unknowns: number;
  /** Pairs of generators times unknowns², some 2 ns each, up to which the Schur algorithm stands in for them. */
  schur: number;
}

export const usualLimits: Limits = { unknowns: 8192, schur: 1e9 };

/** The method that suits the structure and the size of the matrix. */
export function methodFor({ matrix, size }: NormalSystem, limits = usualLimits): Method {
  if ('toeplitz' in matrix) return size <= limits.unknowns ? 'levinson' : 'gradients';
  const { structure } = matrix;
  if (structure === undefined || size < fewestForSchur) return 'cholesky';
  if (size > limits.unknowns) return 'gradients';
  // Its time grows as pairs · size², Cholesky's as size³.
  return pairsOf(structure) <= 8 + size / 16 ? 'schur' : 'cholesky';
}

/** Whether the generalised Schur algorithm ends within a second or two. */
export function schurIsShort({ matrix, size }: NormalSystem, limits: Limits): boolean {
  if ('toeplitz' in matrix || matrix.structure === undefined) return false;
  return pairsOf(matrix.structure) * size * size <= limits.schur;
}

/** Pairs of columns that its generators have. */
function pairsOf({ inputs, edges }: ShiftStructure): number {
  return inputs + edges.length;
}

/**
 * Factors or inverts `A + ρ I`.
 * @returns the order of the leading part that could be, where the matrix is not positive definite to working accuracy
 */
export function prepare(
  method: Method,
  system: NormalSystem,
  regularisation: number,
): Prepared | { order: number } {
  const { matrix } = system;
  if ('toeplitz' in matrix && method !== 'cholesky') {
    const column = matrix.toeplitz.slice();
    column[0] += regularisation;
    return method === 'gradients' ? prepareToeplitzGradients(column) : prepareLevinson(column);
  }
  if ('structure' in matrix && matrix.structure !== undefined) {
    if (method === 'schur') return prepareSchur(matrix.structure, regularisation);
    if (method === 'gradients') return prepareGradients(matrix.structure, regularisation);
  }
  return prepareCholesky(system, regularisation);
}

function prepareLevinson(column: Float64Array): Prepared | { order: number } {
  const errors = predictionErrors(column);
  if (errors.order < column.length) return { order: errors.order };
  const inverse = gohbergSemencul(errors);
  return {
    multiply: toeplitzOperator(column),
    inverse,
    smallestEigenvalue: byInverse(inverse, column.length),
    refinements: mostRefinements,
    factor: factorOnDemand({ inputs: 1, length: column.length, columns: [[column]], edges: [] }, 0),
  };
}

function prepareSchur(structure: ShiftStructure, regularisation: number): Prepared | { order: number } {
  const generators = generatorsOf(structure, regularisation);
  const result = 'order' in generators ? generators : invertBySchur(generators);
  if ('order' in result) return result;
  const { inputs, length } = structure;
  const byInput = (column: Float64Array) =>
    Array.from({ length: inputs }, (_, r) =>
      Float64Array.from({ length }, (_value, k) => column[k * inputs + r]),
    );
  const plus = result.plus.map(byInput);
  const minus = result.minus.map(byInput);
  const inverse = shiftSumOperator({ inputs, length, toeplitz: null, plus, minus });
  return {
    multiply: normalOperator(structure, regularisation),
    inverse,
    smallestEigenvalue: byInverse(inverse, inputs * length),
    refinements: mostRefinements,
    factor: factorOnDemand(structure, regularisation),
  };
}

function prepareCholesky(system: NormalSystem, regularisation: number): Prepared | { order: number } {
  const { size } = system;
  const element = elementsOf(system, regularisation);
  const dense = new Float64Array(size * size);
  for (let i = 0; i < size; i++) {
    for (let j = 0; j <= i; j++) dense[i * size + j] = element(i, j);
  }
  const factor = factorCholesky(dense, size);
  if ('order' in factor) return factor;
  const inverse: Operator = (b) => solveCholesky(factor, b);
  return {
    multiply: (v) => multiply(system, regularisation, v),
    inverse,
    smallestEigenvalue: byInverse(inverse, size),
    refinements: 1,
    factor,
  };
}

function byInverse(inverse: Operator, size: number): (settled: number) => number {
  return (settled) => 1 / largestEigenvalue(inverse, size, settled);
}
