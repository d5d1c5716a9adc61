import type { LossFigures } from '../evaluation/targetTally';
import { roundedDecibels } from '../figures/decibels';
import type { DesignResult, ShapeResult } from '../pipeline/designResult';
import { smallestWord } from '../pipeline/studyWords';
import type { Json } from './jsonText';

/** The key `words` of `NAME.taps.json`: what other word lengths would lose, and the shares of the chosen one's loss. */
export function wordsJson({ words, document }: DesignResult): Json {
  if (words === null) return null;
  const limit = document.limits.quantisationLoss;
  return {
    samples: words.samples,
    table: words.words.map(({ word, rounding, fractionBits, accumulatorBits, ...figures }) => ({
      word,
      rounding,
      fractionBits,
      accumulatorBits,
      ...lossJson(figures),
    })),
    smallestWithinLimit: limit === null ? null : (smallestWord(words, limit)?.word ?? null),
    shares: {
      input: lossJson(words.shares.input),
      taps: lossJson(words.shares.taps),
      output: lossJson(words.shares.output),
    },
  };
}

function lossJson({ nmseDb, quantisationLossDb, outputErrorDb }: LossFigures): { [key: string]: Json } {
  return {
    heldOutNmseDb: roundedDecibels(nmseDb),
    quantisationLossDb: roundedDecibels(quantisationLossDb),
    outputErrorDb: roundedDecibels(outputErrorDb),
  };
}

/** The key `shape`: the fixed gain as it came out and the price of what is asked. */
export function shapeJson(shape: ShapeResult | null): Json {
  if (shape === null) return null;
  return {
    gain: shape.gain && {
      asked: shape.gain.asked,
      taps: [...shape.gain.taps],
      target: [...shape.gain.target],
    },
    prices: shape.prices.map(({ without, nmseDb, priceDb }) => ({
      without,
      heldOutNmseDb: roundedDecibels(nmseDb),
      priceDb: roundedDecibels(priceDb),
    })),
  };
}
