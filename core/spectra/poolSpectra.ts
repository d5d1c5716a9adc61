import { newSpectrum, type Spectrum } from '../statistics/blockSpectra';
import { cosineOfTurns, sineOfTurns } from '../statistics/turns';
import type { CrossSpectra } from './crossSpectra';

/** Spectra of one stretch or take, and by how many samples its desired signal is to be delayed before pooling. */
export interface PooledPart {
  spectra: CrossSpectra;
  /** Whole samples; 0 leaves it as it is. */
  delay: number;
}

/**
 * The average over the segments of all parts together. A delay turns the phase of the products with the desired (last)
 * signal; it is exact but for what a segment loses at its ends, so that it must be short against the segment.
 * @param parts of equal signals, segment and sample rate, at least one
 */
export function poolSpectra(parts: readonly PooledPart[]): CrossSpectra {
  const [{ spectra: first }] = parts;
  if (parts.length === 1 && parts[0].delay === 0) return first;
  const { signals, segment, sampleRate } = first;
  const averages = parts.reduce((sum, { spectra }) => sum + spectra.averages, 0);
  const between = first.between.map((row, r) => row.map(({ re }, s) => newSpectrum(s < r ? 0 : re.length)));
  for (const { spectra, delay } of parts) {
    const weight = averages === 0 ? 0 : spectra.averages / averages;
    const turned = turns(segment, delay, weight);
    const still = turns(segment, 0, weight);
    for (let r = 0; r < signals; r++) {
      for (let s = r; s < signals; s++) {
        addTurned(between[r][s], spectra.between[r][s], s === signals - 1 && r < s ? turned : still);
      }
    }
  }
  const overlaps = parts.reduce((sum, { spectra }) => sum + spectra.overlaps, 0);
  return { signals, segment, sampleRate, averages, overlaps, between };
}

/** `weight · e^(-2πi f delay/segment)` for f = 0..segment/2. */
function turns(segment: number, delay: number, weight: number): Spectrum {
  const factors = newSpectrum(segment / 2 + 1);
  for (let f = 0; f <= segment / 2; f++) {
    factors.re[f] = delay === 0 ? weight : weight * cosineOfTurns((f * delay) / segment);
    factors.im[f] = delay === 0 ? 0 : -weight * sineOfTurns((f * delay) / segment);
  }
  return factors;
}

function addTurned(sum: Spectrum, part: Spectrum, factors: Spectrum): void {
  for (let f = 0; f < sum.re.length; f++) {
    sum.re[f] += factors.re[f] * part.re[f] - factors.im[f] * part.im[f];
    sum.im[f] += factors.re[f] * part.im[f] + factors.im[f] * part.re[f];
  }
}
