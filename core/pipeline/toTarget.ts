import { finding, Refusal } from '../findings/finding';
import { fits, fittingFractionBits } from '../numbers/fractionBits';
import { isFloat, scaledCoefficients } from '../numbers/scaling';
import type { TargetFilter } from '../numbers/targetFilter';
import { powerOfTwo, wordRange } from '../numbers/words';
import type { Fit } from './fitPair';
import type { Work } from './host';
import type { Pairing } from './pairing';
import { type TapRounder, tapRange, tapRounder } from './roundTaps';
import { fitKey } from './stageKeys';
import { targetFormat, targetScaling } from './targetFormat';

/** The solution in the numbers of the target, and the rounder that made them, for other words. */
export interface Target {
  filter: TargetFilter;
  /** Null for float words. */
  rounder: TapRounder | null;
}

/**
 * Turns the solution into the numbers of the target.
 * @throws Refusal `coefficient-too-large` where no number of fraction bits lets the coefficients fit
 */
export async function toTarget(pairing: Pairing, fit: Fit, { keep }: Work): Promise<Target> {
  return keep('target', [fitKey(pairing), pairing.document.arithmetic], async () => convert(pairing, fit));
}

function convert(pairing: Pairing, fit: Fit): Target {
  const { arithmetic, filter } = pairing.document;
  const scaling = targetScaling(pairing, fit.filter.means);
  const { word } = arithmetic;
  if (isFloat(word)) {
    const round = word === 'float32' ? Math.fround : (value: number) => value;
    const values = fit.filter.coefficients.map((row) => row.map(round));
    return { filter: { values, scaling, format: word }, rounder: null };
  }
  const rounder = tapRounder(fit, filter.regularisation, scaling, (filter.fixedGain?.input ?? 1) - 1);
  const fractionBits = chooseFractionBits(pairing, fit, scaledCoefficients(fit.free, scaling), word);
  const values = rounder(fractionBits, word, arithmetic.rounding);
  return { filter: { values, scaling, format: targetFormat(arithmetic, fractionBits) }, rounder };
}

function chooseFractionBits(
  pairing: Pairing,
  fit: Fit,
  scaled: readonly Float64Array[],
  word: number,
): number {
  const { fractionBits, accumulator } = pairing.document.arithmetic;
  const range = tapRange(word, fit);
  const fitting = fittingFractionBits(scaled, range, accumulator);
  if (fitting !== null && (fractionBits === null || fits(scaled, range, fractionBits))) {
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
