import { cosineAt, quarterCosines } from '../statistics/cosines';
import { conjugatePlace, frequencyAt, transformOf } from '../statistics/transform';

/**
 * Power spectral densities by Welch's method (IEEE Trans. Audio Electroacoust. 15, 1967): periodic Hann window,
 * half-overlapped segments, no mean taken off, one-sided.
 */
export interface Welch {
  /** Brings the next samples of every signal, equally many each. */
  push(signals: readonly Float64Array[]): void;
  /** The next samples do not follow on the last ones. */
  gap(): void;
  /** Segments averaged so far. */
  readonly averages: number;
  /** One density for each signal, segment/2 + 1 values in unit²/Hz; zeros where nothing was averaged. */
  densities(): Float64Array[];
}

/** Periodic Hann window: `½ - ½ cos(2πk/size)`. */
export function hann(size: number): Float64Array {
  const quarter = quarterCosines(size);
  return Float64Array.from({ length: size }, (_, k) => 0.5 - 0.5 * cosineAt(quarter, k));
}

/**
 * @param count number of signals
 * @param segment samples of a segment, a power of two, 4 or more
 * @param sampleRate in Hz
 */
export function newWelch(count: number, segment: number, sampleRate: number): Welch {
  const window = hann(segment);
  const transform = transformOf(segment);
  const held = Array.from({ length: count }, () => new Float64Array(segment));
  const sums = Array.from({ length: count }, () => new Float64Array(segment / 2 + 1));
  const re = new Float64Array(segment);
  const im = new Float64Array(segment);
  let filled = 0;
  let averages = 0;

  function addSegment(): void {
    for (let s = 0; s < count; s += 2) {
      for (let k = 0; k < segment; k++) {
        re[k] = window[k] * held[s][k];
        im[k] = s + 1 < count ? window[k] * held[s + 1][k] : 0;
      }
      transform.forward(re, im);
      addPowers(sums[s], sums[s + 1]);
    }
    averages++;
  }

  /** Parts the packed spectrum into those of its two real signals and adds their powers. */
  function addPowers(first: Float64Array, second: Float64Array | undefined): void {
    for (let p = 0; p < segment; p++) {
      const f = frequencyAt(p, segment);
      if (f > segment / 2) continue;
      const q = conjugatePlace(p);
      const evenRe = 0.5 * (re[p] + re[q]);
      const evenIm = 0.5 * (im[p] - im[q]);
      first[f] += evenRe * evenRe + evenIm * evenIm;
      if (second === undefined) continue;
      const oddRe = 0.5 * (im[p] + im[q]);
      const oddIm = 0.5 * (re[q] - re[p]);
      second[f] += oddRe * oddRe + oddIm * oddIm;
    }
  }

  return {
    get averages() {
      return averages;
    },
    gap() {
      filled = 0;
    },
    push(signals) {
      const length = signals[0].length;
      for (let start = 0; start < length; ) {
        const take = Math.min(segment - filled, length - start);
        for (let s = 0; s < count; s++) held[s].set(signals[s].subarray(start, start + take), filled);
        filled += take;
        start += take;
        if (filled === segment) {
          addSegment();
          for (const samples of held) samples.copyWithin(0, segment / 2);
          filled = segment / 2;
        }
      }
    },
    densities() {
      let energy = 0;
      for (const value of window) energy += value * value;
      const unit = averages === 0 ? 0 : 1 / (averages * sampleRate * energy);
      return sums.map((sum) => sum.map((power, f) => power * unit * (f === 0 || f === segment / 2 ? 1 : 2)));
    },
  };
}
