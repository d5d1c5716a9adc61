import type { Interval } from '../../pair/intervals';

/**
 * At most `most` windows of `size` samples, none overlapping another, spread evenly over the intervals. Bounds the
 * work on a long recording, of which tens of windows tell as much about timing and change as all of it.
 * @param intervals sorted and free of overlaps; those shorter than a window are left out
 * @returns in rising order
 */
export function windowsOver(intervals: readonly Interval[], size: number, most: number): Interval[] {
  const slots = intervals.map(({ from, to }) => Math.floor((to - from) / size));
  const total = slots.reduce((sum, count) => sum + count, 0);
  const count = Math.min(most, total);
  const windows: Interval[] = [];
  let before = 0;
  intervals.forEach(({ from, to }, i) => {
    // Whole windows leave a remainder: half of it stands before the first, so that the middle is the middle.
    const stride = slots[i] === 0 ? 0 : (to - from) / slots[i];
    for (let w = 0; w < count; w++) {
      const slot = Math.floor(((w + 0.5) * total) / count) - before;
      if (slot < 0 || slot >= slots[i]) continue;
      const start = from + Math.floor(slot * stride + (stride - size) / 2);
      windows.push({ from: start, to: start + size });
    }
    before += slots[i];
  });
  return windows;
}

/** The middle of an interval, in samples. */
export function middleOf({ from, to }: Interval): number {
  return (from + to) / 2;
}

/** The largest power of two that does not exceed a value, held between two powers of two. */
export function powerOfTwo(value: number, least: number, most: number): number {
  let power = least;
  while (power < most && 2 * power <= value) power *= 2;
  return power;
}
