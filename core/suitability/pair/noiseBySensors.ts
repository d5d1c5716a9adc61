import { type CrossSpectra, effectiveAverages } from '../../spectra/crossSpectra';
import { ordinaryCoherence, significance } from './coherence';

/** Two inputs with at least this coherence, weighted by power, may be sensors of one quantity. */
const sameQuantity = 0.8;

/**
 * Sensors of one quantity close the triangle of phases with the desired signal: `arg S_12 + arg S_2d - arg S_1d` is 0.
 * The noise of each cancels to first order; what is left has the variance `(ν_1ν_2 + ν_1ν_d + ν_2ν_d)/(2n)`, with ν the
 * noise of each over its signal. Five times that, or a thousandth of a radian, is more than chance: each input then has
 * a path of its own.
 */
const openness = 5;
const leastOpenness = 1e-6;

/**
 * Share of noise in each input that has a second sensor of the same quantity beside it: with noises that have nothing
 * to do with each other, the signal's power in sensor 1 is `|S_12| |S_1d| / |S_2d|` (three-channel correlation;
 * Sleeman, van Wettum & Trampert, Bull. Seismol. Soc. Am. 96, 2006, from memory).
 */
export function sensorEvidence(spectra: CrossSpectra): { input: number; share: number }[] {
  const inputs = spectra.signals - 1;
  const found: { input: number; share: number }[] = [];
  for (let r = 0; r < inputs; r++) {
    for (let s = 0; s < inputs; s++) {
      if (r === s || found.some(({ input }) => input === r)) continue;
      const share = shareOf(spectra, r, s);
      if (share !== null) found.push({ input: r, share });
    }
  }
  return found;
}

/** Of input r beside input s; null where they are not sensors of one quantity. */
function shareOf(spectra: CrossSpectra, r: number, s: number): number | null {
  const { between, signals } = spectra;
  const averages = effectiveAverages(spectra);
  const [own, other, desired] = [r, s, signals - 1].map((i) => between[i][i].re);
  const pair = between[Math.min(r, s)][Math.max(r, s)];
  const one = between[r][signals - 1];
  const two = between[s][signals - 1];
  const coherence = ordinaryCoherence(spectra, r, s);
  const shown = [r, s].map((i) => ordinaryCoherence(spectra, i, signals - 1));
  const point = significance(1, averages);
  let total = 0;
  let related = 0;
  let weight = 0;
  let open = 0;
  let chance = 0;
  let looked = 0;
  let signal = 0;
  for (let f = 1; f < own.length - 1; f++) {
    total += own[f];
    related += own[f] * coherence[f];
    // Where the desired signal shows nothing of a sensor, the triangle shows nothing either.
    if (shown.some((row) => row[f] <= point) || coherence[f] <= point) continue;
    const [ab, ad, bd] = [pair, one, two].map(({ re, im }) => Math.sqrt(re[f] * re[f] + im[f] * im[f]));
    // Imaginary part of S_rs S_sd conj(S_rd), as a share of its size: the sine of the open angle.
    const turned = r < s ? pair.im[f] : -pair.im[f];
    const re = pair.re[f] * two.re[f] - turned * two.im[f];
    const im = turned * two.re[f] + pair.re[f] * two.im[f];
    const sine = (im * one.re[f] - re * one.im[f]) / (ab * ad * bd);
    const [a, b, d] = [
      (own[f] * bd) / (ab * ad) - 1,
      (other[f] * ad) / (ab * bd) - 1,
      (desired[f] * ab) / (ad * bd) - 1,
    ].map((noise) => Math.max(0, noise));
    weight += ab;
    open += ab * sine * sine;
    chance += (ab * (a * b + a * d + b * d)) / (2 * averages);
    looked += own[f];
    signal += (ab * ad) / bd;
  }
  const closed = open <= openness * chance + leastOpenness * weight;
  const same = weight > 0 && closed && related >= sameQuantity * total;
  return same ? Math.max(0, 1 - signal / looked) : null;
}
