import { type Rounding, roundings } from '../document/pairingDocument';
import { shareVariants, studyVariants, targetVariant, type Variant } from '../evaluation/lossStudy';
import type { Run } from '../evaluation/measuredRuns';
import type { LossFigures } from '../evaluation/targetTally';
import { fittingFractionBits } from '../numbers/fractionBits';
import { type IntegerFormat, scaledCoefficients } from '../numbers/scaling';
import { integerFormat, type TargetFilter } from '../numbers/targetFilter';
import { worstCase } from '../numbers/worstCase';
import type { Pace } from '../pace';
import type { Fit } from './fitPair';
import { tapRange } from './roundTaps';
import type { Target } from './toTarget';

/** Words of coefficients that are compared. */
const words = [8, 12, 16, 24, 32];

/** A word length, a rounding and what they lose. */
export interface WordFigures extends LossFigures {
  word: number;
  rounding: Rounding;
  fractionBits: number;
  /** Bits that the accumulator needs in the worst case. */
  accumulatorBits: number;
}

/** What each word length would lose, and which rounding of the chosen format loses how much. */
export interface WordStudy {
  /** Number of n run. */
  samples: number;
  /** Every word that can hold the coefficients, both roundings of each. */
  words: WordFigures[];
  /** The chosen format with each rounding by itself. */
  shares: Record<'input' | 'taps' | 'output', LossFigures>;
}

/**
 * Compares word lengths and roundings over the measured runs, each with the most fraction bits that its word allows (the
 * chosen word with those of the document) and an accumulator wide enough.
 * @param chosen rounding of the target
 * @returns null where the target computes in floats
 */
export async function studyWords(
  fit: Fit,
  { filter: target, rounder }: Target,
  chosen: Rounding,
  runs: readonly Run[],
  pace: Pace,
): Promise<WordStudy | null> {
  const format = integerFormat(target);
  if (format === null || rounder === null) return null;
  const scaled = scaledCoefficients(fit.free, target.scaling);
  const rows: Omit<WordFigures, keyof LossFigures>[] = [];
  const variants: Variant[] = [];
  for (const word of words) {
    const fitting = fittingFractionBits(scaled, tapRange(word, fit), 64);
    const fractionBits = word === format.word ? format.fractionBits : fitting;
    if (fractionBits === null) continue;
    for (const rounding of roundings) {
      const wide: IntegerFormat = {
        ...format,
        word,
        fractionBits,
        accumulator: 64,
        accumulatorOverflow: 'wrap',
      };
      const asked = word === format.word && rounding === chosen;
      const values = asked ? target.values : rounder(fractionBits, word, rounding);
      const { bits } = worstCase(values, wide);
      if (bits > 64) continue;
      rows.push({ word, rounding, fractionBits, accumulatorBits: bits });
      variants.push(targetVariant({ ...target, values, format: wide }));
      await pace.step('word lengths', rows.length, words.length * roundings.length);
    }
  }
  const alone = sharesOf(target, fit, format);
  const study = await studyVariants(runs, fit.filter, target, [...variants, ...alone], pace);
  const [input, taps, output] = study.figures.slice(rows.length);
  return {
    samples: study.samples,
    words: rows.map((row, i) => ({ ...row, ...study.figures[i] })),
    shares: { input, taps, output },
  };
}

function sharesOf(target: TargetFilter, fit: Fit, format: IntegerFormat): Variant[] {
  const { input, taps, output } = shareVariants(
    target,
    fit.filter.coefficients,
    format.fractionBits,
    format.outputWord,
  );
  return [input, taps, output];
}

/** The shortest word of the study whose loss keeps to a limit in dB, compared as shown. */
export function smallestWord(study: WordStudy, limit: number): WordFigures | null {
  const enough = study.words.filter(
    ({ quantisationLossDb }) => Number(quantisationLossDb.toFixed(2)) <= limit,
  );
  return enough.length === 0 ? null : enough.reduce((a, b) => (b.word < a.word ? b : a));
}
