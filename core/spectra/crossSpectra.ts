import { newSpectrum, type Spectrum } from '../statistics/blockSpectra';
import { hann, hannSlope } from './hann';
import { addPower, addPowerAndProduct, addProduct } from './products';
import { type Channel, naturalFrequency, newSegmentSpectra } from './segmentSpectra';

/**
 * Cross-spectral densities of several signals, one-sided, in unit·unit/Hz. Signals are the inputs in order, then the
 * desired one.
 */
export interface CrossSpectra {
  signals: number;
  /** Samples of a segment. */
  segment: number;
  /** Hz. */
  sampleRate: number;
  /** Segments averaged. */
  averages: number;
  /** Pairs of segments among them that overlap by half. */
  overlaps: number;
  /** `between[r][s]`, r ≤ s: E{ conj(X_r) X_s } at the frequencies i·sampleRate/segment, segment/2 + 1 values. */
  between: Spectrum[][];
}

/** Gathers {@link CrossSpectra} from blocks of samples. */
export interface CrossSpectraGatherer {
  /** Brings the next samples of every signal, equally many each. */
  push(signals: readonly Float64Array[]): void;
  /** The next samples do not follow on the last ones. */
  gap(): void;
  readonly averages: number;
  /** What has been gathered so far; zeros where nothing was averaged. */
  spectra(): CrossSpectra;
}

/**
 * Welch's method (IEEE Trans. Audio Electroacoust. 15, 1967) for the whole Hermitian matrix of several signals:
 * periodic Hann window, half-overlapped segments. No mean is taken off a segment: whoever reads the signals takes off
 * one constant over all, as the fit does, so that slow changes count as what they are.
 * @param count number of signals
 * @param segment samples of a segment, a power of two, 4 or more
 * @param sampleRate in Hz
 */
export function newCrossSpectra(count: number, segment: number, sampleRate: number): CrossSpectraGatherer {
  const window = hann(segment);
  const channels = Array.from({ length: count }, (_, signal) => ({ signal, window }));
  return gathererOf(channels, segment, sampleRate);
}

/**
 * The same with each input seen through the slope of the window as well: K inputs, their K slopes, the desired signal.
 * A response that is not short against the segment carries samples over the ends of the segment, which look like noise;
 * to first order they are the slopes' doing, so that taking the slopes for further inputs removes them (Pintelon &
 * Schoukens, *System Identification: A Frequency Domain Approach*, local modelling of leakage, from memory). What is
 * left falls with the fourth power of the segment's length, not with the second.
 * @param inputs K
 */
export function newSlopeSpectra(inputs: number, segment: number, sampleRate: number): CrossSpectraGatherer {
  const window = hann(segment);
  const slope = hannSlope(segment);
  const rows = Array.from({ length: inputs }, (_, signal) => signal);
  return gathererOf(
    [
      ...rows.map((signal) => ({ signal, window })),
      ...rows.map((signal) => ({ signal, window: slope })),
      { signal: inputs, window },
    ],
    segment,
    sampleRate,
  );
}

/** Some of the signals of cross-spectra, in the order given, which must rise. */
export function pickSignals(spectra: CrossSpectra, signals: readonly number[]): CrossSpectra {
  const between = signals.map((r) => signals.map((s) => spectra.between[r][s]));
  return { ...spectra, signals: signals.length, between };
}

function gathererOf(channels: readonly Channel[], segment: number, sampleRate: number): CrossSpectraGatherer {
  const count = channels.length;
  const half = segment / 2;
  const sums = Array.from({ length: count }, () => Array.from({ length: count }, () => newSpectrum(0)));
  for (let r = 0; r < count; r++) for (let s = r; s < count; s++) sums[r][s] = newSpectrum(half + 1);
  let averages = 0;
  let overlaps = 0;
  const segments = newSegmentSpectra(channels, segment, (spectra, follows) => {
    for (let r = 0; r < count; r++) {
      for (let s = r + 1; s < count; s++) {
        // Signal 0 meets every other: their powers are added on the way.
        if (r === 0) addPowerAndProduct(sums[s][s].re, sums[0][s], spectra[0], spectra[s]);
        else addProduct(sums[r][s], spectra[r], spectra[s]);
      }
    }
    addPower(sums[0][0].re, spectra[0]);
    averages++;
    if (follows) overlaps++;
  });

  return {
    push: segments.push,
    gap: segments.gap,
    get averages() {
      return averages;
    },
    spectra() {
      // That of Hann's window; the slopes have no unit of their own.
      const energy = (3 * segment) / 8;
      const unit = averages === 0 ? 0 : 1 / (averages * sampleRate * energy);
      const between = sums.map((row, r) =>
        row.map((sum, s) => {
          const scale = segments.scales[r] * segments.scales[s];
          return inOrder(sum, scale > 0 ? unit / scale : 0);
        }),
      );
      return { signals: count, segment, sampleRate, averages, overlaps, between };
    },
  };
}

/** One-sided, in the natural order of frequencies. */
function inOrder(sum: Spectrum, unit: number): Spectrum {
  const half = sum.re.length - 1;
  const ordered = newSpectrum(sum.re.length);
  for (let h = 0; h <= half; h++) {
    const f = naturalFrequency(h, half);
    const weight = f === 0 || f === half ? unit : 2 * unit;
    ordered.re[f] = weight * sum.re[h];
    ordered.im[f] = weight * sum.im[h];
  }
  return ordered;
}

/**
 * How many independent segments would give estimates as steady as the averaged ones: `K / (1 + 2 c² overlaps/K)`, where
 * c = 1/6 is the correlation of a Hann window with itself half a segment on (Welch 1967, eq. for the variance).
 */
export function effectiveAverages({ averages, overlaps }: CrossSpectra): number {
  return averages === 0 ? 0 : averages / (1 + overlaps / (18 * averages));
}

/** Frequencies of the densities, in Hz. */
export function frequenciesOf({ segment, sampleRate }: CrossSpectra): Float64Array {
  return Float64Array.from({ length: segment / 2 + 1 }, (_, f) => (f * sampleRate) / segment);
}
