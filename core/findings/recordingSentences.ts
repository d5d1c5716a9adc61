import { table } from './sentence';

/** Findings about one recording file. */
export const recordingSentences = table({
  'not-finite': {
    severity: 'blocker',
    says: '{count} samples are NaN or infinite, the first at sample {first}; the fit needs numbers. Leave the stretch out of the intervals or repair the recording.',
  },
});
