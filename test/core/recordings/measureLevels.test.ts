import { describe, expect, it } from 'vitest';
import { measureLevels } from '../../../core/recordings/measureLevels';
import { normals } from '../../support/random';
import { pace, recordingOf } from '../../support/takes';

describe('measureLevels', () => {
  it('keeps its digits on a long recording with a large offset', async () => {
    const samples = 300_000;
    const noise = normals(1, samples);
    const {
      levels: [levels],
    } = await measureLevels(recordingOf([noise.map((value) => 1e6 + value)]), pace);
    // Reference: the noise's own mean and power, which no offset has touched.
    const mean = noise.reduce((sum, value) => sum + value, 0) / samples;
    expect(Math.abs(levels.mean - 1e6 - mean)).toBeLessThan(1e-8);
    const power = noise.reduce((sum, value) => sum + (1e6 + value) ** 2 / samples, 0);
    expect(Math.abs(levels.rms / Math.sqrt(power) - 1)).toBeLessThan(1e-13);
  });

  it('leaves out samples that are no numbers and says where the first is', async () => {
    const samples = Float64Array.from({ length: 70_000 }, (_, n) => (n % 2 === 0 ? 3 : -1));
    samples[65_540] = Number.NaN;
    samples[69_999] = Number.NEGATIVE_INFINITY;
    const {
      levels: [levels],
    } = await measureLevels(recordingOf([samples]), pace);
    expect(levels).toMatchObject({ min: -1, max: 3, whole: true, notFinite: { count: 2, first: 65_540 } });
    expect(levels.mean).toBeCloseTo(1, 4);
  });

  it('tells whole numbers from others', async () => {
    const { levels } = await measureLevels(
      recordingOf([Float64Array.of(1, 2, -3), Float64Array.of(1, 2, 0.5)]),
      pace,
    );
    expect(levels.map(({ whole }) => whole)).toEqual([true, false]);
  });

  it('gives zeros for a channel without any number', async () => {
    const {
      levels: [levels],
    } = await measureLevels(recordingOf([Float64Array.of(Number.NaN, Number.NaN)]), pace);
    expect(levels).toEqual({
      min: 0,
      max: 0,
      mean: 0,
      rms: 0,
      whole: false,
      notFinite: { count: 2, first: 0 },
    });
  });
});
