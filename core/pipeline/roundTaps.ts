import type { Rounding } from '../document/pairingDocument';
import { type RoundingCost, roundErrorAware } from '../numbers/errorAwareRounding';
import { type HeldSum, holdSum } from '../numbers/heldSum';
import { type Scaling, scaledCoefficients } from '../numbers/scaling';
import { clamp, powerOfTwo, roundHalfUp, type WordRange, wordRange } from '../numbers/words';
import { factorCholesky } from '../solvers/cholesky';
import type { ShiftStructure } from '../solvers/displacement';
import { unfold } from '../solvers/fold';
import { normalOperator } from '../solvers/normalMultiply';
import { elementsOf, type NormalSystem } from '../solvers/normalSystem';
import { nearElements, structuredDiagonal, structuredElements } from '../solvers/structuredElements';
import type { Fit } from './fitPair';

/** Unknowns up to which a factor is computed for the rounding where the solver has none. */
const mostToFactor = 2048;

/** Rounds the firmware's coefficients to integers of a word; what is dear to compute is kept between calls. */
export type TapRounder = (fractionBits: number, word: number, rounding: Rounding) => Float64Array[];

/**
 * A rounder of the taps of a fit. With `A` the regularised normal matrix made free of units, one step of coefficient i
 * moves the solution by u_i = √P_r · (q_out / q_in,r) · 2^-F, so that the cost matrix of error-aware rounding is `U A U`.
 * Of symmetric taps the free ones are rounded, with the folded matrix; a gain fixed at 0 Hz (or half the rate) is that of
 * the integers exactly where their word and symmetry allow it.
 * @returns integers, one row an input, newest-first
 */
export function tapRounder(fit: Fit, regularisation: number, scaling: Scaling, input: number): TapRounder {
  const { size, scale } = fit.system;
  const scaled = scaledCoefficients(fit.free, scaling);
  const length = fit.fold.free;
  const structure = structureOf(fit.system);
  const bare =
    structure === null
      ? elementsOf(fit.system, regularisation)
      : structuredElements(structure, regularisation);
  const multiply = structure && normalOperator(structure, regularisation);
  const diagonal = structure && structuredDiagonal(structure, regularisation);
  const near = structure && nearElements(structure);
  let factor: Float64Array | null | undefined;
  return (fractionBits, word, rounding) => {
    const step = powerOfTwo(fractionBits);
    const targets = new Float64Array(size);
    scaled.forEach((row, r) => {
      row.forEach((c, k) => {
        targets[r * length + k] = c * step;
      });
    });
    const range = tapRange(word, fit);
    const units = scale.map((s, i) => {
      const r = Math.floor(i / length);
      return (s * scaling.outputCount) / (scaling.inputCount[r] * step);
    });
    const aware = rounding === 'error-aware';
    if (aware && factor === undefined) {
      factor = structure === null ? (fit.solution.factor?.factor ?? factorOf(fit.system, bare)) : null;
    }
    const cost: RoundingCost = {
      size,
      element: aware ? (i, j) => units[i] * units[j] * bare(i, j) : (i, j) => (i === j ? 1 : 0),
      ...(aware && multiply !== null && diagonal !== null && near !== null
        ? {
            products: {
              diagonal: diagonal.map((value, i) => value * units[i] * units[i]),
              multiply: (v: Float64Array) =>
                multiply(v.map((value, i) => value * units[i])).map((value, i) => value * units[i]),
              near: (i: number, j: number) => units[i] * units[j] * near(i, j),
            },
          }
        : {}),
      factor: aware && factor ? factor.map((value, at) => value * units[Math.floor(at / size)]) : null,
    };
    const values = aware
      ? roundErrorAware(targets, cost, range)
      : targets.map((value) => clamp(roundHalfUp(value) + 0, range));
    const held = heldSum(fit, scaling, input, step);
    if (held !== null) {
      const moved = values.slice();
      if (holdSum(moved, targets, cost, range, held)) values.set(moved);
    }
    return unfold(
      fit.fold,
      scaled.map((_, r) => values.slice(r * length, (r + 1) * length)),
    );
  };
}

/** The shift structure of a matrix that is too large to be formed, and for which no factor is made. */
function structureOf({ matrix, size }: NormalSystem): ShiftStructure | null {
  return size > mostToFactor && 'structure' in matrix ? (matrix.structure ?? null) : null;
}

/** Antisymmetric taps need their negatives too. */
export function tapRange(word: number, { fold }: Fit): WordRange {
  const range = wordRange(word);
  return fold.symmetry === 'odd' ? { min: -range.max, max: range.max } : range;
}

/** The sum that a fixed gain asks of the integers, where it is a sum of whole multiples of them. */
function heldSum({ gain, fold, free }: Fit, scaling: Scaling, input: number, step: number): HeldSum | null {
  if (gain === null || gain.columns.length !== 1) return null;
  const weights = new Float64Array(free.length * fold.free);
  for (let a = 0; a < fold.free; a++) {
    const weight = Math.round(gain.columns[0][a]);
    if (Math.abs(weight - gain.columns[0][a]) > 1e-9) return null;
    weights[input * fold.free + a] = weight;
  }
  const counts = (gain.values[0] * scaling.inputCount[input]) / scaling.outputCount;
  return { weights, total: roundHalfUp(counts * step) };
}

function factorOf({ size }: NormalSystem, element: (i: number, j: number) => number): Float64Array | null {
  if (size > mostToFactor) return null;
  const dense = new Float64Array(size * size);
  for (let i = 0; i < size; i++) {
    for (let j = 0; j <= i; j++) dense[i * size + j] = element(i, j);
  }
  const factored = factorCholesky(dense, size);
  return 'order' in factored ? null : factored.factor;
}
