import { table } from './sentence';

/** Findings about when things happen in a pair: lag, clocks, what comes before its cause. */
export const timingSentences = table({
  lag: {
    severity: 'caution',
    says: '{desired} comes {lag} samples {order} {input}, and {reach}.{start} A delay of {offer} takes the lag up and keeps {spare} of its taps before it.',
  },
  drift: {
    severity: 'caution',
    says: 'the clocks of {input} and {desired} differ by {ppm} ± {error} ppm, so that the lag changes by {cost} samples over the fit, when expected less than {limit}. One filter cannot follow that. Record both with one clock, or resample one of the files by that much.',
  },
  acausal: {
    severity: 'caution',
    says: '{share} % of the energy of the two-sided least-squares response lies before the first tap of the filter; with it the error on samples not fitted to would be {gain} ± {error} dB less. A delay of {delay} catches {caught} % of it. {cure}',
  },
});
