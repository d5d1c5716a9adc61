import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import { describe, expect, it } from 'vitest';
import { type CrossSpectra, newCrossSpectra } from '../../../../core/spectra/crossSpectra';
import { eigenvalueBounds, excitationOf } from '../../../../core/suitability/pair/excitation';
import { unprovenGain } from '../../../../core/suitability/pair/unprovenGain';
import { normals } from '../../../support/random';
import { convolve, recordingOf, takeOf } from '../../../support/takes';
import { addResonance, codes, coloured, inspect } from './paths';

function spectraOf(signals: readonly Float64Array[], segment = 256): CrossSpectra {
  const gatherer = newCrossSpectra(signals.length, segment, 1000);
  gatherer.push(signals);
  return gatherer.spectra();
}

/** Windowed-sinc low-pass: -80 dB and less beyond `cutoff` (cycles a sample) + 0.03. */
function lowPass(cutoff: number): number[] {
  const half = 100;
  return Array.from({ length: 2 * half + 1 }, (_, i) => {
    const k = i - half;
    const sinc = k === 0 ? 2 * cutoff : Math.sin(2 * Math.PI * cutoff * k) / (Math.PI * k);
    const a = (Math.PI * i) / half;
    return sinc * (0.42 - 0.5 * Math.cos(a) + 0.08 * Math.cos(2 * a));
  });
}

describe('eigenvalueBounds', () => {
  /** E{x_r[n] x_s[n-k]} that belongs to a spectrum, by the inverse transform written out. */
  function correlation(spectra: CrossSpectra, r: number, s: number, k: number): number {
    const { re, im } = spectra.between[Math.min(r, s)][Math.max(r, s)];
    const sign = r <= s ? 1 : -1;
    let sum = 0;
    for (let f = 0; f < re.length; f++) {
      const angle = (2 * Math.PI * f * k) / spectra.segment;
      // One-sided densities: the other half is in them.
      sum += re[f] * Math.cos(angle) + sign * im[f] * Math.sin(angle);
    }
    return sum;
  }

  // Grenander & Szegő, Toeplitz Forms; Gray, Toeplitz and Circulant Matrices: A Review.
  it.each([
    ['one input', [coloured(1, 20_000, 0.9)]],
    [
      'two inputs',
      (() => {
        const a = coloured(2, 20_000, -0.7);
        const b = normals(3, 20_000);
        return [a, a.map((value, n) => 40 * (value + b[n]))];
      })(),
    ],
  ])('holds those of a matrix of correlations: %s', (_, inputs) => {
    const spectra = spectraOf([...inputs, inputs[0]], 128);
    const { smallest, largest } = eigenvalueBounds(spectra);
    const length = 40;
    const scale = inputs.map((_, r) => 1 / Math.sqrt(correlation(spectra, r, r, 0)));
    const size = inputs.length * length;
    const matrix = Matrix.zeros(size, size);
    for (let i = 0; i < size; i++) {
      for (let j = 0; j < size; j++) {
        const [r, s] = [Math.floor(i / length), Math.floor(j / length)];
        matrix.set(i, j, scale[r] * scale[s] * correlation(spectra, r, s, (j % length) - (i % length)));
      }
    }
    const values = new EigenvalueDecomposition(matrix, { assumeSymmetric: true }).realEigenvalues;
    expect(Math.min(...values)).toBeGreaterThanOrEqual(smallest);
    expect(Math.max(...values)).toBeLessThanOrEqual(largest);
    // And come near: within half and double.
    expect(Math.min(...values)).toBeLessThan(2 * smallest);
    expect(Math.max(...values)).toBeGreaterThan(0.5 * largest);
  });

  it('are those of the spectrum (1-a²)/|1-a e^(-iω)|² of a first-order process', () => {
    const { smallest, largest } = eigenvalueBounds(
      spectraOf([coloured(4, 400_000, 0.8), normals(5, 400_000)]),
    );
    expect(Math.abs(smallest / (0.36 / 3.24) - 1)).toBeLessThan(0.1);
    expect(Math.abs(largest / (0.36 / 0.04) - 1)).toBeLessThan(0.1);
  });
});

describe('excitationOf', () => {
  it('finds nothing in white noise, in a first-order process or in a resonance', () => {
    const ringing = new Float64Array(40_000);
    addResonance(ringing, normals(6, 40_000), { frequency: 0.1, q: 10, gain: 1 });
    for (const x of [normals(7, 40_000), coloured(8, 40_000, 0.95), ringing]) {
      expect(excitationOf(spectraOf([x, x]), 64, [0]).emptyBands).toEqual([[]]);
    }
  });

  it('finds the band beyond a low-pass', () => {
    const x = convolve(normals(9, 40_000), lowPass(0.2));
    const [bands] = excitationOf(spectraOf([x, x]), 64, [0]).emptyBands;
    expect(bands.length).toBe(1);
    expect(Math.abs(bands[0].from - 210)).toBeLessThan(20);
    expect(bands[0].to).toBe(500);
  });

  it('leaves out what is too narrow for the filter to part', () => {
    // Zeros on the unit circle at 200 Hz: empty within a few Hz.
    const x = convolve(normals(10, 60_000), [1, -2 * Math.cos(0.4 * Math.PI), 1]);
    const y = convolve(convolve(x, [1, -2 * Math.cos(0.4 * Math.PI), 1]), [
      1,
      -2 * Math.cos(0.4 * Math.PI),
      1,
    ]);
    expect(excitationOf(spectraOf([y, y], 1024), 8, [0]).emptyBands[0]).toEqual([]);
    expect(excitationOf(spectraOf([y, y], 1024), 512, [0]).emptyBands[0].length).toBe(1);
  });
});

describe('poor-excitation', () => {
  const samples = 40_000;
  const pairOf = (x: Float64Array) => {
    const noise = normals(11, samples);
    return takeOf(
      [x],
      convolve(x, [0.4, 0.3, -0.2]).map((value, n) => value + 0.02 * noise[n]),
    );
  };
  const narrow = convolve(normals(12, samples), lowPass(0.2));

  it('is a caution where the model is wanted and a note elsewhere', async () => {
    const identify = await inspect({ takes: [pairOf(narrow)], job: 'identify' });
    expect(identify.findings.find(({ code }) => code === 'poor-excitation')?.severity).toBe('caution');
    expect(identify.unknownBands.some(({ from, to }) => from < 240 && to === 500)).toBe(true);
    const cancel = await inspect({ takes: [pairOf(narrow)], job: 'cancel' });
    expect(cancel.findings.find(({ code }) => code === 'poor-excitation')?.severity).toBe('note');
  });

  it('is not found in a clean pair', async () => {
    const inspected = await inspect({ takes: [pairOf(normals(13, samples))], job: 'identify' });
    expect(codes(inspected)).toEqual([]);
    expect(inspected.unknownBands).toEqual([]);
  });

  it("is found where the input lies on its converter's rounding", async () => {
    // 8-bit PCM: the band beyond the low-pass holds the rounding alone, only 40 dB below the rest.
    const rounded = narrow.map((value) => Math.round(value * 40) / 128);
    const inspectWith = (bits: number) => {
      const take = pairOf(rounded);
      const recording = { ...recordingOf([rounded, rounded]), pcm: true, bits };
      return inspect({ takes: [{ ...take, inputs: [{ recording, channel: 0 }] }], job: 'identify' });
    };
    expect(codes(await inspectWith(8))).toEqual(['poor-excitation']);
    expect(codes(await inspectWith(16))).toEqual([]);
    // The same as whole numbers of a text.
    const counts = rounded.map((value) => value * 128);
    expect(codes(await inspect({ takes: [pairOf(counts)], job: 'identify' }))).toEqual(['poor-excitation']);
  });
});

describe('unproven-gain', () => {
  const take = takeOf([normals(14, 100)], normals(15, 100));
  const excitation = { emptyBands: [[{ from: 300, to: 500 }]], smallest: 1e-6, largest: 1 };

  it('is found where the filter answers in a band without energy', () => {
    // An impulse is flat: as much gain there as anywhere.
    const [found] = unprovenGain([Float64Array.of(1, 0, 0, 0)], excitation, 1000, take);
    expect(found).toMatchObject({ code: 'unproven-gain', values: { bands: '300 Hz to 500 Hz', gain: 0 } });
  });

  it('is not found where it does not, or where every band has energy', () => {
    expect(unprovenGain([Float64Array.from(lowPass(0.2))], excitation, 1000, take)).toEqual([]);
    const all = { ...excitation, emptyBands: [[]] };
    expect(unprovenGain([Float64Array.of(1, 0, 0, 0)], all, 1000, take)).toEqual([]);
  });
});
