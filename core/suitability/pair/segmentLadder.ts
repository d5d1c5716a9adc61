import { type Interval, totalLength } from '../../pair/intervals';
import { averagesPerInput } from './attainable';

/** Averages that keep the coherence of unrelated signals below a tenth; shorter segments are taken for their sake. */
export const wantedAverages = 32;

/** Bands of the evaluation are 16: shorter segments have less than two bins to a band. */
const shortest = 64;

/** In a recording of so many samples no response worth finding is shorter than such segments. */
const long = 262144;
const shortestOfLong = 256;

/** A response that does not fit is an echo of a second and more; a longer transform no longer fits the caches. */
const longest = 65536;

/**
 * Lengths of segments that double, up to the longest that leaves enough averages; at least one.
 * @param inputs K; each is seen through the slope of the window too
 */
export function segmentLadder(stretches: readonly Interval[], inputs: number): number[] {
  let segment = totalLength(stretches) < long ? shortest : shortestOfLong;
  const lengths = [segment];
  const least = averagesPerInput * (2 * inputs + 1);
  while (2 * segment <= longest && averagesOf(stretches, 2 * segment) >= least) {
    segment *= 2;
    lengths.push(segment);
  }
  return lengths;
}

/** Half-overlapped segments that the stretches hold. */
export function averagesOf(stretches: readonly Interval[], segment: number): number {
  return stretches.reduce(
    (sum, { from, to }) => sum + Math.max(0, Math.floor((2 * (to - from)) / segment) - 1),
    0,
  );
}
