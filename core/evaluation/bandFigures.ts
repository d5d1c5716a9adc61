import { powerDecibels } from '../figures/decibels';
import type { SpectraFigures } from './heldOutFigures';

/** Reduction in one band of frequencies, in Hz. */
export interface BandFigure {
  from: number;
  to: number;
  reductionDb: number;
}

const bands = 16;

/**
 * Reduction of the desired signal's power to that of the error in 16 equal bands from 0 Hz to half the sample rate;
 * empty where no segment could be averaged.
 */
export function bandFigures(spectra: SpectraFigures): BandFigure[] {
  if (spectra.averages === 0) return [];
  const before = bandSums(spectra.desired);
  const after = bandSums(spectra.error);
  return bandEdges(spectra.frequencies).map(({ from, to }, b) => ({
    from,
    to,
    reductionDb: powerDecibels(before[b] / after[b]),
  }));
}

/** The same bands by their edges. @param frequencies of a spectrum: a multiple of 16 and one more */
export function bandEdges(frequencies: Float64Array): { from: number; to: number }[] {
  const width = (frequencies.length - 1) / bands;
  return Array.from({ length: bands }, (_, b) => ({
    from: frequencies[b * width],
    to: frequencies[(b + 1) * width],
  }));
}

/** Sums of a spectrum's values over the same bands. */
export function bandSums(values: Float64Array): number[] {
  const width = (values.length - 1) / bands;
  return Array.from({ length: bands }, (_, b) => {
    let sum = 0;
    // Half open, so that no bin counts twice; the last band takes the bin at half the sample rate too.
    for (let f = b * width; f < (b + 1) * width + (b === bands - 1 ? 1 : 0); f++) sum += values[f];
    return sum;
  });
}
