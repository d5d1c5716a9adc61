import type { PairingDocument } from '../../document/pairingDocument';
import type { Pace } from '../../pace';
import type { Means } from '../../pair/signals';
import type { Take } from '../../pair/take';
import { fitBlocks, leastRegularisation } from '../blocks/blockFit';
import type { Block } from '../blocks/blockSums';
import { type Comparison, compareErrors, proves } from '../blocks/compare';
import { crossErrors, halvesOf } from '../blocks/crossFit';
import { pooledBlocks } from '../blocks/pooledBlocks';

/** What the two-sided response has before the filter's first tap. */
export interface Acausality {
  /** Share of the response's energy that lies there, 0..1. */
  share: number;
  /** By how much the error falls on samples not fitted to, if all of it is caught. */
  comparison: Comparison;
  /** The smallest delay tried that leaves less than 1 dB of the gain behind, and its share of that energy, 0..1. */
  delay: number;
  caught: number;
}

/** A smaller gain than this, in dB, is what the choice of length and regularisation does as well. */
const leastGain = 1;

/** Unknowns of the two-sided response: it solves in milliseconds and holds 128 taps on either side. */
const mostUnknowns = 256;

const mostWindows = 24;
const largestWindow = 16384;

/** Parts of the reach before the first tap that are tried as more delay. */
const eighths = [1, 2, 3, 4, 6, 8];

/**
 * Compares the least-squares response from the document's first tap on with the two-sided one that begins up to one
 * filter length earlier. Both are fitted on half of the fit and judged on the other half, so that taps fitted to
 * noise bring nothing. Energies come from the product of the two halves' responses, in which noise cancels on average.
 * Null where nothing that matters lies there, or where the fit is too short to tell.
 */
export async function acausality(
  takes: readonly Take[],
  { filter }: Pick<PairingDocument, 'filter'>,
  means: Means,
  pace: Pace,
): Promise<Acausality | null> {
  const inputs = takes[0].inputs.length;
  const reach = reachBefore(filter.length, inputs);
  if (reach < 1) return null;
  const shape = { length: 2 * reach, delay: filter.delay + reach };
  const options = { shape, means, windows: mostWindows, size: largestWindow };
  const blocks = await pooledBlocks(takes, (take) => take.fit, options, pace);
  const regularisation = Math.max(filter.regularisation, leastRegularisation);
  const errors = (more: number) => crossErrors(blocks, regularisation, reach - more);
  const twoSided = errors(reach);
  const oneSided = errors(0);
  const comparison = twoSided && oneSided && compareErrors(twoSided, oneSided);
  if (twoSided === null || comparison === null || !proves(comparison, leastGain)) return null;

  const enough = (more: number) => {
    const some = errors(more);
    const missing = some && compareErrors(twoSided, some);
    return missing !== null && missing.gainDb < leastGain;
  };
  const more = [...new Set(eighths.map((part) => Math.ceil((part * reach) / 8)))].find(enough) ?? reach;
  const energy = energyOf(blocks, regularisation);
  const part = (of: number, whole: number) => Math.min(1, Math.max(0, of / whole));
  return {
    share: part(energy(0, reach), energy(0, 2 * reach)),
    comparison,
    delay: filter.delay + more,
    caught: part(energy(reach - more, reach), energy(0, reach)),
  };
}

/** Samples before the first tap that are looked at. */
export function reachBefore(length: number, inputs: number): number {
  return Math.min(length, Math.floor(mostUnknowns / (2 * inputs)));
}

/** Energy of taps `[from, to)` with white inputs of the inputs' powers, from two halves' responses. */
function energyOf(blocks: readonly Block[], regularisation: number): (from: number, to: number) => number {
  const [first, second] = halvesOf(blocks).map((half) => fitBlocks(half, regularisation) ?? []);
  return (from, to) => {
    let energy = 0;
    first.forEach((row, r) => {
      const power = blocks.reduce((sum, { sums }) => sum + sums.correlations[r][r][0] / sums.count, 0);
      for (let k = from; k < to; k++) energy += power * row[k] * second[r][k];
    });
    return energy;
  };
}
