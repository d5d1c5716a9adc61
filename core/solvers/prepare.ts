import { type CholeskyFactor, factorCholesky, solveCholesky } from './cholesky';
import { circulantInverse } from './circulant';
import type { Operator } from './conditionNumber';
import { conjugateGradients } from './conjugateGradients';
import { generatorsOf, type ShiftStructure } from './displacement';
import { factorOnDemand } from './factorOnDemand';
import { invertBySchur } from './generalisedSchur';
import { gohbergSemencul } from './gohbergSemencul';
import { predictionErrors, toeplitzOperator } from './levinson';
import { normalOperator } from './normalMultiply';
import { elementsOf, multiply, type NormalSystem } from './normalSystem';
import { shiftSumOperator } from './shiftSum';

export type Method = 'levinson' | 'gradients' | 'schur' | 'cholesky';

/** A regularised system made ready for any right-hand side. */
export interface Prepared {
  /** v ↦ (A + ρ I) v */
  multiply: Operator;
  /** Close to v ↦ (A + ρ I)⁻¹ v */
  inverse: Operator;
  /** The same to three digits or more, which is enough for the condition number. */
  roughInverse: Operator;
  /** Steps of refinement that it takes at most. */
  refinements: number;
  /** Where the method has one. */
  factor: CholeskyFactor | null;
}

/** One or two steps are enough, four up to condition numbers that are refused; it ends where it gains nothing. */
const mostRefinements = 4;

/** Narrow-band inputs take more; Levinson's recursion is faster for them. */
const mostGradientSteps = 60;

/** Below this Cholesky's method is as fast. */
const fewestForSchur = 256;

/** Above this conjugate gradients are faster than Levinson's recursion, whose time grows as the square. */
const mostForLevinson = 8192;

/** The method that suits the structure and the size of the matrix. */
export function methodFor({ matrix, size }: NormalSystem): Method {
  if ('toeplitz' in matrix) return size <= mostForLevinson ? 'levinson' : 'gradients';
  const { structure } = matrix;
  if (structure === undefined || size < fewestForSchur) return 'cholesky';
  // Its time grows as pairs · size², Cholesky's as size³.
  const pairs = structure.inputs + structure.edges.length;
  return pairs <= 8 + size / 16 ? 'schur' : 'cholesky';
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
    return method === 'gradients' ? prepareGradients(column) : prepareLevinson(column);
  }
  if (method === 'schur' && 'structure' in matrix && matrix.structure !== undefined) {
    return prepareSchur(matrix.structure, regularisation);
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
    roughInverse: inverse,
    refinements: mostRefinements,
    factor: factorOnDemand({ inputs: 1, length: column.length, columns: [[column]], edges: [] }, 0),
  };
}

/** Its inverse gives NaN where the steps do not suffice. */
function prepareGradients(column: Float64Array): Prepared {
  const multiply = toeplitzOperator(column);
  const precondition = circulantInverse(column);
  const solveTo = (tolerance: number) => (b: Float64Array) => {
    const { solution, reached } = conjugateGradients(multiply, precondition, b, tolerance, mostGradientSteps);
    return reached ? solution : solution.fill(Number.NaN);
  };
  return { multiply, inverse: solveTo(1e-14), roughInverse: solveTo(1e-5), refinements: 0, factor: null };
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
    roughInverse: inverse,
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
    roughInverse: inverse,
    refinements: 1,
    factor,
  };
}
