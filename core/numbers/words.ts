/** Two's-complement words as doubles; exact for words of at most 53 bits. */

/** 2^exponent for a whole exponent, exactly. */
export function powerOfTwo(exponent: number): number {
  let value = 1;
  const factor = exponent < 0 ? 0.5 : 2;
  for (let k = 0; k < Math.abs(exponent); k++) value *= factor;
  return value;
}

export interface WordRange {
  min: number;
  max: number;
}

/** Smallest and largest value of a signed word. */
export function wordRange(bits: number): WordRange {
  const half = powerOfTwo(bits - 1);
  return { min: -half, max: half - 1 };
}

/** `floor(v + ½)`, the one rounding rule of all conversions; exact where v + ½ is. */
export function roundHalfUp(value: number): number {
  return Math.floor(value + 0.5);
}

export function clamp(value: number, { min, max }: WordRange): number {
  return value < min ? min : value > max ? max : value;
}

/** The value that a word keeps of a whole number when higher bits are dropped. */
export function wrap(value: number, { min, max }: WordRange): number {
  const size = max - min + 1;
  return value - size * Math.floor((value - min) / size);
}
