import type { Means } from '../pair/signals';

/** A filter ready to be run over recordings. */
export interface Filter {
  /** One row an input, newest-first. */
  coefficients: readonly Float64Array[];
  /** Δ in samples. */
  delay: number;
  /** Taken off before it runs. */
  means: Means;
}

/** M, taps per input. */
export function filterLength(filter: Filter): number {
  return filter.coefficients[0].length;
}
