import { roundedDecibels } from '../figures/decibels';
import type { WorstCase } from '../numbers/worstCase';
import type { DesignResult } from '../pipeline/designResult';
import type { Json } from './jsonText';
import { signalWords } from './signalWords';

/** The key `arithmetic` of `NAME.taps.json`. `accumulatorBits` is what the worst case needs, `accumulator` what is there. */
export function arithmeticJson({ document, arithmetic }: DesignResult): Json {
  const asked = document.arithmetic;
  const words = signalWords(document);
  return {
    word: asked.word,
    fractionBits: arithmetic.fractionBits,
    rounding: asked.rounding,
    values: arithmetic.values.map((row) => Array.from(row)),
    heldOutNmseDb: roundedDecibels(arithmetic.heldOutNmseDb),
    quantisationLossDb: roundedDecibels(arithmetic.quantisationLossDb),
    outputErrorDb: roundedDecibels(arithmetic.outputErrorDb),
    accumulator: asked.accumulator,
    accumulatorBits: arithmetic.worstCase?.bits ?? null,
    accumulatorOverflow: asked.accumulatorOverflow,
    worstCase: bound(arithmetic.worstCase),
    recordedCase: bound(arithmetic.recordedCase),
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

/** Beyond 2^53 a number would lose digits, so that bounds are texts. */
function bound(limits: WorstCase | null): Json {
  return limits === null ? null : { min: String(limits.min), max: String(limits.max), bits: limits.bits };
}
