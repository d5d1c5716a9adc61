import { sizeFor, type Transform, transformOf } from './transform';

/** A complex spectrum in bit-reversed order. */
export interface Spectrum {
  re: Float64Array;
  im: Float64Array;
}

export function newSpectrum(size: number): Spectrum {
  return { re: new Float64Array(size), im: new Float64Array(size) };
}

/**
 * Spectra of successive blocks of several real signals, for overlapped correlation and filtering.
 * Blocks of `block` samples are padded with zeros to twice that and transformed two signals at a time; the spectrum
 * of a block joined to the one before it needs no transform of its own: a shift by `block` in a transform of twice
 * that size turns every odd frequency's sign.
 */
export interface BlockSpectra {
  readonly block: number;
  readonly transform: Transform;
  /** Current block, signals 2t and 2t+1 packed as real and imaginary part of the time signal. */
  readonly packed: readonly Spectrum[];
  /** Moves on by one block. Each signal has at most `block` samples; missing ones count as zero. */
  push(signals: readonly Float64Array[]): void;
  /**
   * Adds `Z conj(X)` to a spectrum, Z that of the current block of packed signals 2t and 2t+1 and X that of
   * [previous block, current block] of one signal.
   */
  addProduct(t: number, signal: number, sum: Spectrum): void;
}

/** The block that suits a filter of the given length: a power of two, at least 1,024 and at least the length. */
export function blockFor(length: number): number {
  return sizeFor(length, 1024);
}

/** @param signals how many real signals each block brings */
export function newBlockSpectra(signals: number, block: number): BlockSpectra {
  const size = 2 * block;
  const transform = transformOf(size);
  const pairs = Math.ceil(signals / 2);
  let packed = Array.from({ length: pairs }, () => newSpectrum(size));
  let previous = Array.from({ length: pairs }, () => newSpectrum(size));

  return {
    block,
    transform,
    get packed() {
      return packed;
    },
    push(blocks) {
      [packed, previous] = [previous, packed];
      for (let t = 0; t < pairs; t++) {
        load(packed[t].re, blocks[2 * t]);
        load(packed[t].im, blocks[2 * t + 1]);
        transform.forward(packed[t].re, packed[t].im);
      }
    },
    addProduct(t, signal, sum) {
      const now = packed[signal >> 1];
      const before = previous[signal >> 1];
      if (signal % 2 === 0) addReal(sum, packed[t], now, before);
      else addImaginary(sum, packed[t], now, before);
    },
  };
}

function load(part: Float64Array, samples: Float64Array | undefined): void {
  part.fill(0);
  if (samples !== undefined) part.set(samples);
}

// Even frequencies stand in the first half of a bit-reversed spectrum, odd ones in the second. The spectrum of a real
// signal has conjugates at conjugate places, which in an octave [h, 2h) of places mirror each other: one is computed,
// both are used. The current block starts at sample `block` of the joined one, so that its own spectrum, as part of X
// and as Z, takes the odd frequencies' signs.

function addReal(sum: Spectrum, z: Spectrum, now: Spectrum, before: Spectrum): void {
  const { re: bRe, im: bIm } = before;
  const { re: nRe, im: nIm } = now;
  addAt(sum, z, 0, bRe[0] + nRe[0]);
  addAt(sum, z, 1, bRe[1] + nRe[1]);
  for (let h = 2; h < bRe.length; h *= 2) {
    const sign = 2 * h < bRe.length ? 1 : -1;
    for (let p = h, q = 2 * h - 1; p < q; p++, q--) {
      const xRe = 0.5 * (bRe[p] + bRe[q] + sign * (nRe[p] + nRe[q]));
      const xIm = 0.5 * (bIm[p] - bIm[q] + sign * (nIm[p] - nIm[q]));
      addPair(sum, z, p, q, sign * xRe, sign * xIm);
    }
  }
}

function addImaginary(sum: Spectrum, z: Spectrum, now: Spectrum, before: Spectrum): void {
  const { re: bRe, im: bIm } = before;
  const { re: nRe, im: nIm } = now;
  addAt(sum, z, 0, bIm[0] + nIm[0]);
  addAt(sum, z, 1, bIm[1] + nIm[1]);
  for (let h = 2; h < bRe.length; h *= 2) {
    const sign = 2 * h < bRe.length ? 1 : -1;
    for (let p = h, q = 2 * h - 1; p < q; p++, q--) {
      const xRe = 0.5 * (bIm[p] + bIm[q] + sign * (nIm[p] + nIm[q]));
      const xIm = 0.5 * (bRe[q] - bRe[p] + sign * (nRe[q] - nRe[p]));
      addPair(sum, z, p, q, sign * xRe, sign * xIm);
    }
  }
}

function addAt(sum: Spectrum, z: Spectrum, p: number, x: number): void {
  sum.re[p] += z.re[p] * x;
  sum.im[p] += z.im[p] * x;
}

/** `Z conj(X)` at a place and at its conjugate, where X is conjugate too. */
function addPair(sum: Spectrum, z: Spectrum, p: number, q: number, xRe: number, xIm: number): void {
  const { re, im } = sum;
  const { re: zRe, im: zIm } = z;
  re[p] += zRe[p] * xRe + zIm[p] * xIm;
  im[p] += zIm[p] * xRe - zRe[p] * xIm;
  re[q] += zRe[q] * xRe - zIm[q] * xIm;
  im[q] += zIm[q] * xRe + zRe[q] * xIm;
}
