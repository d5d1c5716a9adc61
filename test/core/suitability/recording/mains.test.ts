import { describe, expect, it } from 'vitest';
import { normals, seededUniform } from '../../../support/random';
import { codesOf, limited, only, resonant, scaled, signal, sluggish, sum, survey } from './signals';

// Truth: the amplitude of the line and the density of the noise that the generator makes. Through a Hann window a line of
// amplitude a at a bin's frequency stands at a²/2 / (1.5 Δf) (F. J. Harris, Proc. IEEE 66, 1978: noise bandwidth 1.5 bins);
// white noise of unit variance at 2 / rate.

const tau = 2 * Math.PI;
const seeds = 20;

/** A line; its frequency may be off by this part. */
function hum(length: number, rate: number, hertz: number, amplitude: number, phase = 0): Float64Array {
  return signal(length, (n) => amplitude * Math.sin((tau * hertz * n) / rate + phase));
}

describe('mains', () => {
  it.each([
    [50, 1024],
    [60, 1024],
    [50, 8192],
    [60, 2048],
  ])('finds a line of %i Hz at %i Hz and how high it stands', async (mains, rate) => {
    for (let seed = 1; seed <= seeds; seed++) {
      const length = 24 * rate;
      // From 13 dB to 19 dB.
      const amplitude = Math.sqrt(((20 + 3 * seed) * 2 * 1.5 * 2) / rate);
      const x = sum(normals(seed, length), hum(length, rate, mains, amplitude, seed));
      const { severity, values } = only(await survey([x], rate), 'mains');
      expect(severity).toBe('note');
      expect(values.mains).toBe(mains);
      const height = 10 * Math.log10(1 + 20 + 3 * seed);
      expect(Math.abs(Number(values.highest) - height)).toBeLessThan(2);
      expect(values.lines).toMatch(new RegExp(`^${mains} Hz [\\d.]+ dB$`));
    }
  });

  it('lists the harmonics, in coloured noise and a little off the frequency', async () => {
    for (let seed = 1; seed <= seeds; seed++) {
      const rate = 4000;
      const length = 20 * rate;
      const hertz = 49.9 + 0.2 * seededUniform(seed)();
      const noise = sum(resonant(seed, length, 0.8, 1), scaled(sluggish(seed + 50, length, 0.99), 0.5));
      const lines = [1, 3, 5].map((h) => hum(length, rate, h * hertz, 0.4, h));
      const found = only(await survey([sum(noise, ...lines)], rate), 'mains');
      expect(found.values.lines).toMatch(/^50 Hz [\d.]+ dB, 150 Hz [\d.]+ dB, 250 Hz [\d.]+ dB$/);
    }
  });

  it('finds it in stretches of a long recording, and in each channel that has it', async () => {
    const rate = 8000;
    const length = 500 * rate;
    const uniform = seededUniform(5);
    const noise = () => signal(length, () => uniform() - 0.5);
    const findings = await survey([noise(), sum(noise(), hum(length, rate, 60, 0.03))], rate);
    expect(findings.map(({ code, channel }) => [code, channel])).toEqual([['mains', '2']]);
  });

  it('is found beside a sample that is no number', async () => {
    const x = sum(normals(3, 20_480), hum(20_480, 1024, 50, 0.4));
    x[5000] = Number.NaN;
    expect(await codesOf([x], 1024)).toEqual(['not-finite', 'mains']);
  });

  it('is not looked for without a rate or with too few samples', async () => {
    const x = sum(normals(3, 20_480), hum(20_480, 1024, 50, 0.4));
    expect(await codesOf([x], null)).toEqual([]);
    expect(await codesOf([x.subarray(0, 2000)], 1024)).toEqual([]);
  });
});

const length = 40_000;
const wave = (hertz: number, rate: number) => hum(length, rate, hertz, 1);
const random = (seed: number, from: number, to: number) => from + (to - from) * seededUniform(seed)();

describe('mains is not', () => {
  it.each<[string, (seed: number, rate: number) => Float64Array]>([
    ['noise', (s) => normals(s, length)],
    ['coloured noise', (s) => resonant(s, length, 0.99, random(s, 0.02, 1))],
    ['a mode at 50 Hz', (s, rate) => resonant(s, length, 0.98, (tau * 50) / rate)],
    ['a sine of 50 Hz', (_, rate) => wave(50, rate)],
    ['a sine of 1 kHz in noise', (s, rate) => sum(wave(1000, rate), scaled(normals(s, length), 0.1))],
    ['a sine of 100 Hz in noise', (s, rate) => sum(wave(100, rate), scaled(normals(s, length), 0.1))],
    ['a sine near 50 Hz in noise', (s, rate) => sum(wave(random(s, 44, 49), rate), normals(s, length))],
    ['a square wave of 10 Hz', (_, rate) => signal(length, (n) => (((n * 10) / rate) % 1 < 0.4 ? 1 : -1))],
    [
      'pulses of 25 Hz',
      (s, rate) =>
        sum(
          scaled(normals(s, length), 0.01),
          signal(length, (n) => (Math.floor((n * 25) / rate) !== Math.floor(((n - 1) * 25) / rate) ? 9 : 0)),
        ),
    ],
    [
      'a machine of 12.5 Hz',
      (s, rate) =>
        sum(
          normals(s, length),
          ...[1, 2, 3, 4, 5, 6, 7, 8, 9].map((h) => hum(length, rate, 12.5 * h, 0.4, h * s)),
        ),
    ],
    ['a rumble that falls with frequency', (s) => sluggish(s, length, 0.9995)],
    [
      'an overdriven machine',
      (s, rate) =>
        limited(sum(wave(17, rate), scaled(wave(31, rate), 0.7), scaled(normals(s, length), 0.05)), 3),
    ],
  ])('%s', async (_, make) => {
    for (let seed = 1; seed <= 8; seed++) {
      for (const rate of [1000, 2500, 8000]) {
        const codes = await codesOf([make(seed, rate)], rate);
        expect(codes.includes('mains'), `seed ${seed} at ${rate} Hz`).toBe(false);
      }
    }
  });
});
