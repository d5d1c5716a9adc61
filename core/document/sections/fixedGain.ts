import type { Check } from '../checks/check';
import { objectOf } from '../checks/keys';
import { numberIn, wholeIn } from '../checks/numbers';
import type { FixedGain, Symmetry } from '../pairingDocument';
import { highestRate } from './prepare';
import { mostInputs } from './takes';

/** Amplitude ratios at most; far beyond any unit. */
const largestGain = 1e30;

/**
 * A gain that the filter must have at one frequency. Antisymmetric taps have a phase of their own (a quarter turn and no
 * gain at 0 Hz), so that a gain cannot be asked of them.
 * @param inputs of each take; null where the takes do not tell
 */
export function fixedGain(inputs: number | null, symmetry: Symmetry): Check<FixedGain> {
  return (value, at) => {
    if (symmetry === 'odd') return at.report('fixed-gain-odd');
    return objectOf((keys) => {
      const frequency = keys.required('frequency', numberIn(0, highestRate));
      const gain = keys.required('gain', numberIn(-largestGain, largestGain));
      const input = keys.optional('input', wholeIn(1, mostInputs), 1);
      if (inputs !== null && input > inputs)
        keys.at.inside('input').report('fixed-gain-input', { got: input, inputs });
      return frequency === undefined || gain === undefined ? undefined : { input, frequency, gain };
    })(value, at);
  };
}
