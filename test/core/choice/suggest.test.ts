import { describe, expect, it } from 'vitest';
import { secondOpinions } from '../../../core/choice/opinions';
import type { SearchResult } from '../../../core/choice/searchResult';
import { suggest } from '../../../core/choice/suggest';

/** A result made by hand: one delay unless more are given, errors by length, delay, regularisation and block. */
function made(errors: number[][][][], change: Partial<SearchResult> = {}): SearchResult {
  const [delays, rhos, blocks] = [errors[0].length, errors[0][0].length, errors[0][0][0].length];
  return {
    grid: {
      lengths: errors.map((_, l) => 10 * (l + 1)),
      delays: Array.from({ length: delays }, (_, d) => d),
      regularisations: Array.from({ length: rhos }, (_, r) => [1e-4, 1e-3, 1e-2, 1e-1][r]),
    },
    inputs: 1,
    blocks,
    samples: 1000,
    errors: Float64Array.from(errors.flat(3)),
    desired: new Float64Array(delays * blocks).fill(100),
    fit: new Float64Array(errors.length * delays * rhos).fill(1),
    fitDesired: new Float64Array(delays).fill(10),
    freedom: new Float64Array(errors.length * rhos),
    ...change,
  };
}

describe('the rule', () => {
  it('compares block by block: a difference that every block shows counts however the level varies', () => {
    // 2 % worse in every block, whose levels differ by 20 dB: nothing unpaired would see it.
    const levels = [1, 1.2, 100, 120, 10, 12];
    const found = suggest(made([[[levels.map((v) => 1.02 * v)]], [[levels]]]), null);
    expect(found?.chosen.length).toBe(20);
    // Worse by about as much in the sum, but by chance: better in half of the blocks.
    const chance = levels.map((v, b) => (b % 2 === 0 ? 0.9 : 1.1) * v);
    expect(suggest(made([[[chance]], [[levels]]]), null)?.chosen.length).toBe(10);
  });

  it('takes a difference below 0.05 dB for none, however sure it is', () => {
    const levels = [1, 1.2, 100, 120, 10, 12];
    const worse = (factor: number) =>
      suggest(made([[[levels.map((v) => factor * v)]], [[levels]]]), null)?.chosen.length;
    // 10 log10(1.01) = 0.043, 10 log10(1.012) = 0.052.
    expect([worse(1.01), worse(1.012)]).toEqual([10, 20]);
  });

  it('takes the standard error of the paired sum: by hand for three blocks', () => {
    const found = suggest(made([[[[3, 2, 4]]], [[[1, 1, 1]]]]), null);
    // Differences 2, 1, 3 of 300: sum 6, standard error √(3/2 · 2).
    const [step] = found?.steps ?? [];
    expect(step.excess).toBeCloseTo(6 / 300, 12);
    expect(step.standardError).toBeCloseTo(Math.sqrt(3) / 300, 12);
    expect(found?.chosen.length).toBe(20);
  });

  it('then takes the delay of least error, then the largest regularisation within the same bound', () => {
    const at = (value: number) => [value + 0.1, value - 0.1, value];
    const found = suggest(
      made([
        [
          [at(5), at(4), at(4), at(9)],
          [at(4), [3.2, 2.8, 3.01], [3.3, 2.7, 3.02], at(9)],
        ],
        [
          [at(3), at(3), at(4), at(9)],
          [at(4), at(4), at(4), at(9)],
        ],
      ]),
      null,
    );
    expect(found?.chosen).toMatchObject({ length: 10, delay: 1, regularisation: 1e-2 });
    expect(found?.best).toMatchObject({ length: 20, delay: 0, regularisation: 1e-4 });
  });

  it('keeps the delay where it is not free, and leaves out what could not be solved', () => {
    const found = suggest(
      made([
        [[[1, 1]], [[Number.NaN, 1]]],
        [[[1, 1]], [[2, 2]]],
      ]),
      1,
    );
    expect(found?.chosen).toMatchObject({ length: 20, delay: 1 });
    expect(suggest(made([[[[Number.NaN, 1]]]]), null)).toBeNull();
  });
});

describe('second opinions', () => {
  it('are the least of AIC, MDL and generalised cross-validation, by their formulas', () => {
    // Fits of 10, 20 and 30 taps; ln N = 6.908. AIC: 10 more taps must save 2 %, MDL: 6.7 %; GCV: 2 %.
    const fit = Float64Array.from([1, 0.96, 0.958]);
    const freedom = Float64Array.from([10, 20, 30]);
    const given = made([[[[1, 1]]], [[[1, 1]]], [[[1, 1]]]], { fit, freedom });
    expect(secondOpinions(given, null).map(({ criterion, length }) => [criterion, length])).toEqual([
      ['aic', 20],
      ['mdl', 10],
      ['gcv', 20],
    ]);
  });
});
