import { execFileSync } from 'node:child_process';
import { describe, expect, it } from 'vitest';
import { ljungBox } from '../../../core/confidence/portmanteau';
import { chiSquareTail } from '../../../core/figures/chiSquare';
import { needs, python } from '../../support/programs';
import { normals } from '../../support/random';

function correlation(e: Float64Array, lags: number): Float64Array {
  return Float64Array.from({ length: lags + 1 }, (_, k) => {
    let sum = 0;
    for (let n = k; n < e.length; n++) sum += e[n] * e[n - k];
    return sum;
  });
}

/** What a Python script makes of a JSON value on its standard input. */
function ask<T>(script: string, value: unknown): T {
  return JSON.parse(execFileSync(python, ['-c', script], { input: JSON.stringify(value), encoding: 'utf8' }));
}

describe('the tail of the chi-square law', () => {
  // Abramowitz & Stegun, table 26.8 (from memory).
  it.each([
    [3.841459, 1, 0.05],
    [18.30704, 10, 0.05],
    [37.56623, 20, 0.01],
    [124.3421, 100, 0.05],
  ])('of %f with %i degrees of freedom is %f', (value, degrees, probability) => {
    expect(chiSquareTail(value, degrees)).toBeCloseTo(probability, 6);
  });

  it.skipIf(!needs('scipy'))('is that of scipy.stats.chi2.sf', () => {
    const places = [0.3, 1, 2.7, 20, 63.4, 1000].flatMap((degrees) =>
      [0.01, 0.5, 0.99, 1.01, 1.3, 3, 8].map((share) => [share * degrees, degrees]),
    );
    const expected = ask<number[]>(
      'import json, sys, scipy.stats as s\nprint(json.dumps([s.chi2.sf(x, k) for x, k in json.load(sys.stdin)]))',
      places,
    );
    places.forEach(([value, degrees], i) => {
      const got = chiSquareTail(value, degrees);
      expect(Math.abs(got - expected[i]), `${value}, ${degrees}`).toBeLessThan(
        1e-9 * expected[i] + 1e-12 * (1 - expected[i]),
      );
    });
  });
});

describe('the test of Ljung & Box', () => {
  const e = normals(3, 500).map((v, n, all) => v + 0.15 * (all[n - 1] ?? 0));

  it.skipIf(!needs('scipy'))(
    'has the statistic and probability that NumPy and SciPy make of the formula',
    () => {
      const script = `import json, sys, numpy as np, scipy.stats as s
e = np.array(json.load(sys.stdin))
N, m, fitted = len(e), 15, 3
full = np.correlate(e, e, mode='full')[N - 1:]
rho = full[1:m + 1] / full[0]
q = N * (N + 2) * np.sum(rho ** 2 / (N - np.arange(1, m + 1)))
print(json.dumps([q, s.chi2.sf(q, m - fitted)]))`;
      const [statistic, probability] = ask<number[]>(script, Array.from(e));
      const got = ljungBox(correlation(e, 15), 500, 15, 3);
      expect(got).toMatchObject({ lags: 15, degreesOfFreedom: 12 });
      expect(got.statistic).toBeCloseTo(statistic, 9);
      expect(got.probability).toBeCloseTo(probability, 9);
    },
  );

  it('is below 5 % for about 5 % of white signals, and for a coloured one by far', () => {
    let low = 0;
    for (let seed = 1; seed <= 400; seed++) {
      if (ljungBox(correlation(normals(seed, 400), 20), 400, 20, 0).probability < 0.05) low++;
    }
    // 20 expected, standard deviation 4.4.
    expect(low).toBeGreaterThanOrEqual(8);
    expect(low).toBeLessThanOrEqual(33);
    const coloured = normals(1, 400);
    for (let n = 1; n < 400; n++) coloured[n] += 0.5 * coloured[n - 1];
    expect(ljungBox(correlation(coloured, 20), 400, 20, 0).probability).toBeLessThan(1e-6);
  });
});
