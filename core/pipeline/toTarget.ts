import { finding, Refusal } from '../findings/finding';
import { fits, fittingFractionBits, roundToNearest } from '../numbers/fractionBits';
import { isFloat, scaledCoefficients } from '../numbers/scaling';
import type { TargetFilter } from '../numbers/targetFilter';
import { powerOfTwo, wordRange } from '../numbers/words';
import type { Fit } from './fitPair';
import type { Pairing } from './pairing';
import { roundTaps } from './roundTaps';
import { targetFormat, targetScaling } from './targetFormat';

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
  return {
    values:
      arithmetic.rounding === 'error-aware'
        ? roundTaps(
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
