import { describe, expect, it } from 'vitest';
import { randomChoices, randomWords, whiteNoise } from './noise';

describe('randomWords', () => {
  it('gives the 10,000th word of the GNU Scientific Library’s `taus` from seed 1 (from memory)', () => {
    const next = randomWords(1);
    let word = 0;
    for (let k = 0; k < 10_000; k++) word = next();
    expect(word).toBe(2733957125);
  });
});

describe('randomChoices', () => {
  it('gives each choice about as often: chi-squared within its 99.9 % point (7 degrees of freedom, 24.32)', () => {
    const next = randomChoices(5, 8);
    const counts = new Array(8).fill(0);
    for (let k = 0; k < 8000; k++) counts[next()]++;
    const chiSquared = counts.reduce((sum, count) => sum + (count - 1000) ** 2 / 1000, 0);
    expect(chiSquared).toBeLessThan(24.32);
  });
});

describe('whiteNoise', () => {
  const length = 100_000;
  const noise = whiteNoise(1101, length);
  const mean = (values: Float64Array) => values.reduce((sum, value) => sum + value, 0) / values.length;

  it('has zero mean, unit variance and the kurtosis 2.9 of twelve uniform numbers, within four standard errors', () => {
    expect(Math.abs(mean(noise))).toBeLessThan(4 / Math.sqrt(length));
    expect(Math.abs(mean(noise.map((v) => v ** 2)) - 1)).toBeLessThan(4 * Math.sqrt(1.9 / length));
    expect(Math.abs(mean(noise.map((v) => v ** 4)) - 2.9)).toBeLessThan(4 * Math.sqrt(90 / length));
  });

  it('is uncorrelated from sample to sample and between seeds, within four standard errors', () => {
    const other = whiteNoise(1102, length);
    for (const shift of [1, 2, 3, 10, 64]) {
      const product = noise.subarray(shift).map((value, n) => value * noise[n]);
      expect(Math.abs(mean(product))).toBeLessThan(4 / Math.sqrt(length - shift));
    }
    expect(Math.abs(mean(noise.map((value, n) => value * other[n])))).toBeLessThan(4 / Math.sqrt(length));
  });
});
