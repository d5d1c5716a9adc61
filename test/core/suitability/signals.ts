import type { PairingDocument } from '../../../core/document/pairingDocument';
import type { Take } from '../../../core/pair/take';
import type { Recording } from '../../../core/recordings/recording';
import { normals } from '../../support/random';
import { recordingOf } from '../../support/takes';

// Signals whose lag, drift and response are known because they were made so.

/** x at the times `at(n)`, by a sinc under (1 - u²)² over ±24 samples; zero outside x. */
export function resampled(x: Float64Array, count: number, at: (n: number) => number): Float64Array {
  const half = 24;
  return Float64Array.from({ length: count }, (_, n) => {
    const time = at(n);
    const first = Math.floor(time) - half + 1;
    // sin(π(time - k)) only turns its sign from k to k + 1.
    const sine = Math.sin(Math.PI * (time - first));
    let sum = 0;
    for (let i = 0; i < 2 * half; i++) {
      const k = first + i;
      if (k < 0 || k >= x.length) continue;
      const away = time - k;
      const rest = 1 - (away / half) * (away / half);
      const sinc = Math.abs(away) < 1e-9 ? 1 : (i % 2 === 0 ? sine : -sine) / (Math.PI * away);
      sum += sinc * rest * rest * x[k];
    }
    return sum;
  });
}

const raised = (angle: number) => 0.5 + 0.5 * Math.cos(angle);

/** The same, so many samples later. */
export function later(x: Float64Array, samples: number): Float64Array {
  return resampled(x, x.length, (n) => n - samples);
}

export function withNoise(signal: Float64Array, deviation: number, seed: number): Float64Array {
  const noise = normals(seed, signal.length);
  return signal.map((value, n) => value + deviation * noise[n]);
}

/** Second-order resonance at a frequency in cycles a sample (bilinear low-pass). */
export function resonance(x: Float64Array, frequency: number, quality: number): Float64Array {
  const angle = 2 * Math.PI * frequency;
  const alpha = Math.sin(angle) / (2 * quality);
  const gain = (1 - Math.cos(angle)) / (2 * (1 + alpha));
  const a1 = (-2 * Math.cos(angle)) / (1 + alpha);
  const a2 = (1 - alpha) / (1 + alpha);
  let [x1, x2, y1, y2] = [0, 0, 0, 0];
  return x.map((value) => {
    const y = gain * (value + 2 * x1 + x2) - a1 * y1 - a2 * y2;
    [x2, x1, y2, y1] = [x1, value, y1, y];
    return y;
  });
}

/** A take whose signals are of files of their own, as recorders started separately leave them. */
export function separateFiles(inputs: readonly Float64Array[], desired: Float64Array): Take {
  const named = (file: string, samples: Float64Array): Recording => ({ ...recordingOf([samples]), file });
  return {
    name: 'take',
    inputs: inputs.map((samples, r) => ({ recording: named(`input${r}.wav`, samples), channel: 0 })),
    desired: { recording: named('desired.wav', desired), channel: 0 },
    fit: [{ from: 0, to: Math.min(desired.length, ...inputs.map((samples) => samples.length)) }],
    heldOut: [],
    disturbanceOnly: [],
  };
}

/** As much of a document as the inspection reads. */
export function documentOf(
  job: PairingDocument['job'],
  length: number,
  delay = 0,
  regularisation = 1e-6,
): PairingDocument {
  const filter = { length, delay, regularisation, windowing: 'covariance' };
  return { job, filter } as unknown as PairingDocument;
}

export function noMeans(inputs = 1) {
  return { inputs: new Array<number>(inputs).fill(0), desired: 0 };
}

/**
 * Noise up to 0.42 of the sample rate, as a recorder's anti-aliasing filter leaves it: only what is band-limited has
 * values between its samples.
 */
export function sound(seed: number, count: number): Float64Array {
  const half = 32;
  const white = normals(seed, count + 2 * half);
  const weights = Float64Array.from({ length: 2 * half + 1 }, (_, i) => {
    const k = i - half;
    const sinc = k === 0 ? 0.84 : Math.sin(0.84 * Math.PI * k) / (Math.PI * k);
    return sinc * raised((Math.PI * k) / (half + 1));
  });
  return Float64Array.from({ length: count }, (_, n) => {
    let sum = 0;
    for (let i = 0; i <= 2 * half; i++) sum += weights[i] * white[n + i];
    return sum;
  });
}
