import { describe, expect, it } from 'vitest';
import { errorOver, fitBlocks } from '../../../../core/suitability/blocks/blockFit';
import { gatherBlocks } from '../../../../core/suitability/blocks/blockSums';
import { crossErrors, jackknifedFit, surelyWrong } from '../../../../core/suitability/blocks/crossFit';
import { windowsOver } from '../../../../core/suitability/blocks/windows';
import { normals } from '../../../support/random';
import { convolve, pace, takeOf, tapsOf } from '../../../support/takes';
import { noMeans, withNoise } from '../signals';

const path = [0.5, -0.3, 0.2, 0.1];

describe('fits over blocks', () => {
  const x = [normals(1, 3000), normals(2, 3000).map((v) => 100 * v)];
  const d = withNoise(
    convolve(x[0], path).map((v, n) => v + 0.01 * x[1][n]),
    0.1,
    3,
  );
  const intervals = {
    fit: [
      { from: 0, to: 1000 },
      { from: 1200, to: 2600 },
    ],
    heldOut: [{ from: 2600, to: 3000 }],
  };
  const take = takeOf(x, d, intervals);
  const windows = windowsOver(intervals.fit, 200, 100);
  const blocks = () => gatherBlocks(take, windows, { length: 4, delay: 0 }, noMeans(2), pace);

  it('are those of the design over the same samples', async () => {
    const all = await blocks();
    // The windows cover both intervals, and samples before each are those of the design.
    const taps = await tapsOf([take], { length: 4, delay: 0, windowing: 'covariance' });
    const fitted = fitBlocks(all, 0)!;
    taps.forEach((row, r) => {
      row.forEach((value, k) => {
        expect(Math.abs(fitted[r][k] - value)).toBeLessThan(1e-12);
      });
    });
  });

  it('leave out the taps they are told to', async () => {
    const fitted = fitBlocks(await blocks(), 0, 2)!;
    const later = takeOf(
      x.map((row) => Float64Array.from([0, 0, ...row.slice(0, -2)])),
      d,
      intervals,
    );
    const taps = await tapsOf([later], { length: 2, delay: 0, windowing: 'covariance' });
    fitted.forEach((row, r) => {
      expect([...row.slice(0, 2)]).toEqual([0, 0]);
      // The design loses one sample of history less at the very beginning.
      for (let k = 0; k < 2; k++)
        expect(Math.abs(row[2 + k] - taps[r][k])).toBeLessThan(2e-3 / (r === 0 ? 1 : 100));
    });
  });

  it('have the errors that filtering gives', async () => {
    const filter = [Float64Array.from([0.4, -0.2, 0.3, 0]), Float64Array.from([0.02, 0, 0, -0.01])];
    const [y, z] = x.map((row, r) => convolve(row, filter[r]));
    for (const block of await blocks()) {
      let energy = 0;
      const { from, to } = block.window;
      // The first three samples after a gap have no history.
      for (let n = from === 0 || from === 1200 ? from + 3 : from; n < to; n++)
        energy += (d[n] - y[n] - z[n]) ** 2;
      expect(Math.abs(errorOver(block, filter) / energy - 1)).toBeLessThan(1e-11);
    }
  });

  it('are refused for silence and too few samples', async () => {
    const silent = takeOf([new Float64Array(3000), x[1]], d, intervals);
    expect(
      fitBlocks(await gatherBlocks(silent, windows, { length: 4, delay: 0 }, noMeans(2), pace)),
    ).toBeNull();
    const [first] = await gatherBlocks(
      take,
      [{ from: 0, to: 23 }],
      { length: 4, delay: 0 },
      noMeans(2),
      pace,
    );
    expect(fitBlocks([first])).toBeNull();
    expect(fitBlocks([])).toBeNull();
  });

  it('judge each block by what was fitted to others', async () => {
    const all = await blocks();
    const errors = crossErrors(all, 0)!;
    const whole = fitBlocks(all, 0)!;
    const own = all.reduce((sum, block) => sum + errorOver(block, whole), 0);
    const crossed = errors.reduce((sum, e) => sum + e, 0);
    // 8 taps on half of 2,400 samples: the error rises by 8/2400 in the fit and 8/1200 in the crossing, about.
    expect(crossed / own).toBeGreaterThan(1.002);
    expect(crossed / own).toBeLessThan(1.03);
  });

  it('take off what their uncertainty may add, and not what is wrong', async () => {
    const all = await blocks();
    const half = Math.floor(all.length / 2);
    const groups = [0, 1, 2].map((g) => all.slice(half).filter((_, i) => i % 3 === g));
    const jackknifed = jackknifedFit(groups, (some) => fitBlocks(some.flat(), 0))!;
    const noise = (block: (typeof all)[number]) => surelyWrong(block, jackknifed) / block.sums.count;
    const mean = all.slice(0, half).reduce((sum, block) => sum + noise(block), 0) / half;
    // Never more than the noise of 0.01 and its scatter over 1,200 samples.
    expect(mean).toBeLessThan(0.0115);
    expect(mean).toBeGreaterThan(0.008);
    const wrong = { ...jackknifed, whole: jackknifed.whole.map((row) => row.map((v) => v + 0.2)) };
    wrong.without = jackknifed.without.map((rows) => rows.map((row) => row.map((v) => v + 0.2)));
    expect(surelyWrong(all[0], wrong)).toBeGreaterThan(100 * surelyWrong(all[0], jackknifed));
  });
});
