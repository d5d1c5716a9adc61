import type { Check } from '../checks/check';
import { orNull } from '../checks/check';
import type { Keys } from '../checks/keys';
import { positiveUpTo, wholeIn } from '../checks/numbers';
import { oneOf } from '../checks/texts';
import { overflows, type PairingDocument, roundings, type Word } from '../pairingDocument';
import { signalWord } from './signalWord';

/** Words that coefficients can have. */
const coefficientWords = [8, 12, 16, 24, 32, 'float32', 'float64'] as const;

/** Cycles of a multiply-accumulate at most; software floats take some hundreds. */
const mostCycles = 1e6;

const word: Check<Word> = oneOf(coefficientWords);

/**
 * The number format of the target.
 * @param inputs of each take; null where the takes do not tell
 */
export function arithmetic(inputs: number | null): (keys: Keys) => PairingDocument['arithmetic'] {
  return (keys) => {
    const coefficients = keys.optional('word', word, 16);
    const fractionBits = keys.optional('fractionBits', orNull(wholeIn(0, 62)), null);
    const accumulator = keys.optional('accumulator', wholeIn(8, 64), 40);
    if (typeof coefficients === 'number' && fractionBits !== null && fractionBits > accumulator - 2) {
      const values = { got: fractionBits, accumulator, max: accumulator - 2 };
      keys.at.inside('fractionBits').report('fraction-bits-too-many', values);
    }
    return {
      word: coefficients,
      fractionBits,
      rounding: keys.optional('rounding', oneOf(roundings), 'error-aware'),
      accumulator,
      accumulatorOverflow: keys.optional('accumulatorOverflow', oneOf(overflows), 'wrap'),
      overflow: keys.optional('overflow', oneOf(overflows), 'saturate'),
      input: keys.section('input', signalWord(coefficients, inputs)),
      output: keys.section('output', signalWord(coefficients, 1)),
      cyclesPerMac: keys.optional('cyclesPerMac', positiveUpTo(mostCycles), 1),
    };
  };
}
