import type { Scaling } from './scaling';
import { roundHalfUp, wordRange } from './words';

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
  const { min, max } = wordRange(inputWord);
  const q = scaling.inputCount[input];
  const mean = scaling.inputMeanCounts[input];
  const counts = new Float64Array(raw.length);
  for (let n = 0; n < raw.length; n++) {
    const count = roundHalfUp(raw[n] / q) - mean;
    counts[n] = Math.max(min, Math.min(max, count));
  }
  return counts;
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
