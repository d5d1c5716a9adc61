import { complement, type Interval } from '../core/pair/intervals';
import type { TakeView } from '../core/protocol/views';
import type { IntervalKind } from './intervalEdits';

/** The longest stretch of a take in which another interval of this kind would overlap none; null where none is free. */
export function freeStretch(take: TakeView, kind: IntervalKind): Interval | null {
  const taken = kind === 'disturbanceOnly' ? take.disturbanceOnly : [...take.fit, ...take.heldOut];
  const free = complement(
    [...taken].sort((a, b) => a.from - b.from),
    take.samples,
  );
  let longest: Interval | null = null;
  for (const stretch of free) {
    if (longest === null || stretch.to - stretch.from > longest.to - longest.from) longest = stretch;
  }
  return longest;
}
