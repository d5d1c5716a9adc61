import type { Word } from '../document/pairingDocument';

/** How a word is held in memory by the languages that are written. */
export interface NumberType {
  float: boolean;
  bytes: number;
  c: string;
  rust: string;
  /** NPY's `descr`, little-endian. */
  npy: string;
}

/**
 * The smallest type that holds the word: integers of 8, 16 or 32 bits, or the float type itself.
 * @param word integer words of 2 to 32 bits; more is a bug
 */
export function numberType(word: Word): NumberType {
  if (word === 'float32') return { float: true, bytes: 4, c: 'float', rust: 'f32', npy: '<f4' };
  if (word === 'float64') return { float: true, bytes: 8, c: 'double', rust: 'f64', npy: '<f8' };
  if (word <= 8) return { float: false, bytes: 1, c: 'int8_t', rust: 'i8', npy: '|i1' };
  if (word <= 16) return { float: false, bytes: 2, c: 'int16_t', rust: 'i16', npy: '<i2' };
  if (word <= 32) return { float: false, bytes: 4, c: 'int32_t', rust: 'i32', npy: '<i4' };
  throw new Error(`got a word of ${word} bits when expected at most 32`);
}

/** `16-bit`, `float32`. */
export function wordInWords(word: Word): string {
  return typeof word === 'number' ? `${word}-bit` : word;
}

/** How the mean of a signal of that word is held: it can lie outside the word, so that integers are held in 32 bits. */
export function meanType(word: Word): NumberType {
  return numberType(typeof word === 'number' ? 32 : word);
}
