import { finding, Refusal } from '../findings/finding';
import { roundErrorAware } from '../numbers/errorAwareRounding';
import { fits, fittingFractionBits, roundToNearest } from '../numbers/fractionBits';
import { isFloat, type Scaling, scaledCoefficients } from '../numbers/scaling';
import type { TargetFilter } from '../numbers/targetFilter';
import { powerOfTwo, wordRange } from '../numbers/words';
import { factorCholesky } from '../solvers/cholesky';
import type { Fit } from './fitPair';
import type { Pairing } from './pairing';
import { targetFormat, targetScaling } from './targetFormat';

/** Unknowns above which error-aware rounding is left for plain rounding: its cost grows with their square. */
const mostForErrorAware = 4096;

/**
 * Turns the solution into the numbers of the target.
 * @throws Refusal `coefficient-too-large` where no number of fraction bits lets the coefficients fit
 */
export function toTarget(pairing: Pairing, fit: Fit): TargetFilter {
  const { arithmetic } = pairing.document;
  const { coefficients, means } = fit.filter;
  if (isFloat(arithmetic.word)) {
    const round = arithmetic.word === 'float32' ? Math.fround : (value: number) => value;
    return {
      values: coefficients.map((row) => row.map(round)),
      scaling: targetScaling(pairing, means),
      format: arithmetic.word,
    };
  }
  const scaling = targetScaling(pairing, means);
  const scaled = scaledCoefficients(coefficients, scaling);
  const fractionBits = chooseFractionBits(pairing, scaled, arithmetic.word);
  const aware = arithmetic.rounding === 'error-aware' && fit.system.size <= mostForErrorAware;
  return {
    values: aware
      ? errorAware(
          fit,
          pairing.document.filter.regularisation,
          scaled,
          scaling,
          fractionBits,
          arithmetic.word,
        )
      : roundToNearest(scaled, fractionBits),
    scaling,
    format: targetFormat(arithmetic, fractionBits),
  };
}

function chooseFractionBits(pairing: Pairing, scaled: readonly Float64Array[], word: number): number {
  const { fractionBits, accumulator } = pairing.document.arithmetic;
  const fitting = fittingFractionBits(scaled, word, accumulator);
  if (fitting !== null && (fractionBits === null || fits(scaled, word, fractionBits))) {
    return fractionBits ?? fitting;
  }
  const tried = fractionBits ?? 0;
  const largest = Math.max(...scaled.map((row) => row.reduce((most, c) => Math.max(most, Math.abs(c)), 0)));
  throw new Refusal([
    finding(
      'coefficient-too-large',
      {
        largest,
        word,
        fractionBits: tried,
        limit: wordRange(word).max / powerOfTwo(tried),
        fewer: fitting === null ? '' : `, or at most ${fitting} fraction bits`,
      },
      { path: ['arithmetic', fractionBits === null ? 'word' : 'fractionBits'] },
    ),
  ]);
}

/** In units of one step of each coefficient the cost matrix is `U A U`, U = (√P_r / s_r) 2^-F: so is its factor `U G`. */
function errorAware(
  fit: Fit,
  regularisation: number,
  scaled: readonly Float64Array[],
  scaling: Scaling,
  fractionBits: number,
  word: number,
): Float64Array[] {
  const { size, scale } = fit.system;
  const length = size / scaled.length;
  const factor = costFactor(fit, regularisation);
  const steps = new Float64Array(size);
  const step = powerOfTwo(fractionBits);
  for (let i = 0; i < size; i++) {
    const r = Math.floor(i / length);
    const unit = (scale[i] * scaling.outputCount) / (scaling.inputCount[r] * step);
    for (let j = 0; j <= i; j++) factor[i * size + j] *= unit;
    steps[i] = scaled[r][i - r * length] * step;
  }
  const values = roundErrorAware(steps, { size, factor }, word);
  return scaled.map((_, r) => values.slice(r * length, (r + 1) * length));
}

function costFactor({ solution, system }: Fit, regularisation: number): Float64Array {
  if (solution.factor !== null) return solution.factor.factor.slice();
  if (!('toeplitz' in system.matrix)) throw new Error('a dense system was solved without a factor');
  const { toeplitz } = system.matrix;
  const { size } = system;
  const dense = new Float64Array(size * size);
  for (let i = 0; i < size; i++) {
    for (let j = 0; j <= i; j++) dense[i * size + j] = toeplitz[i - j] + (i === j ? regularisation : 0);
  }
  const factored = factorCholesky(dense, size);
  if ('order' in factored) throw new Error('Levinson solved what Cholesky cannot factor');
  return factored.factor;
}
