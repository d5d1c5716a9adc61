/**
 * Random 32-bit words from a seed: L'Ecuyer's combined Tausworthe generator taus88 (Mathematics of Computation
 * 65(213), 1996, 203-213), period about 2^88. Its three words start from the seed by x -> 69069 x modulo 2^32 and the
 * first six results are dropped.
 * @param seed a whole number from 1 to 2^32 - 1
 */
export function randomWords(seed: number): () => number {
  let a = atLeast(2, Math.imul(69069, seed));
  let b = atLeast(8, Math.imul(69069, a));
  let c = atLeast(16, Math.imul(69069, b));
  const next = () => {
    a = ((a & 0xfffffffe) << 12) ^ (((a << 13) ^ a) >>> 19);
    b = ((b & 0xfffffff8) << 4) ^ (((b << 2) ^ b) >>> 25);
    c = ((c & 0xfffffff0) << 17) ^ (((c << 3) ^ c) >>> 11);
    return (a ^ b ^ c) >>> 0;
  };
  for (let k = 0; k < 6; k++) next();
  return next;
}

/** The generator stays in a short cycle where a word starts below its bound. */
function atLeast(bound: number, word: number): number {
  return word >>> 0 < bound ? word + bound : word;
}

/** Whole numbers from 0 to `count - 1`, each as likely; `count` is far below 2^32. */
export function randomChoices(seed: number, count: number): () => number {
  const next = randomWords(seed);
  return () => Math.floor((next() / 4294967296) * count);
}

/**
 * Nearly normal white noise of zero mean and unit variance: twelve uniform numbers less six. No value lies outside
 * -6..6, and only + - * / are used, so that every engine gives the same bits.
 */
export function whiteNoise(seed: number, length: number): Float64Array {
  const next = randomWords(seed);
  const noise = new Float64Array(length);
  for (let n = 0; n < length; n++) {
    let sum = 0;
    for (let k = 0; k < 12; k++) sum += (next() + 0.5) / 4294967296;
    noise[n] = sum - 6;
  }
  return noise;
}
