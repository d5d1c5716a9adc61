/**
 * Cosines of k·2π/size for k = 0..size/4, by halving the angle and Buneman's half-secant rule
 * (Proc. IEEE 75, 1987, from memory): only + - * / and square roots, so that every engine finds the same bits.
 * @param size a power of two, 4 or more
 * @returns size/4 + 1 values, each within 0.5e-16 · log2(size)
 */
export function quarterCosines(size: number): Float64Array {
  const quarter = size / 4;
  const cosines = new Float64Array(quarter + 1);
  cosines[0] = 1;
  let cosine = Math.sqrt(0.5);
  for (let step = quarter; step > 1; step /= 2) {
    const halfSecant = 0.5 / cosine;
    for (let k = step / 2; k < quarter; k += step) {
      cosines[k] = halfSecant * (cosines[k - step / 2] + cosines[k + step / 2]);
    }
    cosine = Math.sqrt(0.5 * (1 + cosine));
  }
  return cosines;
}

/** cos(k·2π/size) for any whole k, from {@link quarterCosines} of that size. */
export function cosineAt(quarter: Float64Array, k: number): number {
  const quarterSize = quarter.length - 1;
  const size = 4 * quarterSize;
  const turn = ((k % size) + size) % size;
  const half = turn > 2 * quarterSize ? size - turn : turn;
  return half <= quarterSize ? quarter[half] : -quarter[2 * quarterSize - half];
}
