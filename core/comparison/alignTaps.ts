/** Taps of one input of two filters, one beside the other; what one of them has not is zero. */
export interface AlignedTaps {
  before: Float64Array;
  after: Float64Array;
  /** Number that the first of them has in the filter after. */
  first: number;
}

/**
 * Puts taps beside each other where they meet the same sample of the desired signal: tap k of a filter of delay Δ stands
 * at k - Δ. Filters that do not overlap are moved until they touch.
 */
export function alignTaps(
  before: Float64Array,
  delayBefore: number,
  after: Float64Array,
  delayAfter: number,
): AlignedTaps {
  // Where the first tap before stands among those after.
  const apart = delayAfter - delayBefore;
  const offset = Math.max(-before.length, Math.min(after.length, apart));
  const first = Math.min(0, offset);
  const length = Math.max(after.length, offset + before.length) - first;
  const row = (taps: Float64Array, at: number) => {
    const whole = new Float64Array(length);
    whole.set(taps, at - first);
    return whole;
  };
  return { before: row(before, offset), after: row(after, 0), first };
}
