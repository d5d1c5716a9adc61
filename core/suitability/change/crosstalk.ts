import type { PairingDocument } from '../../document/pairingDocument';
import { powerDecibels } from '../../figures/decibels';
import type { Pace } from '../../pace';
import { complement, type Interval, intersect } from '../../pair/intervals';
import type { Means } from '../../pair/signals';
import type { Take } from '../../pair/take';
import { fitBlocks, leastRegularisation } from '../blocks/blockFit';
import type { Block } from '../blocks/blockSums';
import { type Comparison, compareErrors, proves } from '../blocks/compare';
import { crossErrors, jackknifedFit, surelyWrong } from '../blocks/crossFit';
import { pooledBlocks } from '../blocks/pooledBlocks';
import { mostTaps } from './response';

/** What tells whether the wanted signal reaches the reference. */
export interface Crosstalk {
  /**
   * Over stretches with the wanted signal: by how much a filter fitted with it present leaves less error than the one
   * fitted to the disturbance alone.
   */
  comparison: Comparison;
  /** Share of the error there that the inputs explain only because of the wanted signal, 0..1: its coherence. */
  coherence: number;
  /** Power of the inputs there over that while the disturbance is alone, in dB, of the input that rises most. */
  riseDb: number;
  /** True where the gain matters and is more than chance. */
  proved: boolean;
}

const mostWindows = 24;
const largestWindow = 8192;

/** Gain in dB from which wanted signal worth a word would be cancelled: at 0.5 dB, 11 % of its power. */
const leastGain = 0.5;

/**
 * While only the disturbance is there, the least-squares filter finds the path. With the wanted signal present it
 * finds the same one, unless the inputs hold some of that signal: then it takes some of it off, and leaves less error
 * on samples it was not fitted to. Takes are judged together, as they are fitted.
 * @returns null where the document names no stretch of either kind that is long enough
 */
export async function crosstalk(
  takes: readonly Take[],
  { filter }: Pick<PairingDocument, 'filter'>,
  means: Means,
  pace: Pace,
): Promise<Crosstalk | null> {
  const inputs = takes[0].inputs.length;
  const length = Math.max(1, Math.min(filter.length, Math.floor(mostTaps / inputs)));
  const shape = { length, delay: filter.delay };
  const gather = (stretches: (take: Take) => Interval[]) =>
    pooledBlocks(takes, stretches, { shape, means, windows: mostWindows, size: largestWindow }, pace);
  const alone = await gather(disturbanceAlone);
  const wanted = await gather((take) =>
    intersect(listed(take), complement(take.disturbanceOnly, Number.MAX_SAFE_INTEGER)),
  );
  const regularisation = Math.max(filter.regularisation, leastRegularisation);
  const path = jackknifedFit(inGroups(alone), (groups) => fitBlocks(groups.flat(), regularisation));
  const own = crossErrors(wanted, regularisation);
  if (path === null || own === null) return null;
  const ofPath = wanted.map((block) => surelyWrong(block, path));
  const comparison = compareErrors(own, ofPath);
  if (comparison === null) return null;
  const sum = (row: readonly number[]) => row.reduce((total, value) => total + value, 0);
  const rises = takes[0].inputs.map((_, r) => powerOf(wanted, r) / powerOf(alone, r));
  return {
    comparison,
    coherence: Math.max(0, 1 - sum(own) / sum(ofPath)),
    riseDb: powerDecibels(Math.max(...rises)),
    proved: proves(comparison, leastGain),
  };
}

/** Six groups of blocks that follow on each other, for the jackknife. */
function inGroups(blocks: readonly Block[]): Block[][] {
  const groups = Math.min(6, blocks.length);
  return Array.from({ length: groups }, (_, g) =>
    blocks.filter((_block, i) => Math.floor((i * groups) / blocks.length) === g),
  );
}

/** The fit and held-out intervals in which the disturbance is alone. */
export function disturbanceAlone(take: Take): Interval[] {
  return intersect(listed(take), take.disturbanceOnly);
}

function listed(take: Take): Interval[] {
  return [...take.fit, ...take.heldOut].sort((a, b) => a.from - b.from);
}

function powerOf(blocks: readonly Block[], input: number): number {
  let energy = 0;
  let count = 0;
  for (const { sums } of blocks) {
    energy += sums.correlations[input][input][0];
    count += sums.count;
  }
  return energy / count;
}
