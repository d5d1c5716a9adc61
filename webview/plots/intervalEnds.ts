import type { Interval } from '../../core/pair/intervals';
import type { Kind } from './data';

/** One end of one interval. */
export interface End {
  kind: Kind;
  /** Among the intervals of its kind, from 0. */
  number: number;
  end: 'from' | 'to';
}

export type Intervals = Record<Kind, Interval[]>;

export const kinds: Kind[] = ['fit', 'heldOut', 'disturbanceOnly'];

/** All ends, in the order in which the Tab key reaches them. */
export function endsOf(intervals: Intervals): End[] {
  return kinds.flatMap((kind) =>
    intervals[kind].flatMap((_interval, number) => [
      { kind, number, end: 'from' as const },
      { kind, number, end: 'to' as const },
    ]),
  );
}

/**
 * Samples between which an end may lie: inside the take, one sample left in the interval, and not over another interval
 * of the same kind.
 */
export function endLimits(
  intervals: Intervals,
  { kind, number, end }: End,
  samples: number,
): { min: number; max: number } {
  const own = intervals[kind][number];
  const others = intervals[kind].filter((_interval, i) => i !== number);
  if (end === 'from') {
    const before = others.filter(({ to }) => to <= own.from).map(({ to }) => to);
    return { min: Math.max(0, ...before), max: own.to - 1 };
  }
  const after = others.filter(({ from }) => from >= own.to).map(({ from }) => from);
  return { min: own.from + 1, max: Math.min(samples, ...after) };
}

/** The interval with an end moved to a whole sample, as far as it may go. */
export function withEnd(intervals: Intervals, end: End, sample: number, samples: number): Interval {
  const { min, max } = endLimits(intervals, end, samples);
  return { ...intervals[end.kind][end.number], [end.end]: Math.min(max, Math.max(min, Math.round(sample))) };
}

/** Where a key brings an end that is at `sample`; null where the key is none of ours. A pixel's worth, at least one sample. */
export function endAfterKey(
  sample: number,
  key: string,
  fast: boolean,
  samplesPerPixel: number,
  limits: { min: number; max: number },
): number | null {
  const step = Math.max(1, Math.round(samplesPerPixel)) * (fast ? 10 : 1);
  if (key === 'ArrowLeft' || key === 'ArrowDown') return Math.max(limits.min, sample - step);
  if (key === 'ArrowRight' || key === 'ArrowUp') return Math.min(limits.max, sample + step);
  if (key === 'Home') return limits.min;
  if (key === 'End') return limits.max;
  return null;
}

/** The intervals with one of them replaced. */
export function replaced(intervals: Intervals, kind: Kind, number: number, interval: Interval): Intervals {
  return { ...intervals, [kind]: intervals[kind].map((own, i) => (i === number ? interval : own)) };
}
