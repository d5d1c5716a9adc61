import { newSpectrum, type Spectrum } from '../statistics/blockSpectra';
import { frequencyAt, transformOf } from '../statistics/transform';

/** A windowed signal whose spectra are wanted. */
export interface Channel {
  signal: number;
  /** `hann` or `hannSlope`. */
  window: Float64Array;
}

/** Cuts several signals into half-overlapped segments and brings the windowed spectra of each. */
export interface SegmentSpectra {
  /** Brings the next samples of every signal, equally many each. */
  push(signals: readonly Float64Array[]): void;
  /** The next samples do not follow on the last ones. */
  gap(): void;
  /** Powers of two by which the spectra of each channel are larger; chosen at its first segment that is not zero. */
  readonly scales: readonly number[];
}

/**
 * Half overlap, no mean taken off a segment. Channels are packed two by two into complex transforms, each scaled by a
 * power of two to about the size of the other, so that rounding of a large one does not drown a small one.
 * @param channels in the order of the spectra
 * @param segment samples of a segment, a power of two, 4 or more
 * @param visit takes the spectrum of every channel for one segment: place h < segment/2 holds frequency
 *   {@link naturalFrequency}(h), place segment/2 the one at half the sample rate. The arrays are used again.
 *   `follows`: this segment overlaps the one before it
 */
export function newSegmentSpectra(
  channels: readonly Channel[],
  segment: number,
  visit: (spectra: readonly Spectrum[], follows: boolean) => void,
): SegmentSpectra {
  const count = channels.length;
  const signalCount = 1 + Math.max(...channels.map(({ signal }) => signal));
  const transform = transformOf(segment);
  // Times the scale of the channel, which is exact.
  const windows = channels.map(({ window }) => window);
  const held = Array.from({ length: signalCount }, () => new Float64Array(segment));
  const spectra = Array.from({ length: count }, () => newSpectrum(segment / 2 + 1));
  const packed = newSpectrum(segment);
  const unused = newSpectrum(segment / 2 + 1);
  const scales: number[] = new Array(count).fill(0);
  let filled = 0;
  let follows = false;

  /** The segment that starts at place `from` of these rows. */
  function addSegment(rows: readonly Float64Array[], from: number): void {
    for (let s = 0; s < count; s++) {
      if (scales[s] > 0) continue;
      const { signal, window } = channels[s];
      scales[s] = scaleFor(rows[signal].subarray(from, from + segment));
      windows[s] = window.map((value) => value * scales[s]);
    }
    for (let s = 0; s < count; s += 2) {
      multiply(packed.re, rows[channels[s].signal], from, windows[s]);
      if (s + 1 < count) multiply(packed.im, rows[channels[s + 1].signal], from, windows[s + 1]);
      else packed.im.fill(0);
      transform.forward(packed.re, packed.im);
      part(packed, spectra[s], s + 1 < count ? spectra[s + 1] : unused);
    }
    visit(spectra, follows);
    follows = true;
  }

  /** Copies samples to the end of what is held. */
  function hold(signals: readonly Float64Array[], from: number, to: number): void {
    for (let s = 0; s < signalCount; s++) held[s].set(signals[s].subarray(from, to), filled);
    filled += to - from;
  }

  return {
    scales,
    gap() {
      filled = 0;
      follows = false;
    },
    push(signals) {
      const length = signals[0].length;
      let next = 0;
      // Segments that began in an earlier block.
      while (filled > next) {
        const to = Math.min(length, next + segment - filled);
        hold(signals, next, to);
        if (filled < segment) return;
        addSegment(held, 0);
        for (const samples of held) samples.copyWithin(0, segment / 2);
        filled = segment / 2;
        next = to;
      }
      // What is held now lies in this block: segments are taken from where they stand.
      next -= filled;
      filled = 0;
      for (; next + segment <= length; next += segment / 2) addSegment(signals, next);
      hold(signals, next, length);
    },
  };
}

/** Frequency index that stands at place h of a half spectrum of `half` places and one more. */
export function naturalFrequency(h: number, half: number): number {
  return h === half ? half : frequencyAt(h, half);
}

/** The power of two that brings the largest sample to between 1 and 2, as far as 2^±100 can; 0 where all are zero. */
function scaleFor(samples: Float64Array): number {
  let largest = 0;
  for (let k = 0; k < samples.length; k++) largest = Math.max(largest, Math.abs(samples[k]));
  if (!(largest > 0)) return 0;
  let scale = 1;
  for (let k = 0; k < 100 && largest * scale < 1; k++) scale *= 2;
  for (let k = 0; k < 100 && largest * scale >= 2; k++) scale /= 2;
  return scale;
}

function multiply(into: Float64Array, samples: Float64Array, from: number, window: Float64Array): void {
  for (let k = 0; k < into.length; k++) into[k] = window[k] * samples[from + k];
}

/** Parts a packed spectrum into those of its two real signals: A = (Z + Z*)/2, B = (Z - Z*)/2i. */
function part({ re, im }: Spectrum, a: Spectrum, b: Spectrum): void {
  const half = re.length / 2;
  const { re: aRe, im: aIm } = a;
  const { re: bRe, im: bIm } = b;
  aRe[0] = re[0];
  bRe[0] = im[0];
  aRe[half] = re[1];
  bRe[half] = im[1];
  // Frequencies below half the sample rate stand at the even places p = 2h; in [2^j, 2^(j+1)) the conjugate of
  // place p is 3·2^j - 1 - p.
  for (let base = 1; base < half; base *= 2) {
    for (let h = base, p = 2 * base, q = 4 * base - 1; h < 2 * base; h++, p += 2, q -= 2) {
      const pRe = re[p];
      const pIm = im[p];
      const qRe = re[q];
      const qIm = im[q];
      aRe[h] = 0.5 * (pRe + qRe);
      aIm[h] = 0.5 * (pIm - qIm);
      bRe[h] = 0.5 * (pIm + qIm);
      bIm[h] = 0.5 * (qRe - pRe);
    }
  }
}
