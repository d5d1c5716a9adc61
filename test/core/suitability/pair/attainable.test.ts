import { describe, expect, it } from 'vitest';
import { bandSums } from '../../../../core/evaluation/bandFigures';
import { newCrossSpectra, newSlopeSpectra } from '../../../../core/spectra/crossSpectra';
import { newWelch } from '../../../../core/spectra/welch';
import { attainable } from '../../../../core/suitability/pair/attainable';
import { multipleCoherence } from '../../../../core/suitability/pair/coherence';
import { predictionFigure, type RungFigure } from '../../../../core/suitability/pair/rungFigure';
import { normals } from '../../../support/random';
import { convolve, takeOf } from '../../../support/takes';
import { addResonance, codes, coloured, inspect, meanSquare, seededPath } from './paths';

function rung(segment: number, left: number, error = 0.001): RungFigure {
  const share = { left, error };
  return { segment, averages: 100, inputs: 2, total: share, bands: [share] };
}

describe('attainable', () => {
  it.each([
    [0.5, 3.01],
    [0.9, 10],
    [0.99, 20],
    [0.999, 30],
  ])(
    'is -10 log10(1-γ²): %f gives %f dB (Bendat & Piersol; Nelson & Elliott; from memory)',
    (coherence, db) => {
      const { reductionDb } = attainable([rung(256, 1 - coherence), rung(512, 1 - coherence)]);
      expect(reductionDb).toBeCloseTo(db, 2);
    },
  );

  it('rests on twice the shortest segments beyond which longer ones show no more', () => {
    const rungs = [0.5, 0.2, 0.101, 0.1, 0.1].map((left, i) => rung(64 * 2 ** i, left));
    expect(attainable(rungs)).toMatchObject({ segment: 512, withheld: null });
  });

  it('is withheld where the last doubling still moves it, and then bounded from below', () => {
    const rungs = [0.5, 0.2, 0.1].map((left, i) => rung(64 * 2 ** i, left));
    expect(attainable(rungs)).toMatchObject({ reductionDb: null, withheld: 'unsettled', atLeastDb: 10 });
  });

  it('counts a doubling of less than 1 dB where the one before moved it three times as much', () => {
    const rungs = (before: number) => [before, 0.12, 0.1].map((left, i) => rung(64 * 2 ** i, left));
    expect(attainable(rungs(0.22)).reductionDb).toBeCloseTo(10, 10);
    expect(attainable(rungs(0.15)).reductionDb).toBeNull();
  });

  it('is not taken from a plateau of short segments where the longer ones are only less certain', () => {
    const rungs = [rung(64, 0.9), rung(128, 0.9), rung(256, 0.3, 0.2), rung(512, 0.1, 0.3)];
    expect(attainable(rungs)).toMatchObject({ reductionDb: null, withheld: 'unsettled', atLeastDb: null });
  });

  it('is withheld with few averages, few frequencies or no signal', () => {
    expect(attainable([rung(64, 0.1)]).withheld).toBe('too-short');
    expect(attainable([rung(64, 0.1, 0.1), rung(128, 0.1, 0.1)]).withheld).toBe('too-short');
    expect(attainable([{ ...rung(64, 0.1), averages: 11 }, rung(128, 0.1)]).withheld).toBe('too-short');
    expect(attainable([rung(64, Number.NaN), rung(128, Number.NaN)]).withheld).toBe('silent');
  });

  it('counts nothing below 0 dB', () => {
    expect(attainable([rung(64, 1.02), rung(128, 1.02)]).reductionDb).toBe(0);
  });
});

describe('the attainable reduction of seeded paths with lags and resonances', () => {
  const samples = 60_000;
  const seeds = Array.from({ length: 20 }, (_, i) => i + 1);
  const shown: number[] = [];

  it.each(seeds)('path %i: within 1 dB of the true limit, or withheld', async (seed) => {
    const { inputs, desired, lag, limitDb, noisePower } = seededPath(seed, samples, 40);
    const take = takeOf(inputs, desired);
    for (const known of [lag, 0]) {
      const { together } = await inspect({ takes: [take], job: 'identify', lags: [known] });
      const { attainableDb, atLeastDb, bandsDb } = together;
      if (attainableDb !== null) {
        expect(Math.abs(attainableDb - limitDb)).toBeLessThan(1);
        if (known === lag) shown.push(seed);
      }
      // What is said to be the least must not be more.
      if (atLeastDb !== null) expect(atLeastDb).toBeLessThan(limitDb + 1);
      const welch = newWelch(1, 4096, 1000);
      welch.push([desired]);
      const whole = bandSums(welch.densities()[0]);
      const noise = bandSums(new Float64Array(2049).fill(noisePower / 500));
      bandsDb.forEach((band, b) => {
        if (band === null) return;
        expect(Math.abs(band - Math.max(0, 10 * Math.log10(whole[b] / noise[b]))), `band ${b}`).toBeLessThan(
          1,
        );
      });
    }
  });

  it('is shown for most of them', () => {
    expect(shown.length).toBeGreaterThanOrEqual(15);
  });
});

describe('the attainable reduction', () => {
  it('is not misled by a resonance 60 samples late, where plain segments of 1,024 are', async () => {
    const samples = 100_000;
    const x = normals(1, samples);
    const clean = new Float64Array(samples);
    addResonance(clean, x, { frequency: 0.1, q: 30, gain: 1, lag: 60 });
    const size = 0.008 * Math.sqrt(meanSquare(clean));
    const noise = normals(2, samples).map((value) => size * value);
    const take = takeOf(
      [x],
      clean.map((value, n) => value + noise[n]),
    );
    const { together } = await inspect({ takes: [take], job: 'identify', lags: [60] });
    // 1/0.008² is 41.9 dB.
    expect(together.attainableDb).not.toBeNull();
    expect(Math.abs(together.attainableDb! - 41.94)).toBeLessThan(1);
    const plain = newCrossSpectra(2, 1024, 1000);
    plain.push([x, clean]);
    const spectra = plain.spectra();
    const { values } = multipleCoherence(spectra);
    const power = spectra.between[1][1].re;
    const left = values.reduce((sum, value, f) => sum + (1 - value) * power[f], 0);
    expect(-10 * Math.log10(left / power.reduce((sum, value) => sum + value, 0))).toBeLessThan(15);
  });

  it('is withheld for a decay longer than the recording can show, and says so', async () => {
    const samples = 20_000;
    const x = normals(3, samples);
    const d = new Float64Array(samples);
    addResonance(d, x, { frequency: 0.01, q: 300, gain: 1 });
    const inspected = await inspect({ takes: [takeOf([x], d)], job: 'identify' });
    expect(inspected.together).toMatchObject({ attainableDb: null });
    expect(inspected.together.attainableReason).toContain('too short');
    expect(codes(inspected)).toContain('attainable-unknown');
  });

  it('is withheld for a few samples', async () => {
    const x = normals(4, 300);
    const inspected = await inspect({
      takes: [
        takeOf(
          [x],
          x.map((value) => 0.5 * value),
        ),
      ],
      job: 'identify',
    });
    expect(inspected.together.attainableReason).toBe('the recording is too short for enough averages');
  });

  it('of two inputs is that of both, and that of several takes is that of one filter for all', async () => {
    const samples = 40_000;
    const [a, b, noise] = [normals(5, samples), coloured(6, samples, 0.8), normals(7, samples)];
    const make = (gain: number) => {
      const parts = [convolve(a, [0.5, gain, 0.2]), convolve(b, [0, 0, 0.7])];
      return takeOf(
        [a, b],
        noise.map((value, n) => parts[0][n] + parts[1][n] + 0.1 * value),
      );
    };
    const powers = (gain: number) => 0.25 + gain * gain + 0.04 + 0.49 / (1 - 0.64) + 0.01;
    const one = await inspect({ takes: [make(1)], job: 'cancel' });
    expect(Math.abs(one.together.attainableDb! - 10 * Math.log10(powers(1) / 0.01))).toBeLessThan(0.3);
    const both = await inspect({ takes: [make(1), make(0)], job: 'cancel' });
    for (const [t, gain] of [1, 0].entries()) {
      expect(Math.abs(both.takes[t].attainableDb! - 10 * Math.log10(powers(gain) / 0.01))).toBeLessThan(0.3);
    }
    // The mean filter leaves (1/2)² of the first input's power in both, beside the noise.
    const limit = 10 * Math.log10((0.5 * (powers(1) + powers(0))) / (0.25 + 0.01));
    expect(Math.abs(both.together.attainableDb! - limit)).toBeLessThan(0.3);
  });

  it('of takes with lags of their own is that of one lag for all', async () => {
    const samples = 40_000;
    const x = normals(8, samples);
    const noise = normals(9, samples);
    const later = (lag: number) =>
      takeOf(
        [x],
        x.map((_, n) => (n >= lag ? x[n - lag] : 0) + 0.1 * noise[n]),
      );
    const inspected = await inspect({ takes: [later(20), later(21)], job: 'identify', lags: [20, 21] });
    expect(inspected.takes[1].attainableDb).toBeGreaterThan(15);
    // White noise a sample apart has nothing in common: the mean of the two leaves half of each.
    expect(inspected.together.attainableDb).toBeCloseTo(10 * Math.log10(2), 0);
  });

  it('of a long recording is taken from a sample of it, the coherence from all', async () => {
    const samples = 700_000;
    const x = normals(10, samples);
    const noise = normals(11, samples);
    const take = takeOf(
      [x],
      x.map((_, n) => (n >= 3 ? x[n - 3] : 0) + 0.1 * noise[n]),
    );
    const { together } = await inspect({ takes: [take], job: 'identify', lags: [3] });
    expect(Math.abs(together.attainableDb! - 20.04)).toBeLessThan(0.3);
    expect(together.coherence!.averages).toBe(
      Math.floor((2 * (samples - 3)) / together.coherence!.segment) - 1,
    );
  });
});

describe('the limit of one-step prediction', () => {
  // Kolmogorov & Szegő: exp(mean ln S) / mean S. An autoregression's is its innovation's share of its power, 1 for
  // white noise: for poles r e^(±iθ) the power is (1+r²)/((1-r²)(1+r⁴-2r²cos 2θ)) (Box & Jenkins, ch. 3, from memory).
  const poles = { radius: 0.97, angle: 0.4 };
  const samples = 60_000;
  const x = normals(12, samples);
  const a1 = 2 * poles.radius * Math.cos(poles.angle);
  const square = poles.radius ** 2;
  for (let n = 2; n < samples; n++) x[n] += a1 * x[n - 1] - square * x[n - 2];
  const power = (1 + square) / ((1 - square) * (1 + square ** 2 - 2 * square * Math.cos(2 * poles.angle)));

  const predict = (filter: { length: number; delay: number; regularisation: number }) => {
    const take = takeOf([x], x);
    return inspect({ takes: [{ ...take, desired: take.inputs[0] }], job: 'predict', filter });
  };

  it('is that of the innovations of an autoregression', async () => {
    const { together, findings } = await predict({ length: 8, delay: -1, regularisation: 0 });
    expect(Math.abs(together.attainableDb! - 10 * Math.log10(power))).toBeLessThan(0.3);
    expect(together.coherence).toBeNull();
    expect(findings).toEqual([]);
  });

  it('is that of its bands, whose error is white', async () => {
    const { together } = await predict({ length: 8, delay: -1, regularisation: 0 });
    const welch = newWelch(1, 1024, 1000);
    welch.push([x]);
    bandSums(welch.densities()[0]).forEach((band, b) => {
      const white = bandSums(new Float64Array(513).fill(1 / 500))[b];
      const own = together.bandsDb[b];
      if (own !== null) expect(Math.abs(own - Math.max(0, 10 * Math.log10(band / white)))).toBeLessThan(0.5);
    });
  });

  it('is not claimed for several steps, or for another signal', async () => {
    const { together, findings } = await predict({ length: 8, delay: -5, regularisation: 0 });
    expect(together.attainableDb).toBeNull();
    expect(together.attainableReason).toContain('one sample ahead only');
    expect(findings).toEqual([]);
    const other = await inspect({
      takes: [takeOf([x], x)],
      job: 'predict',
      filter: { length: 8, delay: -1, regularisation: 0 },
    });
    expect(other.together.attainableDb).toBeNull();
  });

  it('has no bias with few averages', () => {
    let sum = 0;
    for (let seed = 0; seed < 60; seed++) {
      const gatherer = newSlopeSpectra(1, 256, 1);
      const white = normals(100 + seed, 1280);
      gatherer.push([white, white]);
      sum += predictionFigure(gatherer.spectra()).total.left;
    }
    expect(Math.abs(sum / 60 - 1)).toBeLessThan(0.01);
  });
});
