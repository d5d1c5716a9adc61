import type { At, Check } from '../checks/check';
import { orNull } from '../checks/check';
import { describe } from '../checks/describe';
import type { Keys } from '../checks/keys';
import { listOf } from '../checks/lists';
import { positiveUpTo } from '../checks/numbers';
import type { SignalWord, Word } from '../pairingDocument';
import { mostInputs } from './takes';

/** Float words of a signal. */
const floatWords = ['float32', 'float64'] as const;

/** Bits of a signal's integer word. */
const signalBits = { min: 2, max: 32 };

/** Amplitudes at most; far beyond any unit, and far from where doubles end. */
const largestFullScale = 1e30;

/**
 * A signal's word: integers where the coefficients are integers, otherwise the coefficients' own float type.
 * @param count signals that share the word: a full scale each, or one for all; null where the takes do not tell
 */
export function signalWord(coefficients: Word, count: number | null): (keys: Keys) => SignalWord {
  return (keys) => ({
    word: keys.optional('word', wordLike(coefficients), typeof coefficients === 'number' ? 16 : coefficients),
    fullScale: keys.optional('fullScale', orNull(fullScales(count)), null),
  });
}

function wordLike(coefficients: Word): Check<Word> {
  return (value, at) => {
    const found = anyWord(value, at);
    const alike = typeof coefficients === 'number' ? typeof found === 'number' : found === coefficients;
    if (found === undefined || alike) return found;
    return at.report('words-mixed', { got: inWords(found), coefficients: inWords(coefficients) });
  };
}

function anyWord(value: unknown, at: At): Word | undefined {
  const float = floatWords.find((name) => name === value);
  if (float !== undefined) return float;
  const { min, max } = signalBits;
  if (typeof value === 'number' && Number.isInteger(value) && value >= min && value <= max) return value;
  return at.report('not-a-signal-word', { got: describe(value), min, max });
}

function inWords(word: Word): string {
  return typeof word === 'number' ? `${word}-bit integers` : word;
}

const amplitude = positiveUpTo(largestFullScale);

function fullScales(count: number | null): Check<number[]> {
  const list = listOf(amplitude, 1, mostInputs);
  return (value, at) => {
    if (!Array.isArray(value)) {
      const one = amplitude(value, at);
      return one === undefined ? undefined : Array.from({ length: count ?? 1 }, () => one);
    }
    const each = list(value, at);
    if (each === undefined || count === null || each.length === count) return each;
    return at.report('full-scale-count', { got: each.length, expected: count });
  };
}
