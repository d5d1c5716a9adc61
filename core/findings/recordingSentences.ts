import { table } from './sentence';

/** Findings about one recording file. */
export const recordingSentences = table({
  'not-finite': {
    severity: 'caution',
    says: '{count} samples are NaN or infinite, the first at sample {first}; the fit needs numbers. Leave the stretch out of the intervals or repair the recording.',
  },
  clipped: {
    severity: 'caution',
    says: '{extent} at exactly {level}, from {positions}, where the signal was expected to turn before the end of its range: it is clipped. Lower the gain and record again, or leave these stretches out of the intervals.',
  },
  stuck: {
    severity: 'caution',
    says: 'the signal stands still {times}, {samples} samples in all and {longest} at most, from {positions}, first at exactly {value}; expected a change with every sample, as before and after. Check sensor and logger, and leave these stretches out of the intervals.',
  },
  dropout: {
    severity: 'caution',
    says: 'the signal falls to exactly 0 {times}, {samples} samples in all and {longest} at most, from {positions}; expected it to go on as before and after: samples were lost. Check cable and logger, and leave these stretches out of the intervals.',
  },
  offset: {
    severity: 'note',
    says: 'the mean is {mean}, {ratio} times the rms of what varies ({varying}); expected a signal around zero. Set "removeMean" in "prepare" to true, or the fit spends its taps on the offset.',
  },
  'low-level': {
    severity: 'caution',
    says: 'the signal uses {steps} steps of its resolution, {bits}; expected {fewest} bits or more, because rounding adds a noise of its own. Raise the gain or take a finer format and record again.',
  },
  'identical-channels': {
    severity: 'caution',
    says: 'every sample is the same as in channel {other}; expected two signals. Check the wiring and which channels were exported.',
  },
  mains: {
    severity: 'note',
    says: 'lines of the {mains} Hz mains stand above the spectrum around them: {lines}; expected none. Where they are not part of what the filter is for, check shielding and earthing and record again.',
  },
});
