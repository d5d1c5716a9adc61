import type { Operator } from '../solvers/conditionNumber';
import { generatorsOf, type ShiftStructure } from '../solvers/displacement';
import { type InverseGenerators, invertBySchur } from '../solvers/generalisedSchur';
import type { NormalSystem } from '../solvers/normalSystem';
import { prepare } from '../solvers/prepare';
import { shiftSumOperator } from '../solvers/shiftSum';

/** The inverse of a regularised normal matrix. Unknowns stand input by input. */
export interface Inverse {
  apply: Operator;
  /** Rows in some order; a row holds until the next. */
  rows(): Generator<{ unknown: number; row: Float64Array }>;
}

/** Below this Cholesky's method is as fast. */
const fewestForSchur = 128;

/**
 * By the generalised Schur algorithm where the matrix has a shift structure: its rows then follow from each other, n²
 * operations for each pair of generators; otherwise by Cholesky's method, a solution for each row. Relative error about
 * 1e-14 times the condition number, which is enough for standard errors.
 * @returns null where the matrix is not positive definite to working accuracy
 */
export function inverseOf(system: NormalSystem, regularisation: number): Inverse | null {
  const structure = structureOf(system);
  if (structure !== null && system.size >= fewestForSchur) {
    const generators = generatorsOf(structure, regularisation);
    const result = 'order' in generators ? generators : invertBySchur(generators);
    if (!('order' in result)) return structured(result, structure);
  }
  const prepared = prepare('cholesky', system, regularisation);
  return 'order' in prepared ? null : solved(prepared.inverse, system.size);
}

function structureOf({ matrix, size }: NormalSystem): ShiftStructure | null {
  if ('toeplitz' in matrix) return { inputs: 1, length: size, columns: [[matrix.toeplitz]], edges: [] };
  return matrix.structure ?? null;
}

function structured(generators: InverseGenerators, { inputs, length }: ShiftStructure): Inverse {
  const byInput = (column: Float64Array) =>
    Array.from({ length: inputs }, (_, r) =>
      Float64Array.from({ length }, (_value, k) => column[k * inputs + r]),
    );
  return {
    apply: shiftSumOperator({
      inputs,
      length,
      toeplitz: null,
      plus: generators.plus.map(byInput),
      minus: generators.minus.map(byInput),
    }),
    *rows() {
      const { plus, minus } = generators;
      const size = inputs * length;
      const latest = Array.from({ length: inputs }, () => new Float64Array(size));
      const row = new Float64Array(size);
      for (let i = 0; i < size; i++) {
        const r = i % inputs;
        // In this order of unknowns, tap by tap: element (i, j) is that one tap before and what the generators add.
        latest[r].copyWithin(inputs, 0, size - inputs);
        latest[r].fill(0, 0, inputs);
        plus.forEach((column) => {
          addMultiple(latest[r], column, column[i]);
        });
        minus.forEach((column) => {
          addMultiple(latest[r], column, -column[i]);
        });
        for (let s = 0; s < inputs; s++) {
          for (let k = 0; k < length; k++) row[s * length + k] = latest[r][k * inputs + s];
        }
        yield { unknown: r * length + (i - r) / inputs, row };
      }
    },
  };
}

function solved(apply: Operator, size: number): Inverse {
  return {
    apply,
    *rows() {
      for (let unknown = 0; unknown < size; unknown++) {
        const unit = new Float64Array(size);
        unit[unknown] = 1;
        yield { unknown, row: apply(unit) };
      }
    },
  };
}

function addMultiple(row: Float64Array, column: Float64Array, factor: number): void {
  if (factor === 0) return;
  for (let j = 0; j < row.length; j++) row[j] += factor * column[j];
}
