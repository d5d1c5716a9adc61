import { cosineAt, quarterCosines } from './cosines';
import { forwardLastEight, inverseFirstEight } from './lastEights';
import { forwardEight, inverseEight } from './stageOfEight';
import { forwardFour, inverseFour } from './stageOfFour';

/**
 * Discrete Fourier transform of one size, in place, on separate real and imaginary parts.
 * Spectra stay in bit-reversed order: products of spectra never need the permutation.
 */
export interface Transform {
  readonly size: number;
  /** X[f] = Σ x[n] exp(-2πi f n / size); time in natural order, spectrum in bit-reversed order. */
  forward(re: Float64Array, im: Float64Array): void;
  /** The inverse, 1/size included; spectrum in bit-reversed order, time in natural order. */
  inverse(re: Float64Array, im: Float64Array): void;
}

const made = new Map<number, Transform>();

/**
 * The transform of a size; each is made once.
 * Two or three radix-2 stages are done in one pass (Gentleman & Sande forward, Cooley & Tukey back), which leaves the
 * order bit-reversed. Error grows with log2(size): about 1e-16 relative to the largest part for each stage.
 * @param size a power of two, 4 or more
 */
export function transformOf(size: number): Transform {
  let transform = made.get(size);
  if (transform === undefined) {
    transform = newTransform(size);
    made.set(size, transform);
  }
  return transform;
}

/** The smallest power of two that is no less than `least` and holds so many points. */
export function sizeFor(points: number, least = 4): number {
  let size = least;
  while (size < points) size *= 2;
  return size;
}

/** Place of the conjugate frequency of place p of a bit-reversed spectrum. */
export function conjugatePlace(p: number): number {
  return p < 2 ? p : p ^ ((1 << (31 - Math.clz32(p))) - 1);
}

/** Frequency index (0..size-1) that stands at place p of a bit-reversed spectrum. */
export function frequencyAt(p: number, size: number): number {
  let rest = p;
  let frequency = 0;
  for (let bit = size >> 1; bit > 0; bit >>= 1) {
    if (rest & 1) frequency += bit;
    rest >>= 1;
  }
  return frequency;
}

/** Points of the largest stage of eight: with longer ones all eight places fall on the same lines of a cache. */
const longestEight = 2048;

/** The stages of a forward transform: radix 4 first, then 8. */
function radicesOf(size: number): number[] {
  const bits = 31 - Math.clz32(size);
  let fours = 0;
  while ((bits - 2 * fours) % 3 !== 0 || size >> (2 * fours) > longestEight) fours++;
  return [...new Array(fours).fill(4), ...new Array((bits - 2 * fours) / 3).fill(8)];
}

/** For a stage of n points: w^j … w^(radix-1)j (w = exp(-2πi/n)), real and imaginary parts, for each j < n/radix. */
function stageTwiddles(n: number, radix: number, quarter: Float64Array, size: number): Float64Array {
  const stride = size / n;
  const row = 2 * (radix - 1);
  const table = new Float64Array((row * n) / radix);
  for (let j = 0; j < n / radix; j++) {
    for (let m = 1; m < radix; m++) {
      table[row * j + 2 * m - 2] = cosineAt(quarter, m * j * stride);
      table[row * j + 2 * m - 1] = -cosineAt(quarter, m * j * stride - size / 4);
    }
  }
  return table;
}

interface Stage {
  radix: number;
  /** Points. */
  n: number;
  table: Float64Array;
}

function newTransform(size: number): Transform {
  if (size < 4 || (size & (size - 1)) !== 0) throw new Error(`got size ${size} when expected a power of two`);
  const quarter = quarterCosines(size);
  const stages: Stage[] = [];
  let n = size;
  for (const radix of radicesOf(size)) {
    stages.push({ radix, n, table: stageTwiddles(n, radix, quarter, size) });
    n /= radix;
  }
  const endsInEights = stages[stages.length - 1].radix === 8;
  if (endsInEights) stages.pop();
  const back = [...stages].reverse();
  const scale = 1 / size;

  return {
    size,
    forward(re, im) {
      for (const { radix, n, table } of stages) (radix === 8 ? forwardEight : forwardFour)(re, im, n, table);
      if (endsInEights) forwardLastEight(re, im);
    },
    inverse(re, im) {
      if (endsInEights) inverseFirstEight(re, im, scale);
      else scaleBy(re, im, scale);
      for (const { radix, n, table } of back) (radix === 8 ? inverseEight : inverseFour)(re, im, n, table);
    },
  };
}

function scaleBy(re: Float64Array, im: Float64Array, factor: number): void {
  for (let k = 0; k < re.length; k++) {
    re[k] *= factor;
    im[k] *= factor;
  }
}
