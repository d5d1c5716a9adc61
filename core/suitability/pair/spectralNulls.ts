import { powerDecibels } from '../../figures/decibels';
import { type CrossSpectra, effectiveAverages, frequenciesOf } from '../../spectra/crossSpectra';
import { type Band, bandsWhere, smooth } from './bands';

/** Where the path from the desired signal to the inputs lets so little through that it cannot be restored. */
export interface SpectralNulls {
  bands: Band[];
  /** Rise of the noise, in dB, that restoring the deepest would cost; 0 where there is none. */
  riseDb: number;
}

/**
 * Restoring may raise the noise by this much in a band (20 dB, ten times the amplitude; common practice) against where
 * the path lets half of the desired signal's power through.
 */
export const largestRiseDb = 20;
const deepest = 0.01;

/** Below this share of its peak the desired signal does not show the path (60 dB, as for {@link excitationOf}). */
const belowPeak = 1e-6;

/**
 * By the response `S_dx / S_dd` from the desired signal to each input, which noise on the input does not shrink; freed
 * of the power `(1-γ²) S_xx / (n S_dd)` that chance adds. Where there are several inputs, each relative to itself, the
 * strongest counts. Taken over half of what a filter's taps can part.
 * @param length M
 */
export function spectralNulls(spectra: CrossSpectra, length: number): SpectralNulls {
  const inputs = spectra.signals - 1;
  const width = Math.max(3, Math.floor(spectra.segment / (2 * length)));
  const desired = spectra.between[inputs][inputs].re;
  const gains = Array.from({ length: inputs }, (_, r) => relativeGains(spectra, r, width));
  const peak = desired.reduce((most, power) => Math.max(most, power), 0);
  let least = 1;
  const low = desired.map((power, f) => {
    // The bin at 0 holds what the removal of the mean has left.
    if (f === 0 || !(power > belowPeak * peak)) return 0;
    const gain = gains.reduce((most, own) => Math.max(most, own[f]), 0);
    if (gain >= deepest) return 0;
    least = Math.min(least, gain);
    return 1;
  });
  const bands = bandsWhere(low, frequenciesOf(spectra), 2);
  return { bands, riseDb: bands.length === 0 ? 0 : -powerDecibels(least) };
}

/** |G|² of the path to one input, over `width` bins, relative to what half of the desired signal's power passes by. */
function relativeGains(spectra: CrossSpectra, r: number, width: number): Float64Array {
  const { between, signals } = spectra;
  const averages = effectiveAverages(spectra);
  const desired = between[signals - 1][signals - 1].re;
  const input = between[r][r].re;
  const { re, im } = between[r][signals - 1];
  const over = (power: number, value: number) => (power > 0 ? value / power : 0);
  const measured = desired.map((power, f) => over(power * power, re[f] * re[f] + im[f] * im[f]));
  const chance = desired.map((power, f) => Math.max(0, over(power, input[f]) - measured[f]) / averages);
  const [gains, floors] = [measured, chance].map((row) => smooth(row, width));
  const middle = weightedMedian(gains, desired);
  return gains.map((gain, f) => (middle > 0 ? Math.max(gain - floors[f], floors[f]) / middle : 1));
}

function weightedMedian(values: Float64Array, weights: Float64Array): number {
  const order = Array.from(values.keys()).sort((a, b) => values[a] - values[b]);
  const half = 0.5 * weights.reduce((sum, weight) => sum + weight, 0);
  let sum = 0;
  for (const k of order) {
    sum += weights[k];
    if (sum >= half) return values[k];
  }
  return 0;
}

/** Noise gain Σw² of each input's filter: the power that white noise of power 1 on that input makes at the output. */
export function noiseGains(coefficients: readonly Float64Array[]): number[] {
  return coefficients.map((row) => row.reduce((sum, w) => sum + w * w, 0));
}
