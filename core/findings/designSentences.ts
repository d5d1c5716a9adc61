import { table } from './sentence';

/** Findings about the design itself: the pair, the system of equations, the number format, the result. */
export const designSentences = table({
  'not-finite-used': {
    severity: 'blocker',
    says: 'got {value} at sample {sample} when expected a number: the fit or the held-out part uses it. Leave the stretch out of the intervals or repair the recording.',
  },
  trivial: {
    severity: 'blocker',
    says: 'the desired signal is the input itself, delayed by {delay}, which lies inside the filter (0 to {last}): one tap of 1 would be the answer. Choose another channel, or for prediction a delay below 0.',
  },
  'too-few-samples': {
    severity: 'blocker',
    says: 'got {samples} usable samples in the fit intervals when expected at least {unknowns}, one for each of the {unknowns} taps (and many more to be of use). Shorten the filter, take the delay back or lengthen the intervals.',
  },
  'too-many-taps': {
    severity: 'blocker',
    says: 'got {unknowns} taps in all when expected at most {limit}. Shorten the filter.',
  },
  'too-many-mirrored': {
    severity: 'blocker',
    says: 'got {unknowns} taps in all when expected at most {limit} where taps mirror each other: their matrix has to be formed. Shorten the filter or leave out "symmetry".',
  },
  'too-many-stretches': {
    severity: 'blocker',
    says: 'got {unknowns} taps in all and {stretches} stretches of usable samples when expected at most {limit} taps or {most} stretches. Shorten the filter, join fit intervals or set "windowing" to "autocorrelation".',
  },
  silent: {
    severity: 'blocker',
    says: 'the signal is constant over the fit intervals, so that no filter can be found from it. Check the channel and the cabling.',
  },
  unsolvable: {
    severity: 'blocker',
    says: 'the system of equations cannot be solved with regularisation {regularisation} ({why}): the input does not excite all that the filter could do. The smallest regularisation that can be solved is {smallest}; a shorter filter is the other way.',
  },
  'ill-conditioned': {
    severity: 'caution',
    says: 'the condition number is {condition}: parts of the response rest on almost no input energy and change with the smallest noise. More regularisation or a shorter filter makes them settle.',
  },
  'no-held-out': {
    severity: 'caution',
    says: 'no held-out interval could be used, so that nothing was proved: the figures are those of the samples the filter was fitted to.',
  },
  'no-disturbance-only': {
    severity: 'caution',
    says: 'no held-out stretch is marked as disturbance only, so that the wanted signal counts as error and hides what the filter does. Record a stretch without the wanted signal and name it in "disturbanceOnly".',
  },
  'limit-not-tested': {
    severity: 'caution',
    says: 'the limit on {what} was not tested: {why}.',
  },
  'over-limit': {
    severity: 'caution',
    says: '{what} is {value} dB when expected at most {limit} dB{where}.',
  },
  'coefficient-too-large': {
    severity: 'blocker',
    says: 'the largest coefficient is {largest} output counts per input count, which no {word}-bit word with {fractionBits} fraction bits can hold (largest {limit}). Raise output.fullScale, lower input.fullScale, or take a longer word{fewer}.',
  },
  overflow: {
    severity: 'caution',
    says: '{where} overflowed at {count} of {samples} samples of the bit-true run. {cure}',
  },
  'overflow-possible': {
    severity: 'caution',
    says: 'the worst input needs an accumulator of {bits} bits when {accumulator} are given; no sample of the recording came to that. {cure}',
  },
  'gain-frequency': {
    severity: 'blocker',
    says: 'a gain is fixed at {frequency} Hz when expected at most {limit} Hz, half the sample rate.',
  },
  'gain-unreachable': {
    severity: 'blocker',
    says: 'symmetric taps of this length have no gain at {frequency} Hz whatever their values. Take an odd length, another frequency, or no symmetry.',
  },
  'gain-not-exact': {
    severity: 'note',
    says: 'the integers have a gain of {got} at {frequency} Hz when {expected} is fixed: {why}.',
  },
  'band-beyond-rate': {
    severity: 'blocker',
    says: 'the band ends at {to} Hz when expected at most {limit} Hz, half the sample rate.',
  },
  'band-too-narrow': {
    severity: 'blocker',
    says: 'a filter for the band {from} Hz to {to} Hz would take {taps} taps when expected at most {limit}: {what} asks for them. Widen the band, or let it begin at 0 Hz or end at half the sample rate.',
  },
});
