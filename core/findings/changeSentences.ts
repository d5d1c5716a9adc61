import { table } from './sentence';

/** Findings about what changes along a recording, and what the wanted signal changes. */
export const changeSentences = table({
  'non-stationary': {
    severity: 'caution',
    says: '{what} when expected {expected}. {cure}',
  },
  crosstalk: {
    severity: 'caution',
    says: 'the wanted signal seems to reach the reference: where it is present, a filter fitted there leaves {gain} ± {error} dB less error than the one fitted to the disturbance alone, on samples it was not fitted to, and the input is {rise} dB {direction}. The filter would cancel up to {share} % of the wanted signal. Shield or move the reference sensor and record again; if the path itself differs between those stretches, fit each by itself.',
  },
  'crosstalk-unknown': {
    severity: 'note',
    says: 'whether the wanted signal reaches the reference cannot be told from these recordings. Record a stretch of the disturbance with the wanted signal off beside one with both, and name the first in "disturbanceOnly".',
  },
});
