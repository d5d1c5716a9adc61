import { conjugatePlace, type Transform, transformOf } from './transform';

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
  /** Writes the spectrum of [previous block, current block] of one signal. */
  joined(signal: number, into: Spectrum): void;
  /** Forgets the previous blocks. */
  clear(): void;
}

/** The block that suits a filter of the given length: a power of two, at least 1,024 and at least the length. */
export function blockFor(length: number): number {
  let block = 1024;
  while (block < length) block *= 2;
  return block;
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
    joined(signal, into) {
      const now = packed[signal >> 1];
      const before = previous[signal >> 1];
      if (signal % 2 === 0) joinReal(now, before, into);
      else joinImaginary(now, before, into);
    },
    clear() {
      for (const { re, im } of packed) {
        re.fill(0);
        im.fill(0);
      }
    },
  };
}

function load(part: Float64Array, samples: Float64Array | undefined): void {
  part.fill(0);
  if (samples !== undefined) part.set(samples);
}

// Even frequencies stand in the first half of a bit-reversed spectrum, odd ones in the second.

function joinReal(now: Spectrum, before: Spectrum, into: Spectrum): void {
  const half = into.re.length / 2;
  for (let p = 0; p < 2 * half; p++) {
    const q = conjugatePlace(p);
    const sign = p < half ? 0.5 : -0.5;
    into.re[p] = 0.5 * (before.re[p] + before.re[q]) + sign * (now.re[p] + now.re[q]);
    into.im[p] = 0.5 * (before.im[p] - before.im[q]) + sign * (now.im[p] - now.im[q]);
  }
}

function joinImaginary(now: Spectrum, before: Spectrum, into: Spectrum): void {
  const half = into.re.length / 2;
  for (let p = 0; p < 2 * half; p++) {
    const q = conjugatePlace(p);
    const sign = p < half ? 0.5 : -0.5;
    into.re[p] = 0.5 * (before.im[p] + before.im[q]) + sign * (now.im[p] + now.im[q]);
    into.im[p] = 0.5 * (before.re[q] - before.re[p]) + sign * (now.re[q] - now.re[p]);
  }
}
