import type { Pace } from '../pace';
import type { BandFilter } from '../pair/bandFilter';
import type { Interval } from '../pair/intervals';
import type { Moments } from '../pair/moments';
import type { SignalReader } from '../pair/signals';
import type { Take } from '../pair/take';
import { bandFloor } from '../statistics/bandFloor';
import { addSums, emptySums, type NormalSums } from '../statistics/normalSums';
import { sumStretch } from '../statistics/sumStretch';
import type { Folds, Part } from './folds';
import { jointReader } from './jointReader';

/** What the sums below hold: the inputs and, as one more input, the desired signal at the smallest delay. */
export interface Layout {
  /** K, the desired signal not counted. */
  inputs: number;
  /** M of the longest candidate. */
  length: number;
  /** Δ of all candidates, rising. */
  delays: readonly number[];
}

/**
 * Sums over some n of the signals made free of units (means taken off, divided by the root of their power over the fit
 * intervals). The desired signal d[n - Δ₀], Δ₀ the smallest delay, is the last input: its past is the desired signal of
 * the larger delays, so that the shift updates of the inputs give θ for every delay.
 */
export type JointSums = NormalSums;

/**
 * Statistics of everything that is fitted on or left out. Weighted to a band those of the training samples hold the floor
 * (see {@link bandFloor}), those of the left-out blocks do not: it is no part of the error.
 */
export interface Statistics {
  all: JointSums;
  /** What `all` holds of the floor; null where the error is not weighted to a band. */
  floor: JointSums | null;
  folds: { training: JointSums; blocks: JointSums[] }[];
}

/** What is summed together, of {@link Folds}. */
export type Cuts = Pick<Folds, 'all' | 'folds'>;

/** Samples of history that the sums hold, and one more. */
function reachOf({ length, delays }: Layout): number {
  return Math.max(length, delays[delays.length - 1] - delays[0] + 1);
}

/**
 * One pass over the n: they are cut wherever a block or a gap begins or ends, each piece is summed once, and sums of
 * pieces add. So nothing is subtracted, and no digit is lost where the level changes from block to block.
 * @param band that the error is weighted to; null where all frequencies count alike
 */
export async function gatherStatistics(
  takes: readonly Take[],
  folds: Cuts,
  layout: Layout,
  moments: Moments,
  pace: Pace,
  band: BandFilter | null = null,
): Promise<Statistics> {
  const collect = (parts: readonly Part[]) =>
    newCollector(parts, emptySums(layout.inputs + 1, reachOf(layout)));
  const trainings = [folds.all, ...folds.folds.map(({ training }) => training)];
  const fitted = trainings.map(collect);
  const floors = band === null ? [] : trainings.map(collect);
  const blocks = folds.folds.map((fold) => fold.blocks.map((block) => collect([block])));
  for (const part of folds.all) {
    const raw = jointReader(takes[part.take], layout, moments, null);
    const weighted = band === null ? raw : jointReader(takes[part.take], layout, moments, band);
    for (const piece of piecesOf(part, folds)) {
      const sum = (read: SignalReader) =>
        sumStretch(read, piece, layout.inputs + 1, reachOf(layout), true, pace);
      const sums = await sum(weighted);
      sums.count = piece.to - piece.from;
      for (const collector of [...fitted, ...blocks.flat()]) collector.offer(part.take, piece, sums);
      if (floors.length === 0) continue;
      const floor = inputFloor(await sum(raw));
      for (const collector of floors) collector.offer(part.take, piece, floor);
    }
  }
  floors.forEach(({ sums }, f) => {
    addSums(fitted[f].sums, sums);
  });
  const [all, ...rest] = fitted.map(({ sums }) => sums);
  return {
    all,
    floor: floors[0]?.sums ?? null,
    folds: rest.map((training, f) => ({ training, blocks: blocks[f].map(({ sums }) => sums) })),
  };
}

/** The floor under the normal matrix of the inputs: nothing of the desired signal, which is the last input. */
function inputFloor(raw: JointSums): JointSums {
  const floor = bandFloor(raw);
  const last = raw.inputs - 1;
  for (const row of floor.correlations) row[last].fill(0);
  for (const column of floor.correlations[last]) column.fill(0);
  for (const { before, after } of floor.edges) {
    before[last].fill(0);
    after[last].fill(0);
  }
  return floor;
}

/** Runs of n between neighbouring cuts. */
function piecesOf({ take, intervals }: Part, { folds }: Cuts): Interval[] {
  const cuts = folds
    .flatMap(({ training, blocks }) => [...training, ...blocks])
    .filter((part) => part.take === take)
    .flatMap((part) => part.intervals.flatMap(({ from, to }) => [from, to]));
  const sorted = [...new Set(cuts)].sort((a, b) => a - b);
  return intervals.flatMap(({ from, to }) => {
    const inside = [from, ...sorted.filter((cut) => cut > from && cut < to), to];
    return inside.slice(1).map((end, i) => ({ from: inside[i], to: end }));
  });
}

/** Adds up the pieces that lie in its parts. Where one begins at the end of the last, their common edge falls away. */
function newCollector(parts: readonly Part[], sums: JointSums) {
  let end = { take: -1, at: -1 };
  return {
    sums,
    offer(take: number, piece: Interval, more: JointSums): void {
      const holds = parts.some(
        (part) =>
          part.take === take && part.intervals.some(({ from, to }) => from <= piece.from && piece.to <= to),
      );
      if (!holds) return;
      const joins = end.take === take && end.at === piece.from;
      const last = joins ? sums.edges.pop() : undefined;
      addSums(sums, more);
      const own = sums.edges.pop();
      if (own !== undefined) sums.edges.push(last === undefined ? own : { ...own, before: last.before });
      end = { take, at: piece.to };
    },
  };
}
