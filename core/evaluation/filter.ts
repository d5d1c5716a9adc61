import type { BandFilter } from '../pair/bandFilter';
import type { Means } from '../pair/signals';

/** A filter ready to be run over recordings. */
export interface Filter {
  /** One row an input, newest-first. */
  coefficients: readonly Float64Array[];
  /** Δ in samples. */
  delay: number;
  /** Taken off before it runs. */
  means: Means;
  /** The band that the error is weighted to; none: all frequencies count alike. The filter itself runs on the raw signal. */
  band?: BandFilter | null;
}

/** M, taps per input. */
export function filterLength(filter: Filter): number {
  return filter.coefficients[0].length;
}
