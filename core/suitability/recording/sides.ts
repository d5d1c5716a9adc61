import type { LongRun } from './flatRuns';

// What is beside a run of equal samples: NaN makes a side neither far nor still.

/** A value that nothing beside it comes near, by this part of the neighbours' range, is no limit that the signal runs into. */
const farOff = 0.4;

/** Whether a run's value is far from all samples beside it. */
export function isFarOff({ value, before, after }: LongRun): boolean {
  let least = Number.POSITIVE_INFINITY;
  let most = Number.NEGATIVE_INFINITY;
  for (const side of [before, after]) {
    for (const sample of side) {
      least = Math.min(least, sample);
      most = Math.max(most, sample);
    }
  }
  return Math.max(least - value, value - most) > farOff * (most - least);
}

/** Whether at most this part of the steps are none. */
export function isMoving(side: Float64Array, part: number): boolean {
  let left = part * (side.length - 1);
  for (let k = 1; k < side.length && left >= 0; k++) if (side[k] === side[k - 1]) left--;
  return left >= 0;
}

/** How many steps turn back, and the largest. */
export function courseOf(side: Float64Array): { turns: number; largest: number } {
  let turns = 0;
  let largest = 0;
  let last = 0;
  for (let k = 1; k < side.length; k++) {
    const step = side[k] - side[k - 1];
    if (step * last < 0) turns++;
    if (step !== 0) last = step;
    largest = Math.max(largest, Math.abs(step));
  }
  return { turns, largest };
}

/** Mean square. */
export function powerOf(side: Float64Array): number {
  return side.reduce((sum, value) => sum + value * value, 0) / side.length;
}
