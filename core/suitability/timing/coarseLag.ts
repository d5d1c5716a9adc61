import type { Interval } from '../../pair/intervals';
import type { SignalReader } from '../../pair/signals';
import { newSpectrum } from '../../statistics/blockSpectra';
import { conjugatePlace, transformOf } from '../../statistics/transform';

/** Where the phase correlation of one window has its peak. */
export interface CoarsePeak {
  /** Middle of the window, in samples. */
  at: number;
  /** Whole samples by which the desired signal follows the input. */
  lag: number;
  /** Height of the peak in standard deviations of what unrelated signals give. */
  height: number;
  /** The next peak apart from it, as a share of it: near 1 where the lag could as well be another. */
  rival: number;
}

/**
 * Peaks that unrelated signals reach: the largest of S normal values exceeds √(2 ln(S/α)) with probability below α;
 * 6.5 holds for S up to 2^18 and α = 1e-4.
 */
export const coarseThreshold = 6.5;

/** Nearer peaks belong to the path; a repeating input has its next one further off. */
const apart = 16;

/** Bins below this share of the strongest hold what leaks from others, whatever the window. */
const floor = 1e-9;

/**
 * Whole-sample lag within ±1.5 windows by cross-correlation with phase transform (Knapp & Carter, IEEE Trans. ASSP 24,
 * 1976) of one window of the input against four times as much of the desired signal.
 * @param read of one input and the desired signal, delay 0, zero outside the interval that holds the window
 * @param window a power of two long
 * @param bounds the interval that holds the window
 */
export async function coarseLag(read: SignalReader, window: Interval, bounds: Interval): Promise<CoarsePeak> {
  const width = window.to - window.from;
  const size = 4 * width;
  const start = window.from - 1.5 * width;
  const packed = newSpectrum(size);
  const { desired } = await read(start, start + size);
  const { inputs } = await read(window.from, window.to);
  const from = Math.max(0, bounds.from - start);
  const to = Math.max(from, Math.min(size, bounds.to - start));
  packed.re.set(tapered(inputs[0]), 1.5 * width);
  const late = tapered(desired.subarray(from, to));
  packed.im.set(late, from);
  const { re, im } = packed;
  const transform = transformOf(size);
  transform.forward(re, im);
  const bins = late.every((value) => value === 0) ? 0 : keepPhases(re, im);
  transform.inverse(re, im);

  const reach = 1.5 * width;
  const at = (lag: number) => Math.abs(re[lag < 0 ? lag + size : lag]);
  let best = 0;
  for (let lag = -reach; lag <= reach; lag++) if (at(lag) > at(best)) best = lag;
  let rival = 0;
  for (let lag = -reach; lag <= reach; lag++) {
    if (Math.abs(lag - best) > apart) rival = Math.max(rival, at(lag));
  }
  return {
    at: window.from + width / 2,
    lag: best,
    height: bins === 0 ? 0 : (at(best) * size) / Math.sqrt(bins),
    rival: bins === 0 ? 1 : rival / at(best),
  };
}

/** Puts the phases of conj(X) D in place of the packed spectra of x and d; returns how many bins have one. */
function keepPhases(re: Float64Array, im: Float64Array): number {
  const size = re.length;
  const crossRe = new Float64Array(size);
  const crossIm = new Float64Array(size);
  let largest = 0;
  for (let p = 0; p < size; p++) {
    const q = conjugatePlace(p);
    const xRe = re[p] + re[q];
    const xIm = im[p] - im[q];
    const dRe = im[p] + im[q];
    const dIm = re[q] - re[p];
    crossRe[p] = xRe * dRe + xIm * dIm;
    crossIm[p] = xRe * dIm - xIm * dRe;
    largest = Math.max(largest, crossRe[p] * crossRe[p] + crossIm[p] * crossIm[p]);
  }
  let bins = 0;
  for (let p = 0; p < size; p++) {
    const square = crossRe[p] * crossRe[p] + crossIm[p] * crossIm[p];
    // The square of a product of two amplitudes: the floor of a power, squared.
    const kept = square > floor * floor * largest;
    if (kept) bins++;
    const scale = kept ? 1 / Math.sqrt(square) : 0;
    re[p] = crossRe[p] * scale;
    im[p] = crossIm[p] * scale;
  }
  return bins;
}

/**
 * First differences under a taper, of largest value 1: all of it keeps the lag; the differences hold down what a slow
 * drift would leak into the other bins. The taper rises as t²(3 - 2t) over the first and last eighth.
 */
function tapered(samples: Float64Array): Float64Array {
  const last = samples.length - 1;
  const rise = Math.max(1, samples.length / 8);
  let largest = 0;
  const shaped = samples.map((value, k) => {
    const t = Math.min(1, k / rise, (last - k) / rise);
    const shaded = k === 0 ? 0 : (value - samples[k - 1]) * t * t * (3 - 2 * t);
    largest = Math.max(largest, Math.abs(shaded));
    return shaded;
  });
  return largest > 0 ? shaped.map((value) => value / largest) : shaped;
}
