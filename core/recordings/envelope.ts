import type { Outline } from './outline';
import { extremesOf } from './outline';

/** Lowest and highest value of columns of equal width; NaN where a column has no finite sample. */
export interface Columns {
  /** First sample of the first column. */
  from: number;
  /** Samples of a column; 1: the samples themselves, low and high alike. */
  step: number;
  low: Float64Array;
  high: Float64Array;
}

/**
 * Columns for the samples `[from, to)`: about as many as wanted, the samples themselves where twice as many columns hold
 * them. Where a column is as wide as a run of the outline, columns begin and end with its runs.
 * @param run samples of a run of the outline; 0 where there is none
 */
export function planColumns(from: number, to: number, wanted: number, run: number): Columns {
  const samples = Math.max(0, to - from);
  const columns = Math.max(1, Math.min(wanted, 8192));
  if (samples <= 2 * columns) return emptyColumns(from, 1, samples);
  const step = Math.ceil(samples / columns);
  if (run === 0 || step < run) return emptyColumns(from, step, Math.ceil(samples / step));
  const whole = run * Math.floor(step / run);
  const first = whole * Math.floor(from / whole);
  return emptyColumns(first, whole, Math.ceil((to - first) / whole));
}

function emptyColumns(from: number, step: number, count: number): Columns {
  return {
    from,
    step,
    low: new Float64Array(count).fill(Number.NaN),
    high: new Float64Array(count).fill(Number.NaN),
  };
}

/** Takes samples that begin at sample `at` into their columns; what lies outside is left out. */
export function addToColumns({ from, step, low, high }: Columns, samples: Float64Array, at: number): void {
  const start = Math.max(0, from - at);
  const end = Math.min(samples.length, from + step * low.length - at);
  for (let k = start; k < end; k++) {
    const value = samples[k];
    if (value - value !== 0) continue;
    const column = Math.floor((at + k - from) / step);
    // Comparisons with NaN are false.
    if (!(value >= low[column])) low[column] = value;
    if (!(value <= high[column])) high[column] = value;
  }
}

/** Fills columns that begin and end with the runs of an outline. */
export function columnsFromOutline({ from, step, low, high }: Columns, outline: Outline): void {
  for (let column = 0; column < low.length; column++) {
    const start = from + column * step;
    const found = extremesOf(outline, start, start + step);
    if (found === null) continue;
    low[column] = found.min;
    high[column] = found.max;
  }
}
