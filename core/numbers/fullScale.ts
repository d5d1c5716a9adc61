import type { Levels } from '../recordings/levels';
import { powerOfTwo } from './words';

/** What is known of a signal's recordings over all takes. */
export interface SignalExtent {
  pcm: boolean;
  levels: Levels;
}

/**
 * The amplitude that stands for 2^(B-1) counts where the document names none: 1 for PCM; 2^(B-1) (one count is one)
 * for recordings of whole numbers that fit the word; otherwise the smallest power of two that no sample exceeds.
 */
export function defaultFullScale(extents: readonly SignalExtent[], bits: number): number {
  if (extents.every(({ pcm }) => pcm)) return 1;
  const half = powerOfTwo(bits - 1);
  const fits = ({ levels }: SignalExtent) => levels.whole && levels.min >= -half && levels.max <= half - 1;
  if (extents.every(fits)) return half;
  const largest = Math.max(
    ...extents.map(({ levels }) => Math.max(Math.abs(levels.min), Math.abs(levels.max))),
  );
  if (!(largest > 0)) return 1;
  let scale = 1;
  while (scale < largest) scale *= 2;
  while (scale / 2 >= largest) scale /= 2;
  return scale;
}
