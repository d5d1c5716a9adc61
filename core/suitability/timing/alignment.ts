import type { Pace } from '../../pace';
import { type Means, signalReader } from '../../pair/signals';
import type { Take } from '../../pair/take';
import { powerOfTwo, windowsOver } from '../blocks/windows';
import { type CoarsePeak, coarseLag, coarseThreshold } from './coarseLag';

/** Whole samples by which the desired signal follows the input, along a straight line over the recording. */
export interface Alignment {
  lag: number;
  /** Samples a sample; 0 for one clock. */
  slope: number;
  /** Sample at which the lag holds. */
  at: number;
}

/** Recorders within this of each other: ten times what a cheap crystal is off by. */
export const largestSlope = 0.001;

/** A rival of this share of the peak can have been the peak: an echo of 0.9 of the direct path makes 0.75. */
const closestRival = 0.8;

/** Samples of the input in a coarse window; the desired signal is searched 1.5 times as far on either side. */
const widest = 65536;

/**
 * Where to look for the lag: by the strongest of three windows where one clock took both signals, by the median slope
 * through five (Theil & Sen) where there are two clocks. Zero where no window shows a lag: a weak relation may still
 * show over the whole fit. Null where each lag has a rival, as a repeating input gives.
 * @param take with one input
 */
export async function align(
  take: Take,
  means: Means,
  twoClocks: boolean,
  pace: Pace,
): Promise<Alignment | null> {
  const longest = Math.max(...take.fit.map(({ from, to }) => to - from));
  const width = powerOfTwo(longest / (twoClocks ? 8 : 2), 64, widest);
  const peaks: CoarsePeak[] = [];
  for (const window of windowsOver(take.fit, width, twoClocks ? 5 : 3)) {
    const bounds = take.fit.find(({ from, to }) => from <= window.from && window.to <= to)!;
    const read = signalReader(take, { means, delay: 0, support: bounds });
    const peak = await coarseLag(read, window, bounds);
    if (peak.height > coarseThreshold) peaks.push(peak);
    await pace.step('timing', 1, 1);
  }
  if (peaks.length === 0) return { lag: 0, slope: 0, at: 0 };
  const clear = peaks.filter(({ rival }) => rival < closestRival);
  if (clear.length === 0) return null;
  const strongest = clear.reduce((a, b) => (b.height > a.height ? b : a));
  const constant = { lag: strongest.lag, slope: 0, at: strongest.at };
  return twoClocks && clear.length > 2 ? (medianLine(clear) ?? constant) : constant;
}

/** Whole samples to take off at a sample. */
export function offsetAt({ lag, slope, at }: Alignment, sample: number): number {
  return Math.floor(lag + slope * (sample - at) + 0.5);
}

function medianLine(peaks: readonly CoarsePeak[]): Alignment | null {
  const slopes: number[] = [];
  for (const a of peaks) {
    for (const b of peaks) {
      const slope = (b.lag - a.lag) / (b.at - a.at);
      if (b.at > a.at && Math.abs(slope) < largestSlope) slopes.push(slope);
    }
  }
  if (slopes.length === 0) return null;
  const slope = median(slopes);
  return { lag: median(peaks.map((peak) => peak.lag - slope * peak.at)), slope, at: 0 };
}

export function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  const middle = Math.floor(sorted.length / 2);
  return sorted.length % 2 === 1 ? sorted[middle] : 0.5 * (sorted[middle - 1] + sorted[middle]);
}
