import type { PairSpectra } from './pairSpectra';

/**
 * Bins whose phase says something about the lag: both signals have energy of their own there, and they belong
 * together beyond chance.
 */
export interface TrustedBins {
  /** Bin numbers. */
  bins: number[];
  segment: number;
}

/** Standard normal point of 1 %: one unrelated bin in a hundred is let through, which the peak's own test bears. */
const z = 2.326;

/** Bins on either side from which leakage is counted one by one. */
const reach = 32;

/**
 * Bins 50 dB below the strongest tenth of all are left out: there the recorders' own filters turn the phase. Tenths,
 * since single lines may stand far above all that is of use.
 */
const weak = 1e-5;

/** Beyond them the Hann window leaks 1e-10 of a line's power at most; ten lines of the strongest are allowed for. */
const floor = 1e-9;

/**
 * A bin counts where its mean coherence over the windows exceeds the 1 % point of unrelated signals and neither signal
 * can be explained by what the Hann window leaks from neighbours: for a line spectrum the phases between the lines
 * are those of the lines and no evidence of their own.
 */
export function trustedBins(windows: readonly PairSpectra[]): TrustedBins {
  const { segment } = windows[0];
  const half = segment / 2;
  const input = new Float64Array(half + 1);
  const desired = new Float64Array(half + 1);
  const coherence = new Float64Array(half + 1);
  for (const window of windows) {
    for (let f = 0; f <= half; f++) {
      const square = window.crossRe[f] * window.crossRe[f] + window.crossIm[f] * window.crossIm[f];
      input[f] += window.input[f];
      desired[f] += window.desired[f];
      if (square > 0) coherence[f] += square / (window.input[f] * window.desired[f]) / windows.length;
    }
  }
  const threshold = chanceCoherence(windows[0].averages, windows.length);
  const inputLeak = leakage(input);
  const desiredLeak = leakage(desired);
  const bins: number[] = [];
  // The differences leave nothing in bin 0, and the last bin has no phase.
  for (let f = 1; f < half; f++) {
    if (coherence[f] > threshold && input[f] > inputLeak[f] && desired[f] > desiredLeak[f]) bins.push(f);
  }
  return { bins, segment };
}

/**
 * 1 % point of the mean over w windows of the coherence of unrelated signals. One window's is about exponential with
 * mean 1/n (n independent averages: Carter, Knapp & Nuttall, IEEE Trans. Audio Electroacoust. 21, 1973), so that the
 * mean is gamma distributed; its point by Cornish & Fisher's expansion.
 */
function chanceCoherence(averages: number, windows: number): number {
  // Half-overlapped Hann segments count as n/1.056 independent ones (Welch 1967).
  const independent = averages / 1.056;
  return (1 + z / Math.sqrt(windows) + (z * z - 1) / (3 * windows)) / independent;
}

/**
 * What a bin of a spectrum with Hann window must exceed: an upper bound of its neighbours' energy in it, and the floors.
 */
function leakage(power: Float64Array): Float64Array {
  const last = power.length - 1;
  const kernel = Float64Array.from({ length: reach + 1 }, (_, m) => {
    // Envelope of the window's response at m bins, 1/(π m (m² - 1)), squared; a line between two bins stands half a
    // bin nearer than it looks, which at m = 2 still is its main lobe.
    if (m < 2) return 0;
    const near = m - 0.5;
    const amplitude = 1 / (Math.PI * near * (near * near - 1));
    return amplitude * amplitude;
  });
  const sorted = power.slice().sort();
  const least = floor * sorted[last] + weak * sorted[Math.floor(0.9 * last)];
  return power.map((_, f) => {
    let sum = least;
    for (let m = 2; m <= reach; m++) {
      // Spectra of real signals continue mirrored at both ends.
      sum += kernel[m] * (power[Math.abs(f - m)] + power[f + m > last ? 2 * last - f - m : f + m]);
    }
    return sum;
  });
}
