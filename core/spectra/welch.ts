import { hann } from './hann';
import { oneSidedDensity } from './oneSidedDensity';
import { addPower } from './products';
import { newSegmentSpectra } from './segmentSpectra';

/**
 * Power spectral densities by Welch's method (IEEE Trans. Audio Electroacoust. 15, 1967): periodic Hann window,
 * half-overlapped segments, no mean taken off, one-sided.
 */
export interface Welch {
  /** Brings the next samples of every signal, equally many each. */
  push(signals: readonly Float64Array[]): void;
  /** The next samples do not follow on the last ones. */
  gap(): void;
  /** Segments averaged so far. */
  readonly averages: number;
  /** One density for each signal, segment/2 + 1 values in unit²/Hz; zeros where nothing was averaged. */
  densities(): Float64Array[];
}

/**
 * Samples of a segment: a power of two, a sixteenth of the samples at most, so that there is something to average.
 * @param most a power of two, 64 or more; no segment is shorter than 64
 */
export function welchSegment(samples: number, most: number): number {
  let segment = 64;
  while (segment < most && 32 * segment <= samples) segment *= 2;
  return segment;
}

/**
 * @param count number of signals
 * @param segment samples of a segment, a power of two, 4 or more
 * @param sampleRate in Hz
 */
export function newWelch(count: number, segment: number, sampleRate: number): Welch {
  const sums = Array.from({ length: count }, () => new Float64Array(segment / 2 + 1));
  let averages = 0;
  const window = hann(segment);
  const channels = sums.map((_, signal) => ({ signal, window }));
  const segments = newSegmentSpectra(channels, segment, (spectra) => {
    spectra.forEach((spectrum, s) => {
      addPower(sums[s], spectrum);
    });
    averages++;
  });

  return {
    push: segments.push,
    gap: segments.gap,
    get averages() {
      return averages;
    },
    densities() {
      return sums.map((sum, s) => oneSidedDensity(sum, window, averages, sampleRate, segments.scales[s]));
    },
  };
}
