import { hann } from '../spectra/hann';
import { oneSidedDensity } from '../spectra/oneSidedDensity';
import { newSegmentSpectra } from '../spectra/segmentSpectra';
import type { Spectrum } from '../statistics/blockSpectra';

/** Power spectral densities of a desired signal, of a filter's output and of their difference, by Welch's method. */
export interface ErrorSpectra {
  /** Brings the next samples of d[n-Δ] and y. */
  push(desired: Float64Array, output: Float64Array): void;
  /** The next samples do not follow on the last ones. */
  gap(): void;
  /** Segments averaged so far. */
  readonly averages: number;
  /** One-sided, segment/2 + 1 values in unit²/Hz; zeros where nothing was averaged. */
  densities(): Record<'desired' | 'output' | 'error', Float64Array>;
}

/**
 * The same window and overlap as `newWelch`. The spectrum of the error is the difference of the other two, which saves a
 * transform; it keeps to about 1e-15 of the larger one's amplitude, far below what the output itself is exact to.
 * @param segment samples of a segment, a power of two, 4 or more
 * @param sampleRate in Hz
 */
export function newErrorSpectra(segment: number, sampleRate: number): ErrorSpectra {
  const window = hann(segment);
  const channels = [
    { signal: 0, window },
    { signal: 1, window },
  ];
  const newSums = () => new Float64Array(segment / 2 + 1);
  const sums = { desired: newSums(), output: newSums(), error: newSums() };
  let averages = 0;
  const { scales, push, gap } = newSegmentSpectra(channels, segment, ([d, y]) => {
    const toDesired = scales[0] > 0 ? 1 / scales[0] : 0;
    const toOutput = scales[1] > 0 ? 1 / scales[1] : 0;
    addPowers(sums, d, y, toDesired, toOutput);
    averages++;
  });
  return {
    push: (desired, output) => push([desired, output]),
    gap,
    get averages() {
      return averages;
    },
    densities() {
      const density = (sum: Float64Array) => oneSidedDensity(sum, window, averages, sampleRate);
      return {
        desired: density(sums.desired),
        output: density(sums.output),
        error: density(sums.error),
      };
    },
  };
}

/** Powers of two spectra, times a factor each, and of their difference. */
function addPowers(
  sums: Record<'desired' | 'output' | 'error', Float64Array>,
  { re: dRe, im: dIm }: Spectrum,
  { re: yRe, im: yIm }: Spectrum,
  toDesired: number,
  toOutput: number,
): void {
  const { desired, output, error } = sums;
  for (let h = 0; h < error.length; h++) {
    const a = toDesired * dRe[h];
    const b = toDesired * dIm[h];
    const c = toOutput * yRe[h];
    const d = toOutput * yIm[h];
    desired[h] += a * a + b * b;
    output[h] += c * c + d * d;
    error[h] += (a - c) * (a - c) + (b - d) * (b - d);
  }
}
