import type { Pace } from '../../pace';
import { type Interval, intersect, totalLength } from '../../pair/intervals';
import { type Means, signalReader } from '../../pair/signals';
import type { Take } from '../../pair/take';
import { usedSegments } from '../../pair/usedSegments';
import type { CrossSpectra, CrossSpectraGatherer } from '../../spectra/crossSpectra';

/** A take whose desired signal comes `lag` whole samples after the inputs, and the stretches of n that count. */
export interface AlignedTake {
  take: Take;
  lag: number;
  /** Sorted. */
  stretches: Interval[];
}

/** The n of some intervals of a take at which the inputs and the aligned desired sample exist and may be used. */
export function alignTake(take: Take, lag: number, intervals: readonly Interval[]): AlignedTake {
  return { take, lag, stretches: usedSegments(take, intervals, 1, -lag) };
}

const block = 65536;

/**
 * Cross-spectra of a take for several lengths of segment in one pass over its stretches.
 * @param gatherers one for each length
 */
export async function gatherSpectra(
  { take, lag, stretches }: AlignedTake,
  means: Means,
  gatherers: readonly CrossSpectraGatherer[],
  pace: Pace,
): Promise<CrossSpectra[]> {
  const read = signalReader(take, { means, delay: -lag, reuse: true });
  const total = totalLength(stretches);
  let done = 0;
  for (const { from, to } of stretches) {
    for (const gatherer of gatherers) gatherer.gap();
    for (let start = from; start < to; start += block) {
      const end = Math.min(to, start + block);
      const { inputs, desired } = await read(start, end);
      for (const gatherer of gatherers) gatherer.push([...inputs, desired]);
      done += end - start;
      await pace.step('spectra', done, total);
    }
  }
  return gatherers.map((gatherer) => gatherer.spectra());
}

/** Parts over which a sample of a long recording is spread. */
const parts = 8;

/**
 * A sample of the stretches: all of them where they hold no more than `budget` samples, otherwise as many samples in
 * equal parts spread evenly over them.
 */
export function spreadOver(stretches: readonly Interval[], budget: number): Interval[] {
  const total = totalLength(stretches);
  if (total <= budget) return [...stretches];
  const size = Math.floor(budget / parts);
  const chosen = Array.from({ length: parts }, (_, i) => {
    const from = Math.floor((i * (total - size)) / (parts - 1));
    return { from, to: from + size };
  });
  // Chosen in samples counted over the stretches end to end; each stretch takes what falls into it.
  let before = 0;
  return stretches.flatMap((stretch) => {
    const shift = stretch.from - before;
    const own = chosen.map(({ from, to }) => ({ from: from + shift, to: to + shift }));
    before += stretch.to - stretch.from;
    return intersect(own, [stretch]);
  });
}
