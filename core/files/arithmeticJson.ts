import { roundedDecibels } from '../figures/decibels';
import type { DesignResult } from '../pipeline/designResult';
import type { Json } from './jsonText';
import { signalWords } from './signalWords';

/** The key `arithmetic` of `NAME.taps.json`. `accumulatorBits` is what the worst case needs, `accumulator` what is there. */
export function arithmeticJson({ document, arithmetic }: DesignResult): Json {
  const asked = document.arithmetic;
  const words = signalWords(document);
  const { worstCase } = arithmetic;
  return {
    word: asked.word,
    fractionBits: arithmetic.fractionBits,
    rounding: asked.rounding,
    values: arithmetic.values.map((row) => Array.from(row)),
    heldOutNmseDb: roundedDecibels(arithmetic.heldOutNmseDb),
    quantisationLossDb: roundedDecibels(arithmetic.quantisationLossDb),
    outputErrorDb: roundedDecibels(arithmetic.outputErrorDb),
    accumulator: asked.accumulator,
    accumulatorBits: worstCase === null ? null : worstCase.bits,
    accumulatorOverflow: asked.accumulatorOverflow,
    // Beyond 2^53 a number would lose digits.
    worstCase: worstCase === null ? null : { min: String(worstCase.min), max: String(worstCase.max) },
    overflow: asked.overflow,
    samples: arithmetic.samples,
    overflows: arithmetic.accumulatorOverflows + arithmetic.outputOverflows,
    accumulatorOverflows: arithmetic.accumulatorOverflows,
    outputOverflows: arithmetic.outputOverflows,
    input: {
      word: words.input,
      fullScale: [...arithmetic.inputFullScale],
      countsPerUnit: arithmetic.inputCount.map((q) => 1 / q),
      meanCounts: [...arithmetic.inputMeanCounts],
    },
    output: {
      word: words.output,
      fullScale: arithmetic.outputFullScale,
      countsPerUnit: 1 / arithmetic.outputCount,
      desiredMeanCounts: arithmetic.desiredMeanCounts,
    },
  };
}
