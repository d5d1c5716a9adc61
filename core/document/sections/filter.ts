import type { Keys } from '../checks/keys';
import { numberIn, wholeIn } from '../checks/numbers';
import { oneOf } from '../checks/texts';
import { type Job, type PairingDocument, windowings } from '../pairingDocument';

/** Taps of one input at most. */
const longestFilter = 65_536;

/** Samples of delay at most, either way. */
const longestDelay = 1e9;

/** Regularisation at most; far below it the taps are nought already. */
const strongestRegularisation = 1e6;

/** The filter's length, delay and how it is fitted. */
export function filter(job: Job): (keys: Keys) => PairingDocument['filter'] {
  return (keys) => {
    const length = keys.optional('length', wholeIn(1, longestFilter), 64);
    return {
      length,
      delay: keys.optional('delay', wholeIn(-longestDelay, longestDelay), defaultDelay(job, length)),
      // For one input it keeps the condition number below a million times the length, so that the system can be
      // solved, and costs at most a millionth of the input's power for taps of unit energy.
      regularisation: keys.optional('regularisation', numberIn(0, strongestRegularisation), 1e-6),
      windowing: keys.optional('windowing', oneOf(windowings), 'covariance'),
    };
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
