import { cosineAt, quarterCosines } from '../statistics/cosines';

/** Periodic Hann window: `½ - ½ cos(2πk/size)`. */
export function hann(size: number): Float64Array {
  const quarter = quarterCosines(size);
  return Float64Array.from({ length: size }, (_, k) => 0.5 - 0.5 * cosineAt(quarter, k));
}

/**
 * The slope of Hann's window, `sin(2πk/size)`, without its factor. What a response of k samples carries over the ends of
 * a segment is, to first order in k/size, its input seen through this window.
 */
export function hannSlope(size: number): Float64Array {
  const quarter = quarterCosines(size);
  return Float64Array.from({ length: size }, (_, k) => cosineAt(quarter, k - size / 4));
}
