import { describe, expect, it } from 'vitest';
import { residualFindings } from '../../../core/confidence/residualFindings';
import type { ResidualTests } from '../../../core/confidence/residuals';
import type { FilterShape } from '../../../core/statistics/gatherSums';
import { estimateOf, residualTestsOf } from '../../support/estimates';
import { autoregression, normals } from '../../support/random';
import { convolve, takeOf } from '../../support/takes';

// Against known truth, by seeded simulation.

const samples = 2500;
const shape: FilterShape = { length: 20, delay: 0, windowing: 'covariance' };

/** A decaying path of so many taps. */
const path = (taps: number) => Array.from({ length: taps }, (_, k) => Math.cos(0.7 * k) * 0.9 ** k);

const codes = (tests: ResidualTests, length = shape.length, inputs = ['a', 'b']) =>
  residualFindings(tests, inputs.slice(0, tests.inputs.length), length).map(({ code }) => code);

/** Codes found over so many seeds. */
async function count(
  seeds: number,
  run: (seed: number) => Promise<string[]>,
): Promise<Record<string, number>> {
  const found: Record<string, number> = { silent: 0, 'taps-missing': 0, 'delay-missing': 0 };
  for (let seed = 1; seed <= seeds; seed++) {
    const got = await run(1000 * seed);
    if (got.length === 0) found.silent++;
    for (const code of got) found[code]++;
  }
  return found;
}

const steady = () => 1;
const colours: [string, number, number, (n: number) => number][] = [
  ['white input, white noise', 0, 0, steady],
  ['coloured input, coloured noise', 0.8, 0.9, steady],
  ['levels that rise and fall together', 0.5, 0.5, (n) => (Math.floor(n / 400) % 2 === 0 ? 0.3 : 1)],
];

describe.each(colours)('taps at further lags: %s', (_, inputPole, noisePole, levelAt) => {
  const takeFor = (seed: number, response: number[], level: number, advance = 0) => {
    const x = autoregression(samples, seed, inputPole).map((v, n) => levelAt(n) * v);
    const y = convolve(x, response);
    const noise = autoregression(samples, seed + 7, noisePole).map((v, n) => levelAt(n) * v);
    const d = y.map((_value, n) => (y[n + advance] ?? 0) + level * noise[n]);
    return takeOf([x], d);
  };

  it('is silent on a filter as long as the path in at least 90 of 100 seeds', async () => {
    let significant = 0;
    const found = await count(100, async (seed) => {
      const tests = await residualTestsOf([takeFor(seed, path(20), 0.5)], shape);
      if (tests.extra?.some(({ probability }) => probability < 0.01)) significant++;
      return codes(tests);
    });
    expect(found.silent).toBeGreaterThanOrEqual(90);
    // Not for want of a gain alone: two sides, so 2 are expected to be this rare.
    expect(significant).toBeLessThanOrEqual(8);
  });

  it('finds a path that is longer than the filter, and nothing before it', async () => {
    const found = await count(20, async (seed) =>
      codes(await residualTestsOf([takeFor(seed, path(40), 0.2)], shape)),
    );
    expect(found['taps-missing']).toBe(20);
    expect(found['delay-missing']).toBeLessThanOrEqual(2);
  });

  it('finds a path that begins before the filter, and nothing after it', async () => {
    const found = await count(20, async (seed) =>
      codes(await residualTestsOf([takeFor(seed, path(10), 0.2, 3)], shape)),
    );
    expect(found['delay-missing']).toBe(20);
    expect(found['taps-missing']).toBeLessThanOrEqual(2);
  });
});

describe('what is gained by further taps', () => {
  it('is what a longer filter gains', async () => {
    const x = autoregression(samples, 5, 0.6);
    const noise = normals(6, samples);
    const d = convolve(x, path(30)).map((y, n) => y + 0.1 * noise[n]);
    const take = takeOf([x], d);
    const tests = await residualTestsOf([take], shape);
    const error = async (length: number) => {
      const { filter } = await estimateOf([take], { ...shape, length }, 1e-6);
      const y = convolve(x, filter.coefficients[0]);
      let sum = 0;
      for (let n = 100; n < samples; n++) sum += (d[n] - y[n]) ** 2;
      return sum;
    };
    const longer = (await error(52)) / (await error(20));
    const { share } = tests.extra?.find(({ side }) => side === 'after') ?? { share: 0 };
    expect(Math.abs(10 * Math.log10((1 - share) / longer))).toBeLessThan(0.1);
  });

  it('names the input with the most, and a caution from half a decibel on', async () => {
    const x = [autoregression(samples, 1, 0.5), autoregression(samples, 2, 0.5)];
    const y = [convolve(x[0], path(20)), convolve(x[1], path(40))];
    const noise = normals(3, samples);
    const take = takeOf(
      x,
      y[0].map((v, n) => v + y[1][n] + 0.05 * noise[n]),
    );
    const found = residualFindings(await residualTestsOf([take], shape), ['a', 'b'], 20);
    expect(found).toMatchObject([{ code: 'taps-missing', severity: 'caution', channel: 'b' }]);
    const weak = takeOf(
      x,
      y[0].map((v, n) => v + y[1][n] + noise[n]),
    );
    expect(residualFindings(await residualTestsOf([weak], shape), ['a', 'b'], 20)).toMatchObject([
      { code: 'taps-missing', severity: 'note', channel: 'b' },
    ]);
  });

  it('looks at no input ahead of a predictor, and at nothing where there are too few samples', async () => {
    const x = autoregression(samples, 4, 0.9);
    const predictor = { ...shape, delay: -1 };
    const tests = await residualTestsOf([takeOf([x], x)], predictor, 'predict');
    expect(tests.extra?.map(({ side }) => side)).toEqual(['after']);
    expect(codes(tests)).toEqual([]);
    const few = await residualTestsOf([takeOf([x.slice(0, 300)], x.slice(1, 301))], shape);
    expect([few.extra, few.inputs[0].bound]).toEqual([null, Number.NaN]);
  });
});
