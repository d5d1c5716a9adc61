import { powerDecibels } from '../figures/decibels';
import { bandEdges, bandSums } from './bandFigures';
import type { SpectraFigures } from './heldOutFigures';

/** How much of the error's power lies in one band of frequencies, in Hz. */
export interface ErrorShare {
  from: number;
  to: number;
  shareDb: number;
}

/** Over the bands of `bandFigures`; empty where no segment could be averaged. */
export function errorShares(spectra: SpectraFigures): ErrorShare[] {
  if (spectra.averages === 0) return [];
  const powers = bandSums(spectra.error);
  const total = powers.reduce((sum, power) => sum + power, 0);
  return bandEdges(spectra.frequencies).map((band, b) => ({
    ...band,
    shareDb: powerDecibels(powers[b] / total),
  }));
}
