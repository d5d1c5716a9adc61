import { describe, expect, it } from 'vitest';
import { delaysFor, lengthsUpTo, longestLengths, regularisationsFor } from '../../../core/choice/grid';
import { planSearch } from '../../../core/choice/plan';
import { jobs } from '../../../core/document/pairingDocument';
import { normals } from '../../support/random';
import { takeOf } from '../../support/takes';

const noise = normals(1, 12_000);
const take = (samples: number) => takeOf([noise], noise, { fit: [{ from: 0, to: samples }] });
const centre = { length: 64, delay: 0, regularisation: 1e-6 };

describe('the grid', () => {
  it.each(jobs)('%s: 24 lengths, 33 delays and 9 regularisations, the own ones among them', (job) => {
    for (const own of [
      { length: 64, delay: -1, regularisation: 1e-6 },
      { length: 100, delay: -3, regularisation: 3e-5 },
      { length: 257, delay: -20, regularisation: 0 },
    ]) {
      const plan = planSearch([take(12_000)], job, own, false);
      if ('refused' in plan) throw new Error('refused');
      const { lengths, delays, regularisations } = plan.grid;
      expect([lengths.length, delays.length, regularisations.length]).toEqual([24, 33, 9]);
      expect(lengths).toContain(own.length);
      expect(delays).toContain(own.delay);
      expect(regularisations).toContain(own.regularisation);
      for (const list of [lengths, delays, regularisations]) {
        expect([...new Set(list)].sort((a, b) => a - b)).toEqual(list);
      }
    }
  });

  it('goes up to four times the length, as far as there are ten samples for each tap and each sample of gap', () => {
    const longest = (samples: number, length = 64) => {
      const plan = planSearch([take(samples)], 'identify', { ...centre, length }, false);
      return 'refused' in plan ? null : plan.grid.lengths.at(-1);
    };
    expect(longest(12_000)).toBe(256);
    // 10 (160 + 24) = 1840 of the 2000 - 159 that have 159 samples before them.
    expect(longest(2000)).toBe(160);
    expect(longest(1998)).toBe(128);
    expect(longest(800)).toBe(64);
    expect(longest(12_000, 5)).toBe(32);
    expect(longestLengths(64, 1024)).toEqual([256, 224, 192, 160, 128, 112, 96, 80, 64]);
    expect(lengthsUpTo(20, 20)).toEqual([1, 2, 3, 4, 5, 6, 7, 8, 10, 12, 14, 16, 20]);
  });

  it('suits the job: lag rather than lead for a path, over the filter for an equaliser, horizons for a predictor', () => {
    expect(delaysFor('cancel', centre)).toEqual(Array.from({ length: 33 }, (_, i) => i - 16));
    expect(delaysFor('identify', centre).at(0)).toBe(-24);
    expect(delaysFor('equalise', { ...centre, delay: 32 })).toEqual(
      Array.from({ length: 33 }, (_, i) => 2 * i),
    );
    expect(delaysFor('predict', { ...centre, delay: -1 })).toEqual(
      Array.from({ length: 33 }, (_, i) => i - 33),
    );
    expect(delaysFor('predict', { ...centre, delay: -40 }).at(-1)).toBe(-24);
  });

  it('puts an own regularisation in the place of the nearest decade, and none in that of the least', () => {
    expect(regularisationsFor({ ...centre, regularisation: 2e-4 })).toEqual([
      1e-8, 1e-7, 1e-6, 1e-5, 2e-4, 1e-3, 1e-2, 1e-1, 1,
    ]);
    expect(regularisationsFor({ ...centre, regularisation: 0 })[0]).toBe(0);
  });
});

describe('the plan', () => {
  it('leaves out delays at which the desired signal would lie inside the filter', () => {
    const plan = planSearch([take(12_000)], 'cancel', { ...centre, delay: -1 }, true);
    expect('grid' in plan && plan.grid.delays).toEqual(Array.from({ length: 17 }, (_, i) => i - 17));
  });

  it('refuses fit intervals in which no block can be left out, and says so where there are few', () => {
    const refused = planSearch([take(220)], 'cancel', centre, false);
    expect('refused' in refused && refused.refused.code).toBe('too-short-to-choose');
    const few = planSearch([take(600)], 'cancel', centre, false);
    expect('findings' in few && few.findings.map(({ code }) => code)).toEqual(['few-blocks']);
  });
});
