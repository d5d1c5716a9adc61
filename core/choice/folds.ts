import { type Interval, intersect, totalLength } from '../pair/intervals';
import type { Take } from '../pair/take';
import { usedSegments } from '../pair/usedSegments';

/** Stretches of n of one take, sorted. */
export interface Part {
  /** Number of the take, from 0. */
  take: number;
  intervals: Interval[];
}

/** One fit on the rest, and the left-out blocks that its error is taken over. */
export interface Fold {
  training: Part[];
  blocks: Part[];
}

/** How the fit intervals are cut. Every n may be used by every candidate, so that all are compared on the same samples. */
export interface Folds {
  /** All n that may be used, by take; takes with none are left out. */
  all: Part[];
  folds: Fold[];
  /** Samples left unused on both sides of a left-out block. */
  gap: number;
  /** `takes`: each take is left out in turn; `blocks`: each block. */
  by: 'takes' | 'blocks';
  /** Left-out blocks in all. */
  blocks: number;
  /** Number of n left out in turn, and the smallest number of n that a fit is left with. */
  samples: number;
  leastTraining: number;
}

export interface FoldOptions {
  /** M of the longest candidate. */
  length: number;
  /** Δ of all candidates. */
  delays: readonly number[];
  /** Samples that a band filter looks back on. */
  history?: number;
  /** Where the error is to be taken; null for all of the fit intervals. */
  measured: ((take: Take) => readonly Interval[]) | null;
}

/**
 * Ten blocks (common practice: more cost more and tell little more); fewer where a block would be shorter than two
 * gaps, since the fits on the rest would lose too much.
 */
const wantedBlocks = 10;

/** With one block nothing is left to fit on. */
const fewestBlocks = 2;

/**
 * Contiguous blocks with a gap of M + max |Δ| around (and what a band filter looks back on); with several takes each is left out in turn, cut into blocks for
 * the sake of the standard error alone (two or three differences tell nothing of their spread).
 */
export function cutFolds(takes: readonly Take[], options: FoldOptions): Folds {
  const { length, delays, measured, history = 0 } = options;
  const all: Part[] = takes
    .map((take, t) => ({ take: t, intervals: commonSegments(take, length, delays, history) }))
    .filter(({ intervals }) => intervals.length > 0);
  const bounded = all
    .map(({ take, intervals }) => ({
      take,
      intervals: measured === null ? intervals : intersect(intervals, measured(takes[take])),
    }))
    .filter(({ intervals }) => intervals.length > 0);
  const gap = length + Math.max(...delays.map(Math.abs)) + history;
  const samples = bounded.reduce((sum, part) => sum + totalLength(part.intervals), 0);
  const byTakes = all.length > 1;
  const folds = bounded.flatMap((part): Fold[] => {
    const own = totalLength(part.intervals);
    if (byTakes) {
      const blocks = Math.max(fewestBlocks, Math.round((wantedBlocks * own) / samples));
      return [{ training: all.filter(({ take }) => take !== part.take), blocks: cut(part, own, blocks) }];
    }
    const most = Math.floor(own / (2 * gap));
    const blocks = cut(part, own, Math.max(fewestBlocks, Math.min(wantedBlocks, most)));
    return blocks.map((block) => ({ training: [without(all[0], block, gap)], blocks: [block] }));
  });
  return {
    all,
    folds,
    gap,
    by: byTakes ? 'takes' : 'blocks',
    blocks: folds.reduce((sum, fold) => sum + fold.blocks.length, 0),
    samples,
    leastTraining: Math.min(...folds.map(({ training }) => samplesOf(training))),
  };
}

/** The n of the fit intervals that every candidate may use: for the longest filter and for each delay. */
export function commonSegments(
  take: Take,
  length: number,
  delays: readonly number[],
  history: number,
): Interval[] {
  return delays
    .map((delay) => usedSegments(take, take.fit, length, delay, history))
    .reduce((common, segments) => intersect(common, segments));
}

export function samplesOf(parts: readonly Part[]): number {
  return parts.reduce((sum, { intervals }) => sum + totalLength(intervals), 0);
}

/** Equal parts of the n, end to end; one that runs over a gap between intervals has two stretches. */
function cut({ take, intervals }: Part, samples: number, count: number): Part[] {
  return Array.from({ length: count }, (_, b) => {
    const from = Math.floor((b * samples) / count);
    const to = Math.floor(((b + 1) * samples) / count);
    let before = 0;
    const stretches = intervals.flatMap((interval) => {
      const shift = interval.from - before;
      before += interval.to - interval.from;
      return intersect([interval], [{ from: from + shift, to: to + shift }]);
    });
    return { take, intervals: stretches };
  }).filter((part) => part.intervals.length > 0);
}

/** What is left where a block and a gap on both sides of each of its stretches are taken away. */
function without({ take, intervals }: Part, block: Part, gap: number): Part {
  let rest = intervals;
  for (const { from, to } of block.intervals) {
    rest = rest.flatMap((interval) =>
      [
        { from: interval.from, to: Math.min(interval.to, from - gap) },
        { from: Math.max(interval.from, to + gap), to: interval.to },
      ].filter((left) => left.to > left.from),
    );
  }
  return { take, intervals: rest };
}
