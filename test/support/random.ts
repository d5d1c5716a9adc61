/** Uniform numbers in (0, 1) from a seed: Marsaglia's xorshift32 (Journal of Statistical Software 8(14), 2003). */
export function seededUniform(seed: number): () => number {
  let state = (Math.imul(seed + 1, 0x9e3779b1) ^ 0x5bd1e995) >>> 0 || 1;
  const next = () => {
    state ^= state << 13;
    state ^= state >>> 17;
    state ^= state << 5;
    state >>>= 0;
    return (state + 0.5) / 4294967296;
  };
  for (let k = 0; k < 8; k++) next();
  return next;
}

/** Standard normal numbers from a seed, by Box & Muller's transform. */
export function seededNormal(seed: number): () => number {
  const uniform = seededUniform(seed);
  return () => Math.sqrt(-2 * Math.log(uniform())) * Math.cos(2 * Math.PI * uniform());
}

/** A row of standard normal numbers. */
export function normals(seed: number, count: number): Float64Array {
  return Float64Array.from({ length: count }, seededNormal(seed));
}

/** An autoregression of the first order driven by standard normal numbers. */
export function autoregression(count: number, seed: number, pole: number): Float64Array {
  const row = normals(seed, count);
  for (let n = 1; n < count; n++) row[n] += pole * row[n - 1];
  return row;
}
