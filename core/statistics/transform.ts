import { cosineAt, quarterCosines } from './cosines';

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
 * Two radix-2 stages are done in one pass (Gentleman & Sande forward, Cooley & Tukey back), which leaves the
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

/** For a stage of n points: w^j, w^2j, w^3j (w = exp(-2πi/n)), j < n/4, six numbers each. */
function stageTwiddles(n: number, quarter: Float64Array, size: number): Float64Array {
  const stride = size / n;
  const table = new Float64Array(6 * (n / 4));
  for (let j = 0; j < n / 4; j++) {
    for (let m = 1; m <= 3; m++) {
      table[6 * j + 2 * m - 2] = cosineAt(quarter, m * j * stride);
      table[6 * j + 2 * m - 1] = -cosineAt(quarter, m * j * stride - size / 4);
    }
  }
  return table;
}

function newTransform(size: number): Transform {
  if (size < 4 || (size & (size - 1)) !== 0) throw new Error(`got size ${size} when expected a power of two`);
  const quarter = quarterCosines(size);
  const stages: Float64Array[] = [];
  let last = size;
  for (; last >= 4; last /= 4) stages.push(stageTwiddles(last, quarter, size));

  return {
    size,
    forward(re, im) {
      let n = size;
      for (const table of stages) {
        if (n === 4) fours(re, im);
        else forwardStage(re, im, n, table);
        n /= 4;
      }
      if (n === 2) pairs(re, im);
    },
    inverse(re, im) {
      if (last === 2) pairs(re, im);
      let n = last === 2 ? 8 : 4;
      for (let s = stages.length - 1; s >= 0; s--) {
        inverseStage(re, im, n, stages[s]);
        n *= 4;
      }
      const scale = 1 / size;
      for (let k = 0; k < size; k++) {
        re[k] *= scale;
        im[k] *= scale;
      }
    },
  };
}

function forwardStage(re: Float64Array, im: Float64Array, n: number, table: Float64Array): void {
  const q = n / 4;
  for (let base = 0; base < re.length; base += n) {
    for (let j = 0, t = 0; j < q; j++, t += 6) {
      const p0 = base + j;
      const p1 = p0 + q;
      const p2 = p1 + q;
      const p3 = p2 + q;
      const sumRe = re[p0] + re[p2];
      const sumIm = im[p0] + im[p2];
      const oddRe = re[p1] + re[p3];
      const oddIm = im[p1] + im[p3];
      const gapRe = re[p0] - re[p2];
      const gapIm = im[p0] - im[p2];
      const sideRe = im[p1] - im[p3];
      const sideIm = re[p3] - re[p1];
      re[p0] = sumRe + oddRe;
      im[p0] = sumIm + oddIm;
      let a = sumRe - oddRe;
      let b = sumIm - oddIm;
      re[p1] = a * table[t + 2] - b * table[t + 3];
      im[p1] = a * table[t + 3] + b * table[t + 2];
      a = gapRe + sideRe;
      b = gapIm + sideIm;
      re[p2] = a * table[t] - b * table[t + 1];
      im[p2] = a * table[t + 1] + b * table[t];
      a = gapRe - sideRe;
      b = gapIm - sideIm;
      re[p3] = a * table[t + 4] - b * table[t + 5];
      im[p3] = a * table[t + 5] + b * table[t + 4];
    }
  }
}

function inverseStage(re: Float64Array, im: Float64Array, n: number, table: Float64Array): void {
  const q = n / 4;
  for (let base = 0; base < re.length; base += n) {
    for (let j = 0, t = 0; j < q; j++, t += 6) {
      const p0 = base + j;
      const p1 = p0 + q;
      const p2 = p1 + q;
      const p3 = p2 + q;
      const t1Re = re[p1] * table[t + 2] + im[p1] * table[t + 3];
      const t1Im = im[p1] * table[t + 2] - re[p1] * table[t + 3];
      const t2Re = re[p2] * table[t] + im[p2] * table[t + 1];
      const t2Im = im[p2] * table[t] - re[p2] * table[t + 1];
      const t3Re = re[p3] * table[t + 4] + im[p3] * table[t + 5];
      const t3Im = im[p3] * table[t + 4] - re[p3] * table[t + 5];
      const b0Re = re[p0] + t1Re;
      const b0Im = im[p0] + t1Im;
      const b1Re = re[p0] - t1Re;
      const b1Im = im[p0] - t1Im;
      const evenRe = t2Re + t3Re;
      const evenIm = t2Im + t3Im;
      const oddRe = t3Im - t2Im;
      const oddIm = t2Re - t3Re;
      re[p0] = b0Re + evenRe;
      im[p0] = b0Im + evenIm;
      re[p2] = b0Re - evenRe;
      im[p2] = b0Im - evenIm;
      re[p1] = b1Re + oddRe;
      im[p1] = b1Im + oddIm;
      re[p3] = b1Re - oddRe;
      im[p3] = b1Im - oddIm;
    }
  }
}

/** The forward stage of 4 points, whose factors are all 1. */
function fours(re: Float64Array, im: Float64Array): void {
  for (let p = 0; p < re.length; p += 4) {
    const sumRe = re[p] + re[p + 2];
    const sumIm = im[p] + im[p + 2];
    const oddRe = re[p + 1] + re[p + 3];
    const oddIm = im[p + 1] + im[p + 3];
    const gapRe = re[p] - re[p + 2];
    const gapIm = im[p] - im[p + 2];
    const sideRe = im[p + 1] - im[p + 3];
    const sideIm = re[p + 3] - re[p + 1];
    re[p] = sumRe + oddRe;
    im[p] = sumIm + oddIm;
    re[p + 1] = sumRe - oddRe;
    im[p + 1] = sumIm - oddIm;
    re[p + 2] = gapRe + sideRe;
    im[p + 2] = gapIm + sideIm;
    re[p + 3] = gapRe - sideRe;
    im[p + 3] = gapIm - sideIm;
  }
}

/** The last stage where the size is 2 times a power of 4. */
function pairs(re: Float64Array, im: Float64Array): void {
  for (let p = 0; p < re.length; p += 2) {
    const a = re[p];
    const b = im[p];
    re[p] = a + re[p + 1];
    im[p] = b + im[p + 1];
    re[p + 1] = a - re[p + 1];
    im[p + 1] = b - im[p + 1];
  }
}
