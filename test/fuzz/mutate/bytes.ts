import { little } from '../../support/wavBytes';
import type { Dice } from '../dice';
import { hostileSizes } from '../hostile';

/** A change of a file that knows nothing of its format, or only of one; what comes out may be the same. */
export type Change<T> = (content: T, dice: Dice) => T;

/** Bytes of an input at most; larger ones are cut. */
export const largestInput = 1 << 20;

/** `bytes` with the range `[from, to)` replaced. */
export function spliced(bytes: Uint8Array, from: number, to: number, put: Uint8Array): Uint8Array {
  const all = new Uint8Array(bytes.length - (to - from) + put.length);
  all.set(bytes.subarray(0, from));
  all.set(put, from);
  all.set(bytes.subarray(to), from + put.length);
  return all;
}

/** A range of up to `most` bytes. */
export function rangeOf(length: number, dice: Dice, most = 512): [from: number, to: number] {
  const from = placeIn(length, dice);
  return [from, Math.min(length, from + dice.size(most))];
}

/** Half of all places are in the first bytes, where headers are. */
function placeIn(length: number, dice: Dice): number {
  return dice.onceIn(2) ? dice.below(Math.min(length, 64) + 1) : dice.below(length + 1);
}

function random(length: number, dice: Dice): Uint8Array {
  return Uint8Array.from({ length }, () => dice.below(256));
}

/** Once in so many repetitions the bytes may grow to the largest input. */
const rarelyLarge = 40;

/** Bytes that mean something somewhere: ends, quotes, separators, zeros, marks of encodings. */
const special = [0, 9, 10, 13, 26, 32, 34, 35, 44, 59, 92, 127, 128, 0xc0, 0xed, 0xef, 0xfe, 0xff];

export const byteChanges: Record<string, Change<Uint8Array>> = {
  flip(bytes, dice) {
    const flipped = bytes.slice();
    for (let count = 1 + dice.size(16); count > 0 && bytes.length > 0; count--) {
      flipped[Math.min(bytes.length - 1, placeIn(bytes.length, dice))] ^= 1 << dice.below(8);
    }
    return flipped;
  },
  cut: (bytes, dice) => bytes.slice(0, placeIn(bytes.length, dice)),
  behead: (bytes, dice) => bytes.slice(placeIn(bytes.length, dice)),
  remove: (bytes, dice) => spliced(bytes, ...rangeOf(bytes.length, dice), new Uint8Array(0)),
  insert(bytes, dice) {
    const at = placeIn(bytes.length, dice);
    const put = dice.onceIn(2)
      ? random(dice.size(64), dice)
      : new Uint8Array(dice.size(64)).fill(dice.one(special));
    return spliced(bytes, at, at, put);
  },
  overwrite(bytes, dice) {
    const [from, to] = rangeOf(bytes.length, dice, 64);
    return spliced(bytes, from, to, new Uint8Array(to - from).fill(dice.one(special)));
  },
  number(bytes, dice) {
    const width = dice.one([1, 2, 4, 8]);
    const put = little(width, dice.one(hostileSizes));
    const at = Math.min(placeIn(bytes.length, dice), Math.max(0, bytes.length - width));
    return spliced(bytes, at, Math.min(bytes.length, at + width), dice.onceIn(3) ? put.reverse() : put);
  },
  repeat(bytes, dice) {
    const [from, to] = rangeOf(bytes.length, dice);
    const most = dice.onceIn(rarelyLarge) ? largestInput : 8192;
    const count = Math.floor(dice.size(most) / Math.max(1, to - from));
    const put = new Uint8Array((to - from) * count);
    for (let k = 0; k < count; k++) put.set(bytes.subarray(from, to), k * (to - from));
    return spliced(bytes, to, to, put);
  },
  swap(bytes, dice) {
    const [from, to] = rangeOf(bytes.length, dice);
    const moved = bytes.slice(from, to);
    const rest = spliced(bytes, from, to, new Uint8Array(0));
    const at = placeIn(rest.length, dice);
    return spliced(rest, at, at, moved);
  },
};
