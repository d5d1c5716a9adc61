/** Lowest and highest finite value of each run of `step` samples of one channel, for drawing it from afar. */
export interface Outline {
  /** Samples of a run, a power of two; the last run may be shorter. */
  step: number;
  /** Infinite where a run has no finite sample. Single precision, which is more than a screen shows. */
  low: Float32Array;
  high: Float32Array;
}

/** Runs at most: several for each pixel of the widest screen. */
const mostRuns = 65536;
const leastStep = 64;

export function newOutline(samples: number): Outline {
  let step = leastStep;
  while (samples > mostRuns * step) step *= 2;
  const runs = Math.ceil(samples / step);
  return {
    step,
    low: new Float32Array(runs).fill(Number.POSITIVE_INFINITY),
    high: new Float32Array(runs).fill(Number.NEGATIVE_INFINITY),
  };
}

/** The part of an outline's runs that lies in `[from, to)`, as extremes; null where it has no finite sample. */
export function extremesOf(
  { step, low, high }: Outline,
  from: number,
  to: number,
): { min: number; max: number } | null {
  let min = Number.POSITIVE_INFINITY;
  let max = Number.NEGATIVE_INFINITY;
  const last = Math.min(low.length, Math.ceil(to / step));
  for (let run = Math.floor(from / step); run < last; run++) {
    if (low[run] < min) min = low[run];
    if (high[run] > max) max = high[run];
  }
  return max >= min ? { min, max } : null;
}
