import { describe, expect, it } from 'vitest';
import { newCrossSpectra } from '../../../core/spectra/crossSpectra';
import { poolSpectra } from '../../../core/spectra/poolSpectra';
import { multipleCoherence } from '../../../core/suitability/pair/coherence';
import { normals } from '../../support/random';

function spectraOf(signals: readonly Float64Array[]) {
  const gatherer = newCrossSpectra(signals.length, 256, 1000);
  gatherer.push(signals);
  return gatherer.spectra();
}

describe('poolSpectra', () => {
  it('is the same as gathering all parts one after the other', () => {
    const parts = [3000, 5000].map((samples, i) => [normals(2 * i, samples), normals(2 * i + 1, samples)]);
    const gatherer = newCrossSpectra(2, 256, 1000);
    for (const signals of parts) {
      gatherer.gap();
      gatherer.push(signals);
    }
    const whole = gatherer.spectra();
    const pooled = poolSpectra(parts.map((signals) => ({ spectra: spectraOf(signals), delay: 0 })));
    expect(pooled).toMatchObject({ averages: whole.averages, overlaps: whole.overlaps, segment: 256 });
    for (const [r, s] of [
      [0, 0],
      [0, 1],
      [1, 1],
    ]) {
      pooled.between[r][s].re.forEach((value, f) => {
        expect(value).toBeCloseTo(whole.between[r][s].re[f], 14);
        expect(pooled.between[r][s].im[f]).toBeCloseTo(whole.between[r][s].im[f], 14);
      });
    }
  });

  it('delays the desired signal: the response turns as that of a pure delay', () => {
    const x = normals(5, 20_000);
    const pooled = poolSpectra([{ spectra: spectraOf([x, x]), delay: 5 }]);
    const [{ re, im }] = multipleCoherence(pooled).responses;
    for (let f = 0; f <= 128; f++) {
      expect(re[f]).toBeCloseTo(Math.cos((2 * Math.PI * 5 * f) / 256), 10);
      expect(im[f]).toBeCloseTo(-Math.sin((2 * Math.PI * 5 * f) / 256), 10);
    }
  });
});
