import type { Job } from '../document/pairingDocument';

/** The candidates: every combination of a length, a delay and a regularisation. Each list rises and has no value twice. */
export interface Grid {
  /** M, taps per input. */
  lengths: number[];
  /** Δ in samples. */
  delays: number[];
  /** ρ. */
  regularisations: number[];
}

/** The filter that the document asks for: in the grid whatever else is. */
export interface Centre {
  length: number;
  delay: number;
  regularisation: number;
}

const lengthCount = 24;
const delayCount = 33;

/** Decades from nearly nothing to as much as the input's own power; shown in dB from -80 to 0. */
const decades = [1e-8, 1e-7, 1e-6, 1e-5, 1e-4, 1e-3, 1e-2, 1e-1, 1];

/** How far beyond the document's length the search goes: four times, and to 32 taps at least. */
const reach = 4;
const leastReach = 32;

/**
 * Lengths that are candidates at most, longest first: four an octave, since a step of less than a fifth changes the
 * error by little. From the longest that is of use down to the document's own.
 * @param longest most taps that an input may have
 */
export function longestLengths(centre: number, longest: number): number[] {
  const most = Math.min(longest, Math.max(reach * centre, leastReach));
  return [...ladder(most).filter((length) => length > centre), centre].sort((a, b) => b - a);
}

/** 24 lengths up to the longest, the document's own among them. */
export function lengthsUpTo(longest: number, centre: number): number[] {
  const steps = ladder(longest).slice(-lengthCount);
  return withOwn(steps, centre, (length) => Math.abs(length - centre));
}

/** 1, 2, 3, 4, 5, 6, 7, 8, 10, 12, 14, 16, 20, … up to `most`. */
function ladder(most: number): number[] {
  const lengths = [1, 2, 3];
  for (let octave = 1; 4 * octave <= most; octave *= 2) {
    for (const step of [4, 5, 6, 7]) lengths.push(step * octave);
  }
  return lengths.filter((length) => length <= most);
}

/**
 * 33 delays that suit the job, the document's own among them, in steps of a sample for filters up to 128 taps:
 * `cancel` as many earlier as later; `identify` more lag than lead, since a path delays; `equalise` over the length of
 * the filter, since what it undoes lies before and after; `predict` horizons of one sample and more.
 */
export function delaysFor(job: Job, { length, delay }: Centre): number[] {
  const coarse = Math.max(1, Math.ceil(length / 128));
  const step = job === 'equalise' ? Math.max(1, Math.ceil(length / (delayCount - 1))) : coarse;
  const before = job === 'identify' ? 24 : 16;
  const first = delay - before * step;
  const delays = Array.from({ length: delayCount }, (_, i) => first + i * step);
  if (job !== 'predict') return delays;
  const shift = Math.min(0, Math.ceil((-1 - delays[delayCount - 1]) / step)) * step;
  return delay < 0 ? delays.map((value) => value + shift) : [delay];
}

/** Nine regularisations, the document's own among them. */
export function regularisationsFor({ regularisation }: Centre): number[] {
  return withOwn(decades, regularisation, (value) =>
    // By their ratio, and nothing at all next to the smallest.
    regularisation === 0 ? value : Math.max(value / regularisation, regularisation / value),
  );
}

/** The list with the document's own value, in the place of the nearest where it was not among them. */
function withOwn(values: readonly number[], own: number, distance: (value: number) => number): number[] {
  if (values.includes(own)) return [...values];
  if (values.length === 0) return [own];
  const nearest = values.reduce((a, b) => (distance(b) < distance(a) ? b : a));
  return values.map((value) => (value === nearest ? own : value)).sort((a, b) => a - b);
}
