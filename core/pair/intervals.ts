/** `[from, to)` in whole samples. */
export interface Interval {
  from: number;
  to: number;
}

/**
 * A moment in whole samples: the nearest one.
 * @param scale samples in the unit of the moment: the rate for seconds, 1 for samples
 */
export function wholeSample(moment: number, scale: number): number {
  return Math.floor(moment * scale + 0.5);
}

/** Samples in a list of intervals that do not overlap. */
export function totalLength(intervals: readonly Interval[]): number {
  return intervals.reduce((sum, { from, to }) => sum + (to - from), 0);
}

/** The parts that both lists have, in rising order. Each list must be sorted and free of overlaps. */
export function intersect(left: readonly Interval[], right: readonly Interval[]): Interval[] {
  const common: Interval[] = [];
  for (const a of left) {
    for (const b of right) {
      const from = Math.max(a.from, b.from);
      const to = Math.min(a.to, b.to);
      if (to > from) common.push({ from, to });
    }
  }
  return common.sort((a, b) => a.from - b.from);
}

/** What `[0, samples)` has outside the sorted intervals. */
export function complement(intervals: readonly Interval[], samples: number): Interval[] {
  const rest: Interval[] = [];
  let from = 0;
  for (const interval of intervals) {
    if (interval.from > from) rest.push({ from, to: Math.min(interval.from, samples) });
    from = Math.max(from, interval.to);
  }
  if (from < samples) rest.push({ from, to: samples });
  return rest;
}

/** The first two that overlap, in a sorted list; null where none do. */
export function firstOverlap(sorted: readonly Interval[]): [Interval, Interval] | null {
  for (let i = 1; i < sorted.length; i++) {
    if (sorted[i].from < sorted[i - 1].to) return [sorted[i - 1], sorted[i]];
  }
  return null;
}
