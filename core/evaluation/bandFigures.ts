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
  const last = spectra.frequencies.length - 1;
  return Array.from({ length: bands }, (_, b) => {
    const start = (b * last) / bands;
    const end = ((b + 1) * last) / bands;
    let before = 0;
    let after = 0;
    // Half open, so that no bin counts twice; the last band takes the bin at half the sample rate too.
    for (let f = start; f < end + (b === bands - 1 ? 1 : 0); f++) {
      before += spectra.desired[f];
      after += spectra.error[f];
    }
    return {
      from: spectra.frequencies[start],
      to: spectra.frequencies[end],
      reductionDb: powerDecibels(before / after),
    };
  });
}
