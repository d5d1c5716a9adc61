import { table } from './sentence';

/** Findings about what is left in the residual of the fit. */
export const residualSentences = table({
  'taps-missing': {
    severity: 'note',
    says: 'the residual still follows the input {from} to {to} samples back, beyond the last tap (probability by chance {probability}): taps there would lower the error of the fit by about {gain} dB. Lengthen the filter.',
  },
  'delay-missing': {
    severity: 'note',
    says: 'the residual follows the input up to {lags} samples before the filter has it (probability by chance {probability}): taps there would lower the error of the fit by about {gain} dB. Raise filter.delay, and the length with it; where the desired signal acts back on the input, expect this.',
  },
});
