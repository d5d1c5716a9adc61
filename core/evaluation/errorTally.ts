/** Energies of error and desired signal over equal blocks of the n counted. */
export interface ErrorTally {
  /** Brings the next samples of d[n-Δ] and of y. */
  add(desired: Float64Array, output: Float64Array): void;
  readonly samples: number;
  readonly errorEnergy: number;
  readonly desiredEnergy: number;
  /** One number a block. */
  readonly blocks: { error: Float64Array; desired: Float64Array };
}

/**
 * @param expected number of n that will be brought
 * @param blocks equal parts into which they are counted
 */
export function newErrorTally(expected: number, blocks: number): ErrorTally {
  const error = new Float64Array(blocks);
  const desired = new Float64Array(blocks);
  let samples = 0;
  const total = (row: Float64Array) => row.reduce((sum, value) => sum + value, 0);
  return {
    add(d, y) {
      for (let n = 0; n < d.length; ) {
        const b = Math.min(blocks - 1, Math.floor(((samples + n) * blocks) / expected));
        // Where block b ends among these samples; the last takes whatever comes.
        const end = b === blocks - 1 ? d.length : Math.ceil(((b + 1) * expected) / blocks) - samples;
        const to = Math.max(n + 1, Math.min(d.length, end));
        let errorSum = error[b];
        let desiredSum = desired[b];
        for (; n < to; n++) {
          const e = d[n] - y[n];
          errorSum += e * e;
          desiredSum += d[n] * d[n];
        }
        error[b] = errorSum;
        desired[b] = desiredSum;
      }
      samples += d.length;
    },
    get samples() {
      return samples;
    },
    get errorEnergy() {
      return total(error);
    },
    get desiredEnergy() {
      return total(desired);
    },
    blocks: { error, desired },
  };
}

/**
 * Relative standard error of the ratio Σ error / Σ desired from its blocks (ratio estimator: Cochran,
 * *Sampling Techniques*, ch. 6, from memory); null for fewer than four blocks or no desired energy.
 * Blocks must be long against the correlation of the signals for it to hold.
 */
export function relativeStandardError({ error, desired }: ErrorTally['blocks']): number | null {
  const blocks = error.length;
  let errorSum = 0;
  let desiredSum = 0;
  for (let b = 0; b < blocks; b++) {
    errorSum += error[b];
    desiredSum += desired[b];
  }
  if (blocks < 4 || !(desiredSum > 0) || !(errorSum > 0)) return null;
  const ratio = errorSum / desiredSum;
  let squares = 0;
  for (let b = 0; b < blocks; b++) {
    const rest = error[b] - ratio * desired[b];
    squares += rest * rest;
  }
  return Math.sqrt((squares * blocks) / (blocks - 1)) / errorSum;
}

/** Blocks for a standard error: up to 32, each at least four filter lengths and 64 samples; at least one. */
export function blockCount(samples: number, length: number): number {
  return Math.max(1, Math.min(32, Math.floor(samples / Math.max(4 * length, 64))));
}
