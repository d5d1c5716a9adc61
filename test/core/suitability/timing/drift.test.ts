import { describe, expect, it } from 'vitest';
import { align } from '../../../../core/suitability/timing/alignment';
import { type Drift, lagCourse } from '../../../../core/suitability/timing/drift';
import { normals } from '../../../support/random';
import { pace } from '../../../support/takes';
import { noMeans, resampled, resonance, separateFiles, sound, withNoise } from '../signals';

/** Two recordings of one source: the desired one by a clock that is faster by `ppm`, with noise in both. */
async function courseOf(
  source: Float64Array,
  { ppm, late, noise, seed }: { ppm: number; late: number; noise: number; seed: number },
): Promise<Drift | null> {
  const count = source.length - 1000;
  // A faster clock has counted further when the same thing happens.
  const recorded = resampled(source, count, (n) => (n - late) / (1 + ppm * 1e-6) + 500);
  const input = withNoise(source.slice(500, 500 + count), noise, seed + 1);
  const take = separateFiles([input], withNoise(recorded, noise, seed + 2));
  const alignment = await align(take, noMeans(), true, pace);
  return alignment === null ? null : lagCourse(take, noMeans(), alignment, pace);
}

describe('the drift of two clocks', () => {
  it.each([20, -20])('of %i ppm is found on 60 s at 8 kHz with a standard error below 2 ppm', async (ppm) => {
    for (let seed = 0; seed < 2; seed++) {
      const drift = await courseOf(sound(seed, 60 * 8000 + 1000), {
        ppm,
        late: 123.3,
        noise: 0.7,
        seed: seed + 100,
      });
      expect(drift!.standardError).toBeLessThan(2);
      expect(Math.abs(drift!.ppm - ppm)).toBeLessThan(3 * drift!.standardError);
      expect(drift!.proved).toBe(true);
      expect(drift!.cost).toBeCloseTo(20e-6 * 60 * 8000, 0);
      // Of the middle of the fit: the lag of the start and half of what the drift adds.
      expect(Math.abs(drift!.lag.samples - 123.3 - ppm * 1e-6 * 240000)).toBeLessThan(0.1);
    }
  });

  it.each([0, 50])('has an honest standard error at %i ppm', async (ppm) => {
    const errors: number[] = [];
    for (let seed = 0; seed < 30; seed++) {
      const drift = await courseOf(sound(seed, 41000), { ppm, late: 5.5, noise: 0.7, seed: seed + 500 });
      errors.push((drift!.ppm - ppm) / drift!.standardError);
      expect(drift!.proved).toBe(ppm !== 0);
    }
    // Mean square of 30 normal values, 99.9 % (χ² tables): 0.39 to 1.99; some 20 degrees of freedom make it 1.1 times that.
    const square = errors.reduce((sum, e) => sum + e * e, 0) / errors.length;
    expect(square).toBeGreaterThan(0.39);
    expect(square).toBeLessThan(2.19);
  });

  it('is found through a resonance and behind a large offset', async () => {
    const source = resonance(sound(3, 201000), 0.05, 3);
    const drift = await courseOf(source, { ppm: 80, late: 3012.2, noise: 0.01, seed: 9 });
    expect(drift!.proved).toBe(true);
    expect(Math.abs(drift!.ppm - 80)).toBeLessThan(3 * drift!.standardError);
    expect(drift!.standardError).toBeLessThan(2);
  });

  it('is not said where it cannot be told', async () => {
    for (let seed = 0; seed < 20; seed++) {
      const take = separateFiles([normals(seed, 20000)], normals(seed + 900, 20000));
      const alignment = await align(take, noMeans(), true, pace);
      if (alignment !== null) expect(await lagCourse(take, noMeans(), alignment, pace)).toBeNull();
    }
    const short = await courseOf(sound(1, 1900), { ppm: 100, late: 0, noise: 0, seed: 1 });
    expect(short).toBeNull();
  });
});
