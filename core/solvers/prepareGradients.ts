import { blockCirculantInverse } from './blockCirculant';
import { circulantInverse } from './circulant';
import type { Operator } from './conditionNumber';
import { conjugateGradients } from './conjugateGradients';
import type { ShiftStructure } from './displacement';
import { gohbergSemencul } from './gohbergSemencul';
import { predictionErrors } from './levinson';
import { normalOperator } from './normalMultiply';
import type { Prepared } from './prepare';
import { smallestEigenvalue } from './smallestEigenvalue';
import { spectralToeplitz } from './spectralToeplitz';
import { quickToeplitzOperator } from './toeplitz';
import { zeroExtended } from './zeroExtended';

/** Narrow-band inputs take more; Levinson's recursion is faster for them. */
const mostToeplitzSteps = 60;

/**
 * Steps after which a matrix with edges is given up. Measured with 2,048 unknowns where the fit has 64, 4, 2 and 1.2 samples
 * for each: one input, white to narrow-band, 8, 27, 45 and 130 steps at most; two or three white or coloured inputs 25, 56,
 * 96 and 300, narrow-band ones 108 and from 4 on more than these 200. A tone 60 dB above the noise does not settle.
 */
export const mostGradientSteps = 200;

/** Residual as a share of the right-hand side. */
const tolerance = 1e-13;

/**
 * Conjugate gradients on a symmetric Toeplitz matrix with T. Chan's preconditioner; where the size is a power of two on
 * spectra, which saves a third of the transforms.
 * @param column its first column
 */
export function prepareToeplitzGradients(column: Float64Array): Prepared {
  const size = column.length;
  const plain = prepared(quickToeplitzOperator(column), circulantInverse(column), size, mostToeplitzSteps);
  if ((size & (size - 1)) !== 0 || size < 16) return plain;
  const { multiply, precondition, toSpectrum, toVector } = spectralToeplitz(column);
  const inverse = inverseOf(multiply, precondition, mostToeplitzSteps);
  return { ...plain, inverse: (b) => toVector(inverse(toSpectrum(b))) };
}

/**
 * Conjugate gradients on `A + ρ I` with products by transforms. The preconditioner is the inverse of the zero-extended
 * autocorrelation, which is Toeplitz: for one input exactly, by Levinson's recursion and the Gohberg–Semencul formula
 * (n²/2 multiplications); for several by the nearest block circulant matrix, which takes two to three times as many
 * steps, and more for narrow-band inputs, but n log n operations where a recursion for blocks takes n² for each input.
 * @returns the order at which the recursion breaks down
 */
export function prepareGradients(
  structure: ShiftStructure,
  regularisation: number,
): Prepared | { order: number } {
  const size = structure.inputs * structure.length;
  const columns = zeroExtended(structure, regularisation);
  let precondition: Operator;
  if (structure.inputs === 1) {
    const errors = predictionErrors(columns[0][0]);
    if (errors.order < size) return { order: errors.order };
    precondition = gohbergSemencul(errors);
  } else {
    precondition = blockCirculantInverse(columns);
  }
  return prepared(normalOperator(structure, regularisation), precondition, size, mostGradientSteps);
}

function prepared(multiply: Operator, precondition: Operator, size: number, most: number): Prepared {
  return {
    multiply,
    inverse: inverseOf(multiply, precondition, most),
    smallestEigenvalue: (settled) => smallestEigenvalue(multiply, precondition, size, settled),
    refinements: 0,
    factor: null,
  };
}

/** NaN where the steps do not suffice. */
function inverseOf(multiply: Operator, precondition: Operator, most: number): Operator {
  return (b) => {
    const { solution, reached } = conjugateGradients(multiply, precondition, b, tolerance, most);
    return reached ? solution : solution.fill(Number.NaN);
  };
}
