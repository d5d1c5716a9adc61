import type { Pace } from '../../pace';
import { type Interval, totalLength } from '../../pair/intervals';
import type { Means } from '../../pair/signals';
import type { Take } from '../../pair/take';
import { type Block, gatherBlocks } from './blockSums';
import { windowsOver } from './windows';

export interface PoolOptions {
  /** Taps per input and delay. */
  shape: { length: number; delay: number };
  means: Means;
  /** Windows of all takes together, though four of each take at least. */
  windows: number;
  /** Samples of a window at most. */
  size: number;
}

/** Part of a stretch that windows are to cover: some of a broken-up one is lost at its ends. */
const covered = 0.8;

/**
 * Blocks of all takes, since they are fitted together: the first quarter of each take, then the second of each, and so
 * on, so that runs of them hold something of every take.
 * @param stretches sorted intervals of a take; takes with less than a filter length of them are left out
 */
export async function pooledBlocks(
  takes: readonly Take[],
  stretches: (take: Take) => readonly Interval[],
  { shape, means, windows, size }: PoolOptions,
  pace: Pace,
): Promise<Block[]> {
  const quarters: Block[][] = [[], [], [], []];
  const most = Math.max(4, Math.ceil(windows / takes.length));
  for (const take of takes) {
    const own = stretches(take);
    const length = Math.min(size, Math.floor((covered * totalLength(own)) / most));
    if (length < shape.length) continue;
    const blocks = await gatherBlocks(take, windowsOver(own, length, most), shape, means, pace);
    blocks.forEach((block, i) => {
      quarters[Math.floor((4 * i) / blocks.length)].push(block);
    });
  }
  return quarters.flat();
}
