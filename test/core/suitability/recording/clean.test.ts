import { describe, expect, it } from 'vitest';
import { muLawValues } from '../../../../core/recordings/wav/g711';
import { normals, seededUniform } from '../../../support/random';
import {
  binary,
  codesOf,
  lagged,
  pcm,
  printed,
  quantised,
  resonant,
  scaled,
  signal,
  sluggish,
  steps,
  sum,
} from './signals';

// No check cries wolf: none of these has a fault, whatever the seed.

const N = 24_000;
const seeds = 20;
const tau = 2 * Math.PI;
const random = (seed: number, from: number, to: number) => from + (to - from) * seededUniform(seed)();
/** A frequency in cycles a sample, never a simple fraction. */
const turn = (seed: number, from: number, to: number) => tau * random(seed + 7000, from, to);
const sine = (seed: number, from = 0.0005, to = 0.2) => {
  const w = turn(seed, from, to);
  const phase = random(seed + 900, 0, tau);
  return signal(N, (n) => Math.sin(w * n + phase));
};
const noisySine = (seed: number) => sum(sine(seed), scaled(normals(seed, N), 0.01));
/** A walk within bounds: slow, of random form. */
const drift = (seed: number, counts: number) =>
  scaled(lagged(lagged(sluggish(seed, N, 0.9995), 0.99), 0.99), counts);
const near = (x: Float64Array, table: Float64Array) => {
  const sorted = Float64Array.from(table).sort();
  return x.map((value) =>
    sorted.reduce((best, level) => (Math.abs(level - value) < Math.abs(best - value) ? level : best)),
  );
};
const muLaw = (x: Float64Array) =>
  near(
    x.subarray(0, 12_000),
    muLawValues().map((value) => value / 32768),
  );

type Traits = { pcm?: boolean; bits?: number; rate?: number | null };
const pcm16: Traits = { pcm: true, bits: 16 };

const families: [string, (seed: number) => Float64Array, Traits?][] = [
  ['white noise', (s) => normals(s, N)],
  ['white noise, PCM 16 bit', (s) => pcm(scaled(normals(s, N), 0.1)), pcm16],
  ['white noise, whole numbers', (s) => quantised(scaled(normals(s, N), 30), 1)],
  ['uniform noise', (s) => signal(N, seededUniform(s))],
  ['uniform noise of 100 levels', (s) => steps(s, N, (u) => Math.floor(100 * u()) - 50, 1)],
  ['noise printed with 3 digits', (s) => printed(normals(s, N), 3)],
  ['coloured noise', (s) => resonant(s, N, 0.97, turn(s, 0.01, 0.4))],
  ['coloured noise, PCM 16 bit', (s) => pcm(scaled(resonant(s, N, 0.99, turn(s, 0.001, 0.4)), 0.1)), pcm16],
  [
    'coloured noise, whole numbers',
    (s) => quantised(scaled(resonant(s, N, 0.95, turn(s, 0.01, 0.4)), 40), 1),
  ],
  ['a random walk within bounds', (s) => sluggish(s, N, 0.999)],
  ['a random walk within bounds, whole numbers', (s) => quantised(scaled(sluggish(s, N, 0.99), 200), 1)],
  ['a sine', (s) => sine(s)],
  ['a slow sine at full scale, PCM 16 bit', (s) => pcm(scaled(sine(s, 0.0001, 0.002), 32767 / 32768)), pcm16],
  ['a sine at full scale, PCM 16 bit', (s) => pcm(scaled(sine(s), 32767 / 32768)), pcm16],
  ['a sine at full scale, PCM 8 bit', (s) => pcm(scaled(sine(s), 127 / 128), 8), { pcm: true, bits: 8 }],
  ['a sine of whole periods', (s) => signal(N, (n) => Math.sin((tau * (n % (16 + s))) / (16 + s)))],
  [
    'a sine of whole periods, single precision',
    (s) => signal(N, (n) => Math.fround(Math.sin((tau * (n % (48 + s))) / (48 + s)))),
  ],
  ['a sine printed with 4 digits', (s) => printed(scaled(sine(s), random(s, 0.9, 9)), 4)],
  ['a slow sine printed with 3 digits', (s) => printed(scaled(sine(s, 0.0003, 0.003), random(s, 0.9, 2)), 3)],
  ['a noisy sine, hundredths', (s) => quantised(scaled(noisySine(s), 5), 0.01)],
  ['a sine of 100 counts', (s) => quantised(scaled(sine(s), 100), 1)],
  ['a sine in µ-law', (s) => muLaw(scaled(sine(s, 0.001, 0.1), random(s, 0.3, 0.9))), { pcm: true }],
  ['noise in µ-law', (s) => muLaw(scaled(resonant(s, N, 0.98, turn(s, 0.01, 0.1)), 0.1)), { pcm: true }],
  ['a sweep', (s) => signal(N, (n) => Math.sin(turn(s, 0.1, 0.2) * n * (n / N)))],
  ['slow drift, whole numbers', (s) => quantised(drift(s, 300), 1)],
  [
    'slow drift with noise of a fifth of a count',
    (s) => quantised(sum(drift(s, 300), scaled(normals(s, N), 0.2)), 1),
  ],
  [
    'slow drift with noise of half a count',
    (s) => quantised(sum(drift(s, 300), scaled(normals(s, N), 0.5)), 1),
  ],
  ['slow drift with noise of two counts', (s) => quantised(sum(drift(s, 300), scaled(normals(s, N), 2)), 1)],
  ['slow drift in hundredths', (s) => quantised(drift(s, 1), 0.01)],
  [
    'something that settles',
    (s) =>
      quantised(
        signal(N, (n) => 200 * Math.exp(-n / random(s, 50, 5000)) - (200 * random(s, 50, 5000)) / N),
        1,
      ),
  ],
  ['a binary sequence', (s) => binary(s, N, random(s, 0.1, 9), 4, 40)],
  ['a binary sequence, one sample a chip', (s) => binary(s, N, 1, 1)],
  ['a binary sequence, three samples a chip', (s) => binary(s, N, 0.7, 3)],
  ['a binary sequence of 0 and 1', (s) => binary(s, N, 0.5, 5, 60).map((value) => value + 0.5)],
  ['a binary sequence at full scale, PCM 16 bit', (s) => pcm(binary(s, N, 1, 2, 20)), pcm16],
  ['a binary sequence at 12 bit', (s) => binary(s, N, 2047.5, 2, 20).map((value) => value - 0.5)],
  [
    'a lagged binary sequence',
    (s) => quantised(lagged(binary(s, N, 5, 10, 40), random(s, 0.05, 0.9)), 0.001),
  ],
  [
    'a lagged binary sequence, PCM 16 bit',
    (s) => pcm(lagged(binary(s, N, 0.5, 10, 40), random(s, 0.05, 0.9))),
    pcm16,
  ],
  [
    'a noisy binary sequence',
    (s) => quantised(sum(binary(s, N, 3, 5, 30), scaled(normals(s, N), 0.02)), 0.01),
  ],
  [
    'a binary sequence with a sample in each edge',
    (s) => {
      const u = seededUniform(s);
      const x = binary(s, N, 1, 4, 40);
      return x.map((value, n) => (n > 0 && value !== x[n - 1] ? 2 * u() - 1 : value));
    },
  ],
  ['a square wave', (s) => signal(N, (n) => (n % (20 + s) < 10 + s / 2 ? 2 : -2))],
  ['a ternary sequence', (s) => steps(s, N, (u) => Math.floor(3 * u()) - 1, 1, 20)],
  ['steps between eleven levels', (s) => steps(s, N, (u) => 0.3 + Math.floor(11 * u()) / 20 - 0.55, 3, 40)],
  ['steps between eleven whole levels', (s) => steps(s, N, (u) => Math.floor(11 * u()) - 5, 3, 40)],
  ['random levels, each twice', (s) => steps(s, N, (u) => 2 * u() - 1, 2)],
  ['a slow channel repeated ten times', (s) => steps(s, N, (u) => Math.round(1000 * (u() - 0.5)), 10)],
  ['a triangle', (s) => signal(N, (n) => Math.abs((n % (200 + s)) - 100 - s / 2) - 50)],
  ['a counter that wraps', (s) => signal(N, (n) => (Math.floor(n * random(s, 0.3, 30)) % 4096) - 2048)],
  [
    'trapezoids',
    (s) => signal(N, (n) => Math.max(-1, Math.min(1, 3 * (Math.abs((((n / (300 + s)) % 1) - 0.5) * 4) - 1)))),
  ],
  ['a rectified sine', (s) => sine(s).map((value) => Math.abs(value) - 0.5)],
  [
    'noise between digital silence',
    (s) => normals(s, N).map((value, n) => (n < 2000 || n > 20_000 ? 0 : value)),
  ],
  ['noise bursts', (s) => normals(s, N).map((value, n) => (n % 4000 < 2000 + s ? value : 0))],
  [
    'noise with a fraction of a count beside zero',
    (s) => scaled(quantised(scaled(normals(s, N), 60), 1), 0.1),
  ],
  ['single precision noise', (s) => normals(s, N).map(Math.fround)],
  ['a decaying resonance', (s) => signal(N, (n) => Math.exp(-n / 3000) * Math.sin(turn(s, 0.01, 0.1) * n))],
  ['pulses from zero', (s) => steps(s, N, (u) => (u() < 0.1 ? 1 + u() : 0), 4, 12)],
];

describe('a clean recording of', () => {
  it.each(families)('%s has no findings', async (_, make, traits = {}) => {
    for (let seed = 1; seed <= seeds; seed++) {
      const { rate = 1000, ...rest } = traits;
      expect(await codesOf([make(seed)], rate, rest), `seed ${seed}`).toEqual([]);
    }
  });
});
