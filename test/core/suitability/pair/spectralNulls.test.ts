import { describe, expect, it } from 'vitest';
import { noiseGains } from '../../../../core/suitability/pair/spectralNulls';
import { normals } from '../../../support/random';
import { convolve, takeOf } from '../../../support/takes';
import { codes, inspect } from './paths';

const samples = 60_000;
const filter = { length: 64, delay: 16, regularisation: 1e-4 };

/** Equaliser's pair: the training signal through a path, with noise at the transducer. */
async function through(path: number[], noiseSize = 0.01, seed = 1) {
  const training = normals(seed, samples);
  const noise = normals(seed + 1, samples);
  const observed = convolve(training, path).map((value, n) => value + noiseSize * noise[n]);
  return inspect({ takes: [takeOf([observed], training)], job: 'equalise', filter });
}

/** Zeros at 200 Hz, near the unit circle: |H|² falls there to about (1-r)²ⁿ of what it is far away. */
function dip(radius: number, times: number): number[] {
  let path = [1];
  for (let k = 0; k < times; k++) {
    const one = [1, -2 * radius * Math.cos(0.4 * Math.PI), radius * radius];
    path = Array.from({ length: path.length + 2 }, (_, n) =>
      one.reduce((sum, value, j) => sum + value * (path[n - j] ?? 0), 0),
    );
  }
  return path;
}

describe('spectral-null', () => {
  it('is found where the path lets little through, with the rise of the noise', async () => {
    // Two zeros of radius 0.9 each: |H(200 Hz)|² = ((1-0.9) |1-0.9 e^(-0.8πi)|)⁴; the median over all frequencies is
    // found by the formula itself.
    const path = dip(0.9, 2);
    const response = Array.from({ length: 1000 }, (_, i) => {
      const w = (Math.PI * i) / 1000;
      const re = path.reduce((sum, h, k) => sum + h * Math.cos(w * k), 0);
      const im = path.reduce((sum, h, k) => sum - h * Math.sin(w * k), 0);
      return re * re + im * im;
    });
    const middle = [...response].sort((a, b) => a - b)[500];
    const rise = 10 * Math.log10(middle / Math.min(...response));
    const { nulls, findings } = await through(path);
    expect(nulls?.bands.length).toBe(1);
    const [{ from, to }] = nulls!.bands;
    expect(from).toBeLessThan(195);
    expect(to).toBeGreaterThan(205);
    const within = response.filter((gain) => gain < 0.01 * middle).length / 2;
    expect(Math.abs(to - from - within)).toBeLessThan(20);
    // The bottom is smoothed over what 64 taps can part.
    expect(nulls!.riseDb).toBeLessThan(rise + 1);
    expect(nulls!.riseDb).toBeGreaterThan(rise - 8);
    expect(findings.map(({ code }) => code)).toEqual(['spectral-null']);
  });

  it('is not found in a path that only dips, or that is flat', async () => {
    expect(codes(await through(dip(0.6, 1)))).toEqual([]);
    expect(codes(await through([1]))).toEqual([]);
    expect(codes(await through([0.5, 0.3, 0.1], 0.1))).toEqual([]);
  });

  it('is not made by noise on the transducer, however loud', async () => {
    const { nulls } = await through([1, 0.3], 3);
    expect(nulls?.bands).toEqual([]);
  });

  it('is not found where a second input hears what the first misses', async () => {
    const training = normals(5, samples);
    const noise = normals(6, samples);
    const first = convolve(training, dip(0.9, 2)).map((value, n) => value + 0.01 * noise[n]);
    const second = training.map((value, n) => 100 * (value + 0.01 * noise[samples - 1 - n]));
    const { nulls } = await inspect({ takes: [takeOf([first, second], training)], job: 'equalise', filter });
    expect(nulls?.bands).toEqual([]);
  });

  it('is looked for in equalising alone', async () => {
    const training = normals(7, samples);
    const observed = convolve(training, dip(0.9, 2));
    const { nulls } = await inspect({ takes: [takeOf([observed], training)], job: 'identify', filter });
    expect(nulls).toBeNull();
  });
});

describe('noiseGains', () => {
  it('is the power that white noise of power 1 makes at the output', () => {
    const taps = Float64Array.of(0.5, -1, 0.25);
    const output = convolve(normals(8, 200_000), taps);
    const power = output.reduce((sum, value) => sum + value * value, 0) / output.length;
    expect(noiseGains([taps])[0]).toBe(1.3125);
    expect(Math.abs(power / 1.3125 - 1)).toBeLessThan(0.02);
  });
});
