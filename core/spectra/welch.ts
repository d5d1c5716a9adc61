import { hann } from './hann';
import { naturalFrequency, newSegmentSpectra } from './segmentSpectra';

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
  const half = segment / 2;
  const sums = Array.from({ length: count }, () => new Float64Array(half + 1));
  let averages = 0;
  const window = hann(segment);
  const channels = sums.map((_, signal) => ({ signal, window }));
  const segments = newSegmentSpectra(channels, segment, (spectra) => {
    spectra.forEach(({ re, im }, s) => {
      const sum = sums[s];
      for (let h = 0; h <= half; h++) sum[h] += re[h] * re[h] + im[h] * im[h];
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
      const energy = window.reduce((sum, value) => sum + value * value, 0);
      const unit = averages === 0 ? 0 : 1 / (averages * sampleRate * energy);
      return sums.map((sum, s) => {
        const density = new Float64Array(half + 1);
        const scale = segments.scales[s];
        for (let h = 0; h <= half && scale > 0; h++) {
          const f = naturalFrequency(h, half);
          density[f] = (sum[h] * unit * (f === 0 || f === half ? 1 : 2)) / (scale * scale);
        }
        return density;
      });
    },
  };
}
