import type { Overflow, Word } from '../document/pairingDocument';
import type { Means } from '../pair/signals';
import { powerOfTwo, roundHalfUp } from './words';

/** How amplitudes become counts in the firmware; counts are amplitudes where words are floats. */
export interface Scaling {
  /** Amplitudes for 2^(B-1) counts. */
  inputFullScale: number[];
  outputFullScale: number;
  /** q: unit of one input count for each input, and of one output count. */
  inputCount: number[];
  outputCount: number;
  /** `floor(mean/q + ½)`. */
  inputMeanCounts: number[];
  desiredMeanCounts: number;
}

/** The arithmetic of the integer filter, as the contract of the written files has it. */
export interface IntegerFormat {
  /** Bits of a coefficient. */
  word: number;
  fractionBits: number;
  inputWord: number;
  outputWord: number;
  /** Bits of the accumulator, at most 64. */
  accumulator: number;
  accumulatorOverflow: Overflow;
  overflow: Overflow;
}

export function isFloat(word: Word): word is 'float32' | 'float64' {
  return typeof word === 'string';
}

export function integerScaling(
  inputFullScale: readonly number[],
  outputFullScale: number,
  inputWord: number,
  outputWord: number,
  means: Means,
): Scaling {
  const inputCount = inputFullScale.map((scale) => scale / powerOfTwo(inputWord - 1));
  const outputCount = outputFullScale / powerOfTwo(outputWord - 1);
  return {
    inputFullScale: [...inputFullScale],
    outputFullScale,
    inputCount,
    outputCount,
    inputMeanCounts: means.inputs.map((mean, r) => roundHalfUp(mean / inputCount[r])),
    desiredMeanCounts: roundHalfUp(means.desired / outputCount),
  };
}

/** Float words compute in the recordings' units: one count is one unit, means are rounded to the word. */
export function floatScaling(word: 'float32' | 'float64', means: Means): Scaling {
  const round = word === 'float32' ? Math.fround : (value: number) => value;
  const ones = means.inputs.map(() => 1);
  return {
    inputFullScale: ones,
    outputFullScale: 1,
    inputCount: ones,
    outputCount: 1,
    inputMeanCounts: means.inputs.map(round),
    desiredMeanCounts: round(means.desired),
  };
}

/** The firmware's coefficients in output counts per input count, still real numbers: `w_r q_in,r / q_out`. */
export function scaledCoefficients(coefficients: readonly Float64Array[], scaling: Scaling): Float64Array[] {
  return coefficients.map((row, r) => row.map((w) => (w * scaling.inputCount[r]) / scaling.outputCount));
}
