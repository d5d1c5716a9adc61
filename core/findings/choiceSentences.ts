import { table } from './sentence';

/** Findings about the choice of length, delay and regularisation by cross-validation. */
export const choiceSentences = table({
  'too-short-to-choose': {
    severity: 'blocker',
    says: 'got {samples} usable samples in the fit intervals when expected more than {wanted} to choose by cross-validation: two blocks with a gap of {gap} samples (the filter and its delay) around. Shorten the filter, take the delay back or lengthen the intervals.',
  },
  'nothing-to-choose': {
    severity: 'blocker',
    says: 'none of the candidates could be solved on every part of the fit intervals: the input does not excite what even the shortest filter could do. Raise the regularisation or check the input.',
  },
  'few-blocks': {
    severity: 'caution',
    says: 'the fit intervals are only long enough for {blocks} left-out blocks when expected at least {wanted}: the standard errors, and with them the suggestion, are rough. Lengthen the fit intervals or shorten the filter.',
  },
  'longest-is-best': {
    severity: 'caution',
    says: 'the longest filter that was tried, {length} taps, is the one that is suggested: a longer one may be better still. Set "filter.length" to {length} and choose again.',
  },
  'delay-at-the-end': {
    severity: 'caution',
    says: 'the delay that is suggested, {delay}, is the {end} that was tried: a delay beyond it may be better still. Set "filter.delay" to {delay} and choose again.',
  },
  'choice-hidden': {
    severity: 'caution',
    says: 'no fit interval is marked as disturbance only, so that the wanted signal, where it is in the fit, counts as error and makes differences between candidates look smaller than they are: the filter suggested may be too short. Mark a stretch of the fit without the wanted signal in "disturbanceOnly".',
  },
  'choice-of-free-taps': {
    severity: 'note',
    says: 'cross-validation compares filters with free taps fitted with "covariance" windowing; the document asks for {asked}. The held-out figure of the suggestion is that of the filter as the document asks for it.',
  },
  'suggestion-unsolvable': {
    severity: 'caution',
    says: 'the suggested filter could not be solved over all fit intervals with regularisation {regularisation}: {why}. It has no held-out figure; take more regularisation.',
  },
});
