import { sineOfTurns } from '../statistics/turns';

/** A linear-phase filter that passes one band; its gain is between 0 and 1. */
export interface BandFilter {
  /** Symmetric, an odd number of them. */
  taps: Float64Array;
  /** Samples of history that it needs: one less than its taps. */
  history: number;
}

/** Why a band cannot be filtered; frequencies in Hz. */
export type BandRefusal =
  | { code: 'band-beyond-rate'; limit: number }
  /** The narrowest transition that can be had, and what asks for a narrower one. */
  | { code: 'band-too-narrow'; taps: number; limit: number; what: string };

/**
 * Attenuation of the stop bands. The floor under the weighting (see `gatherBandSums`) is 1e-4 of the raw power, so that
 * what passes a stop band (1e-8, 80 dB) is nothing beside it; the rule for the length misses by up to 1 dB.
 */
const attenuationDb = 82;

/** Taps at most: beyond that a second of history at audio rates would be lost at the start of each interval. */
const mostTaps = 16385;

/** Share of the band's width over which its gain rises or falls; half of it lies inside. */
const steepness = 0.25;

/**
 * A windowed sinc: half the gain at the band's edges, gain 1 within 1e-4 inside. The transition takes a quarter of the
 * band's width, and no more than reaches to 0 Hz or to half the sample rate (Kaiser's window and his rule for its length:
 * "Nonrecursive digital filter design using the I0-sinh window function", 1974, from memory). Only + - * / and square
 * roots: the same bits everywhere. A band of all frequencies takes one tap.
 * @param band in Hz; 0 and half the sample rate have no edge
 * @param sampleRate in Hz
 */
export function bandFilter(band: { from: number; to: number }, sampleRate: number): BandFilter | BandRefusal {
  const limit = sampleRate / 2;
  if (band.to > limit) return { code: 'band-beyond-rate', limit };
  const low = band.from / sampleRate;
  const high = band.to / sampleRate;
  const asks = [
    { what: 'its width', transition: steepness * (high - low) },
    { what: 'its lower edge, so close to 0 Hz,', transition: low > 0 ? 2 * low : 1 },
    { what: 'its upper edge, so close to half the sample rate,', transition: high < 0.5 ? 1 - 2 * high : 1 },
  ];
  const { what, transition } = asks.reduce((a, b) => (b.transition < a.transition ? b : a));
  const whole = low === 0 && high === 0.5;
  const half = whole ? 0 : Math.ceil((attenuationDb - 7.95) / (14.36 * transition) / 2);
  if (2 * half + 1 > mostTaps) return { code: 'band-too-narrow', taps: 2 * half + 1, limit: mostTaps, what };
  const taps = new Float64Array(2 * half + 1);
  taps[half] = 2 * (high - low);
  for (let j = 1; j <= half; j++) {
    const ideal = (sineOfTurns(high * j) - sineOfTurns(low * j)) / (Math.PI * j);
    taps[half - j] = ideal * kaiser(j / half);
    taps[half + j] = taps[half - j];
  }
  return { taps, history: 2 * half };
}

const shape = 0.1102 * (attenuationDb - 8.7);

/** Kaiser's window for this attenuation, at a share 0..1 of its half width. */
function kaiser(place: number): number {
  return bessel(shape * Math.sqrt(1 - place * place)) / bessel(shape);
}

/** I0 by its power series, whose terms are all positive; 40 terms are enough far beyond the arguments here. */
function bessel(x: number): number {
  let term = 1;
  let sum = 1;
  for (let k = 1; k <= 40; k++) {
    term *= (x * x) / (4 * k * k);
    sum += term;
  }
  return sum;
}
