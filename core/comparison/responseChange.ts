import { powerDecibels } from '../figures/decibels';
import { frequencyResponse } from '../figures/frequencyResponse';
import type { AlignedTaps } from './alignTaps';

/** How the frequency responses of two filters differ. */
export interface ResponseChange {
  /** Largest |H_after - H_before| over all frequencies and inputs, in dB relative to the largest |H_before|. */
  differenceDb: number;
  /** Where that is, in Hz. */
  differenceAt: number;
  /** Largest change of magnitude in dB, its sign kept, where the response was within 20 dB of its peak. */
  magnitudeDb: number;
  magnitudeAt: number;
}

const points = 513;

/** Below this share of the peak's power (20 dB) a change of magnitude in dB says little (common practice). */
const floor = 1e-2;

/** Compares at 513 frequencies from 0 Hz to half the sample rate. */
export function responseChange(taps: readonly AlignedTaps[], sampleRate: number): ResponseChange {
  const change = {
    differenceDb: Number.NEGATIVE_INFINITY,
    differenceAt: 0,
    magnitudeDb: 0,
    magnitudeAt: 0,
  };
  const hertz = (i: number) => (i * sampleRate) / (2 * (points - 1));
  const rows = taps.map(({ before, after }) => ({
    before: powers(before),
    after: powers(after),
    difference: powers(after.map((w, k) => w - before[k])),
  }));
  const peak = Math.max(...rows.map(({ before }) => before.reduce((most, p) => Math.max(most, p), 0)));
  let largest = -1;
  for (const { before, after, difference } of rows) {
    for (let i = 0; i < points; i++) {
      if (difference[i] > largest) {
        largest = difference[i];
        change.differenceDb = powerDecibels(difference[i] / peak);
        change.differenceAt = hertz(i);
      }
      const ratio = powerDecibels(after[i] / before[i]);
      if (before[i] >= floor * peak && Math.abs(ratio) > Math.abs(change.magnitudeDb)) {
        change.magnitudeDb = ratio;
        change.magnitudeAt = hertz(i);
      }
    }
  }
  return change;
}

function powers(row: Float64Array): Float64Array {
  const { real, imaginary } = frequencyResponse(row, points);
  return real.map((re, i) => re * re + imaginary[i] * imaginary[i]);
}
