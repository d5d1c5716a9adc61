/** Count, mean and sum of squares about the mean of samples that come block by block. */
export interface RunningMoments {
  readonly count: number;
  readonly mean: number;
  /** Σ (x - mean)². */
  readonly squares: number;
  /**
   * Adds a block; samples that are NaN or infinite do not count.
   * @returns whether every sample counted
   */
  add(samples: Float64Array): boolean;
}

/** Blocks are merged by Chan, Golub & LeVeque's rule (1979), which keeps about 14 digits whatever the offset. */
export function newRunningMoments(): RunningMoments {
  let count = 0;
  let mean = 0;
  let squares = 0;
  return {
    get count() {
      return count;
    },
    get mean() {
      return mean;
    },
    get squares() {
      return squares;
    },
    add(samples) {
      const { length } = samples;
      let sum = sumOf(samples);
      // A sum is finite where every sample is (and where they are not so large that it overflows).
      const plain = sum - sum === 0;
      const more = plain ? length : countFinite(samples);
      if (more === 0) return false;
      if (!plain) sum = finiteSum(samples);
      const ownMean = sum / more;
      const ownSquares = plain ? squaresAbout(samples, ownMean) : finiteSquaresAbout(samples, ownMean);
      const gap = ownMean - mean;
      // Before the first block there is nothing to merge, and the square of a large gap may be infinite.
      const between = count === 0 ? 0 : (gap * gap * count * more) / (count + more);
      squares += ownSquares + between;
      mean += (gap * more) / (count + more);
      count += more;
      return more === length;
    },
  };
}

// Four sums side by side, whose additions need not wait for each other.

function sumOf(samples: Float64Array): number {
  const { length } = samples;
  let a = 0;
  let b = 0;
  let c = 0;
  let d = 0;
  let k = 0;
  for (; k + 4 <= length; k += 4) {
    a += samples[k];
    b += samples[k + 1];
    c += samples[k + 2];
    d += samples[k + 3];
  }
  for (; k < length; k++) a += samples[k];
  return a + b + (c + d);
}

function squaresAbout(samples: Float64Array, mean: number): number {
  const { length } = samples;
  let a = 0;
  let b = 0;
  let c = 0;
  let d = 0;
  let k = 0;
  for (; k + 4 <= length; k += 4) {
    const p = samples[k] - mean;
    const q = samples[k + 1] - mean;
    const r = samples[k + 2] - mean;
    const s = samples[k + 3] - mean;
    a += p * p;
    b += q * q;
    c += r * r;
    d += s * s;
  }
  for (; k < length; k++) a += (samples[k] - mean) * (samples[k] - mean);
  return a + b + (c + d);
}

/** x - x is 0 for numbers alone. */
function isPlain(value: number): boolean {
  return value - value === 0;
}

function countFinite(samples: Float64Array): number {
  let count = 0;
  for (let k = 0; k < samples.length; k++) if (isPlain(samples[k])) count++;
  return count;
}

function finiteSum(samples: Float64Array): number {
  let sum = 0;
  for (let k = 0; k < samples.length; k++) if (isPlain(samples[k])) sum += samples[k];
  return sum;
}

function finiteSquaresAbout(samples: Float64Array, mean: number): number {
  let sum = 0;
  for (let k = 0; k < samples.length; k++) {
    const rest = samples[k] - mean;
    if (isPlain(rest)) sum += rest * rest;
  }
  return sum;
}
