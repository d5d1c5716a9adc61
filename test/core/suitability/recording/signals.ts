import type { Finding } from '../../../../core/findings/finding';
import type { Recording } from '../../../../core/recordings/recording';
import { surveyRecording } from '../../../../core/suitability/recording/surveyRecording';
import { normals, seededUniform } from '../../../support/random';
import { pace, recordingOf } from '../../../support/takes';

// Signals of known truth, all made by seeded generators.

export type Draw = () => number;

/** Findings of one recording, its channels in memory. */
export async function survey(
  channels: readonly Float64Array[],
  sampleRate: number | null = 1000,
  traits: Partial<Pick<Recording, 'pcm' | 'bits'>> = {},
): Promise<Finding[]> {
  const recording = { ...recordingOf(channels, sampleRate), ...traits };
  return (await surveyRecording(recording, {}, pace)).findings;
}

export async function codesOf(...given: Parameters<typeof survey>): Promise<string[]> {
  return (await survey(...given)).map(({ code }) => code);
}

/** The one finding of a code; fails where there are none or several. */
export function only(findings: readonly Finding[], code: string): Finding {
  const own = findings.filter((found) => found.code === code);
  if (own.length !== 1) throw new Error(`${own.length} findings of ${code} among ${findings.length}`);
  return own[0];
}

export function signal(length: number, at: (n: number) => number): Float64Array {
  return Float64Array.from({ length }, (_, n) => at(n));
}

export const quantised = (x: Float64Array, step: number) => x.map((value) => step * Math.round(value / step));

/** As PCM of so many bits, rounded and limited to what it can hold. */
export function pcm(x: Float64Array, bits = 16): Float64Array {
  const half = 2 ** (bits - 1);
  return x.map((value) => Math.max(-half, Math.min(half - 1, Math.round(value * half))) / half);
}

export const limited = (x: Float64Array, limit: number) =>
  x.map((value) => Math.max(-limit, Math.min(limit, value)));

/** White noise through `1 / (1 - 2 r cos(turn) z^-1 + r² z^-2)`, brought to unit variance; r = turn = 0: white. */
export function resonant(seed: number, length: number, r: number, turn: number): Float64Array {
  const noise = normals(seed, length + 2000);
  const out = new Float64Array(length + 2000);
  for (let n = 2; n < out.length; n++) {
    out[n] = noise[n] + 2 * r * Math.cos(turn) * out[n - 1] - r * r * out[n - 2];
  }
  return toUnitPower(out.subarray(2000));
}

/** First-order low-pass of white noise, of unit variance. */
export function sluggish(seed: number, length: number, pole: number): Float64Array {
  const noise = normals(seed, length);
  const out = new Float64Array(length);
  for (let n = 1; n < length; n++) out[n] = pole * out[n - 1] + noise[n];
  return toUnitPower(out);
}

export function toUnitPower(x: Float64Array): Float64Array {
  const rms = Math.sqrt(x.reduce((sum, value) => sum + value * value, 0) / x.length);
  return x.map((value) => value / rms);
}

/** Random levels from `choose`, each held for a random number of samples from `shortest` to `longest`. */
export function steps(
  seed: number,
  length: number,
  choose: (uniform: Draw) => number,
  shortest: number,
  longest = shortest,
): Float64Array {
  const uniform = seededUniform(seed);
  const out = new Float64Array(length);
  for (let n = 0; n < length; ) {
    const hold = shortest + Math.floor(uniform() * (longest - shortest + 1));
    out.fill(choose(uniform), n, Math.min(length, n + hold));
    n += hold;
  }
  return out;
}

/** A binary sequence of ±size. */
export function binary(seed: number, length: number, size: number, shortest: number, longest = shortest) {
  return steps(seed, length, (uniform) => (uniform() < 0.5 ? -size : size), shortest, longest);
}

/** First-order lag: what is left of a step after one sample is `pole`. */
export function lagged(x: Float64Array, pole: number): Float64Array {
  let y = x[0];
  return x.map((value) => {
    y = pole * y + (1 - pole) * value;
    return y;
  });
}

export function sum(...signals: Float64Array[]): Float64Array {
  return signal(signals[0].length, (n) => signals.reduce((all, x) => all + x[n], 0));
}

export const scaled = (x: Float64Array, by: number) => x.map((value) => value * by);

/** Every sample to so many significant digits, as loggers print them. */
export const printed = (x: Float64Array, digits: number) =>
  x.map((value) => Number(value.toPrecision(digits)));
