import type { Scaling } from './scaling';
import { clamp, roundHalfUp, wordRange } from './words';

/**
 * What the firmware's filter sees of a raw signal: `clamp(floor(raw/q + ½) - floor(mean/q + ½))` to the input word.
 * @param raw samples in the recording's unit, mean not taken off
 */
export function inputCounts(
  raw: Float64Array,
  input: number,
  inputWord: number,
  scaling: Scaling,
): Float64Array {
  const range = wordRange(inputWord);
  const q = scaling.inputCount[input];
  const mean = scaling.inputMeanCounts[input];
  return raw.map((value) => clamp(roundHalfUp(value / q) - mean, range));
}

/** The same for float words: the word's rounding of `raw - mean`. */
export function inputFloats(
  raw: Float64Array,
  input: number,
  word: 'float32' | 'float64',
  scaling: Scaling,
): Float64Array {
  const mean = scaling.inputMeanCounts[input];
  if (word === 'float64') return raw.map((value) => value - mean);
  return raw.map((value) => Math.fround(Math.fround(value) - mean));
}
