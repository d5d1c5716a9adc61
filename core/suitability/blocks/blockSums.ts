import type { Pace } from '../../pace';
import { complement, type Interval, intersect } from '../../pair/intervals';
import type { Means } from '../../pair/signals';
import type { Take } from '../../pair/take';
import { gatherSums } from '../../statistics/gatherSums';
import { normalMatrix } from '../../statistics/normalMatrix';
import type { NormalSums } from '../../statistics/normalSums';

/** The sums of the normal equations over one window. */
export interface Block {
  window: Interval;
  sums: NormalSums;
  /** Φ of the window: row-major, lower triangle. */
  matrix: Float64Array;
}

/**
 * The sums of each window by itself, covariance windowing, with the samples before it as history as far as the take's
 * intervals allow them. Windows that lose more than half their samples to that are left out.
 * @param shape taps per input and delay, as for the fit
 */
export async function gatherBlocks(
  take: Take,
  windows: readonly Interval[],
  shape: { length: number; delay: number },
  means: Means,
  pace: Pace,
): Promise<Block[]> {
  const listed = [...take.fit, ...take.heldOut].sort((a, b) => a.from - b.from);
  const blocks: Block[] = [];
  for (const window of windows) {
    // What is listed stays listed, so that the same gaps are gaps.
    const others = intersect(listed, complement([window], listed[listed.length - 1].to));
    const part: Take = { ...take, fit: [window], heldOut: others };
    const sums = await gatherSums([part], { ...shape, windowing: 'covariance' }, means, pace);
    if (2 * sums.count >= window.to - window.from) blocks.push({ window, sums, matrix: normalMatrix(sums) });
  }
  return blocks;
}
