import { table } from './sentence';

/** Findings about the spectra of a pair: what a filter could reach at all, and where the recordings say nothing. */
export const spectraSentences = table({
  'low-coherence': {
    severity: 'caution',
    says: 'the coherence lets no linear filter reduce the desired signal by more than {reduction} dB when expected at least {least} dB (Welch, Hann segments of {segment} samples, {averages} averages). The rest is noise, comes from another source or is not linear{wanted}. Bring the input closer to the source, add a second input, or record at a higher level.',
  },
  'attainable-unknown': {
    severity: 'note',
    says: 'how much a linear filter could reach at most cannot be told: {why}. {known}Record for longer to know.',
  },
  'poor-excitation': {
    severity: 'caution',
    says: 'the input has no energy in {bands} (60 dB below its peak, or no more than the rounding of its converter), so that nothing shows how a filter has to answer there; by its spectrum the condition number goes up to {condition}. Record with an input that covers the band in which the filter is to be used, or take the response there for unknown.',
  },
  'unproven-gain': {
    severity: 'caution',
    says: 'the filter has gain in {bands}, up to {gain} dB against its largest gain elsewhere, where the input had no energy: it came about by chance, and no held-out sample shows it. Raise the regularisation, record with an input that reaches there, or keep these bands away from the filter.',
  },
  'noisy-input': {
    severity: 'caution',
    says: "{how} that {percent} % of the input's power is noise: the taps are too small by as much, which held-out data cannot show. Record at a higher level or with a quieter sensor. (A path that changes with the level looks the same.)",
  },
  'noisy-input-possible': {
    severity: 'note',
    says: 'the coherence is only {coherence} where the input is strong. As far as that is noise on the input, and not on the output, the taps are too small, by {percent} % at most, which held-out data cannot show. A second take at another level, or a second sensor on the input, would tell.',
  },
  'spectral-null': {
    severity: 'caution',
    says: 'in {bands} so little of the desired signal reaches the input that restoring it would raise the noise by up to {rise} dB when expected at most {limit} dB. The least-squares filter leaves these bands low instead of restoring them; more regularisation (now {regularisation}) lowers its gain and the noise there further and makes the error larger. Move the sensor or give these bands up.',
  },
});
