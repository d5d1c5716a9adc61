import { gatherStatistics, type Layout, type Statistics } from '../choice/blockSums';
import type { Part } from '../choice/folds';
import { type Energies, errorsOfOne } from '../choice/oneFit';
import { heldOutIntervals } from '../evaluation/measuredRuns';
import { powerDecibels } from '../figures/decibels';
import { type Interval, intersect } from '../pair/intervals';
import type { Take } from '../pair/take';
import { usedSegments } from '../pair/usedSegments';
import { sizeFor } from '../statistics/transform';
import { bandOf } from './askedBand';
import type { Work } from './host';
import { momentsOf } from './momentsOf';
import type { Pairing } from './pairing';
import { measuredKey, momentsKey } from './stageKeys';

/**
 * Sums of the fit and of the held-out data for every length and delay around the present ones, so that the figures of a
 * changed filter need no further look at the samples. All n that count can be used by the longest filter and at every
 * delay, so that the figures differ from the exact ones by what a few samples at the ends make.
 */
export interface QuickStatistics {
  key: string;
  layout: Layout;
  statistics: Statistics;
  /** Blocks of the held-out data; those of the fit follow them. */
  heldOut: number;
}

export interface QuickFigures {
  fitDb: number;
  fitSamples: number;
  heldOutDb: number;
  heldOutSamples: number;
}

/** Unknowns of the longest filter at most: the figures are there in a moment then. */
const mostUnknowns = 1024;

/** The lengths are those up to the next power of two above twice the present one. */
const leastLength = 64;

/** Delays begin and end at multiples of this, so that a change of a few samples stays among them. */
const delayStep = 32;

/** Null where the document asks for what these sums do not know. */
function layoutFor(pairing: Pairing): (Layout & { history: number }) | null {
  const { document, takes } = pairing;
  const { length, delay, windowing, symmetry, fixedGain } = document.filter;
  if (windowing !== 'covariance' || symmetry !== 'none' || fixedGain !== null) return null;
  const inputs = takes[0].inputs.length;
  let longest = sizeFor(2 * length, leastLength);
  while (longest * inputs > mostUnknowns && longest >= 2 * length) longest /= 2;
  if (longest < length || longest * inputs > mostUnknowns) return null;
  const first = delayStep * Math.floor(delay / delayStep) - delayStep / 2;
  const delays = Array.from({ length: 2 * delayStep }, (_, i) => first + i);
  return { inputs, length: longest, delays, history: bandOf(pairing)?.history ?? 0 };
}

function keyOf(pairing: Pairing, layout: Layout): string {
  const { job, prepare } = pairing.document;
  const { length, delays } = layout;
  return JSON.stringify([momentsKey(pairing), job, prepare, measuredKey(pairing), length, delays[0]]);
}

/**
 * One pass over the fit and the held-out data.
 * @param kept given back where it still holds
 * @returns null where the document asks for more than these sums know, or nothing is held out
 * @throws Refusal as {@link momentsOf}
 */
export async function prepareQuick(
  pairing: Pairing,
  kept: QuickStatistics | null,
  work: Work,
): Promise<QuickStatistics | null> {
  const layout = layoutFor(pairing);
  if (layout === null) return null;
  const key = keyOf(pairing, layout);
  if (kept?.key === key) return kept;
  const moments = await momentsOf(pairing, work);
  const { takes, document } = pairing;
  const parts = (wanted: (take: Take) => readonly Interval[]): Part[] =>
    takes
      .map((take, t) => ({ take: t, intervals: commonParts(take, wanted(take), layout) }))
      .filter(({ intervals }) => intervals.length > 0);
  const training = parts((take) => take.fit);
  const heldOut = parts(heldOutIntervals(takes, document.job));
  if (training.length === 0 || heldOut.length === 0) return null;
  const folds = {
    all: [...training, ...heldOut],
    folds: [{ training, blocks: [...heldOut, ...training] }],
  };
  const statistics = await gatherStatistics(takes, folds, layout, moments, work.pace, bandOf(pairing));
  return { key, layout, statistics, heldOut: heldOut.length };
}

/** The figures of the present filter; null where the statistics are of something else or the fit cannot be solved. */
export function quickFigures(pairing: Pairing, kept: QuickStatistics | null): QuickFigures | null {
  const layout = layoutFor(pairing);
  if (layout === null || kept === null || !sameBut(pairing, layout, kept)) return null;
  const { folds } = kept.statistics;
  const [{ training, blocks }] = folds;
  const energies = errorsOfOne(training, blocks, kept.layout, pairing.document.filter);
  if (energies === null) return null;
  return {
    fitDb: ratio(energies.slice(kept.heldOut)),
    fitSamples: countOf(blocks.slice(kept.heldOut)),
    heldOutDb: ratio(energies.slice(0, kept.heldOut)),
    heldOutSamples: countOf(blocks.slice(0, kept.heldOut)),
  };
}

/** Whether the statistics hold the present length and delay of the same signals and intervals. */
function sameBut(pairing: Pairing, layout: Layout, kept: QuickStatistics): boolean {
  const { length, delay } = pairing.document.filter;
  const { delays } = kept.layout;
  const inside = length <= kept.layout.length && delay >= delays[0] && delay <= delays[delays.length - 1];
  return inside && keyOf(pairing, { ...layout, length: kept.layout.length, delays }) === kept.key;
}

/** The n at which the longest filter has its history and every delay its desired sample. */
function commonParts(
  take: Take,
  intervals: readonly Interval[],
  { length, delays, history }: Layout & { history: number },
): Interval[] {
  const used = (delay: number) => usedSegments(take, intervals, length, delay, history);
  return intersect(used(delays[0]), used(delays[delays.length - 1]));
}

function countOf(sums: readonly { count: number }[]): number {
  return sums.reduce((total, { count }) => total + count, 0);
}

function ratio(energies: readonly Energies[]): number {
  const error = energies.reduce((sum, of) => sum + of.error, 0);
  return powerDecibels(error / energies.reduce((sum, of) => sum + of.desired, 0));
}
