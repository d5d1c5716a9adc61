import type { CholeskyFactor } from './cholesky';
import { generatorsOf, type ShiftStructure } from './displacement';
import { factorBySchur } from './generalisedSchur';

/** Unknowns up to which a factor is kept: 34 MB. */
const mostToKeep = 2048;

/**
 * The Cholesky factor of `A + ρ I` for those who ask for it, made by the generalised Schur algorithm when its values are
 * first read. Null where there are several inputs, whose unknowns stand in another order there, or too many unknowns.
 * Reading its values throws where the matrix is not positive definite: it is for systems that have been solved.
 */
export function factorOnDemand(structure: ShiftStructure, regularisation: number): CholeskyFactor | null {
  const size = structure.length;
  if (structure.inputs > 1 || size > mostToKeep) return null;
  let factor: Float64Array | null = null;
  return {
    size,
    get factor() {
      factor ??= factorOf(structure, regularisation);
      return factor;
    },
  };
}

function factorOf(structure: ShiftStructure, regularisation: number): Float64Array {
  const size = structure.length;
  const factor = new Float64Array(size * size);
  const generators = generatorsOf(structure, regularisation);
  const breakdown =
    'order' in generators
      ? generators
      : factorBySchur(generators, (i, column, offset) => {
          const sign = Math.sign(column[i + offset]);
          for (let t = i; t < size; t++) factor[t * size + i] = sign * column[t + offset];
        });
  if (breakdown !== null) throw new Error(`got a breakdown at order ${breakdown.order} of a solved system`);
  return factor;
}
