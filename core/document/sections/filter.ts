import { orNull } from '../checks/check';
import type { Keys } from '../checks/keys';
import { numberIn, wholeIn } from '../checks/numbers';
import { oneOf } from '../checks/texts';
import { type Job, type PairingDocument, symmetries, windowings } from '../pairingDocument';
import { fixedGain } from './fixedGain';

/** Taps of one input at most. */
const longestFilter = 65_536;

/** Samples of delay at most, either way. */
const longestDelay = 1e9;

/** Regularisation at most; far below it the taps are nought already. */
const strongestRegularisation = 1e6;

/**
 * The filter's length, delay, how it is fitted and what shape its taps have.
 * @param inputs of each take; null where the takes do not tell
 */
export function filter(job: Job, inputs: number | null): (keys: Keys) => PairingDocument['filter'] {
  return (keys) => {
    const length = keys.optional('length', wholeIn(1, longestFilter), 64);
    const fitted = {
      length,
      delay: keys.optional('delay', wholeIn(-longestDelay, longestDelay), defaultDelay(job, length)),
      // For one input it keeps the condition number below a million times the length, so that the system can be
      // solved, and costs at most a millionth of the input's power for taps of unit energy.
      regularisation: keys.optional('regularisation', numberIn(0, strongestRegularisation), 1e-6),
      windowing: keys.optional('windowing', oneOf(windowings), 'covariance'),
    };
    const symmetry = keys.optional('symmetry', oneOf(symmetries), 'none');
    if (symmetry === 'odd' && length === 1) keys.at.inside('symmetry').report('no-free-taps');
    const held = keys.optional('fixedGain', orNull(fixedGain(inputs, symmetry)), null);
    return { ...fitted, symmetry, fixedGain: held };
  };
}

/**
 * The delay that suits a job: an equaliser looks half its length ahead, so that it can undo what came before and
 * after (common practice); a predictor looks one sample ahead; the others compare the signals as they were recorded.
 */
function defaultDelay(job: Job, length: number): number {
  if (job === 'equalise') return Math.floor(length / 2);
  return job === 'predict' ? -1 : 0;
}
