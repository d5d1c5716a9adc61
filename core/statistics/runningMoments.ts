/** Count, mean and sum of squares about the mean of samples that come block by block. */
export interface RunningMoments {
  readonly count: number;
  readonly mean: number;
  /** Σ (x - mean)². */
  readonly squares: number;
  /** Adds a block; samples that are NaN or infinite do not count. */
  add(samples: Float64Array): void;
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
      let more = 0;
      let sum = 0;
      for (let k = 0; k < samples.length; k++) {
        const value = samples[k];
        // x - x is 0 for numbers alone.
        if (value - value !== 0) continue;
        more++;
        sum += value;
      }
      if (more === 0) return;
      const ownMean = sum / more;
      let ownSquares = 0;
      for (let k = 0; k < samples.length; k++) {
        const rest = samples[k] - ownMean;
        if (rest - rest === 0) ownSquares += rest * rest;
      }
      const gap = ownMean - mean;
      // Before the first block there is nothing to merge, and the square of a large gap may be infinite.
      const between = count === 0 ? 0 : (gap * gap * count * more) / (count + more);
      squares += ownSquares + between;
      mean += (gap * more) / (count + more);
      count += more;
    },
  };
}
