import { naturalFrequency } from './segmentSpectra';

/**
 * One-sided density in unit²/Hz, in the natural order of frequencies, of `Σ |X|²` over segments.
 * @param sum segment/2 + 1 values in the order of `newSegmentSpectra`
 * @param window of the segments
 * @param averages number of segments; the density is 0 where there are none
 * @param sampleRate in Hz
 * @param scale by which the spectra are larger than those of the signal; the density is 0 where it is 0
 */
export function oneSidedDensity(
  sum: Float64Array,
  window: Float64Array,
  averages: number,
  sampleRate: number,
  scale = 1,
): Float64Array {
  const half = sum.length - 1;
  const density = new Float64Array(half + 1);
  if (averages === 0 || !(scale > 0)) return density;
  const energy = window.reduce((total, value) => total + value * value, 0);
  const unit = 1 / (averages * sampleRate * energy);
  for (let h = 0; h <= half; h++) {
    const f = naturalFrequency(h, half);
    density[f] = (sum[h] * unit * (f === 0 || f === half ? 1 : 2)) / (scale * scale);
  }
  return density;
}
