import { describe, expect, it } from 'vitest';
import { cutFolds, samplesOf } from '../../../core/choice/folds';
import { intersect, totalLength } from '../../../core/pair/intervals';
import { normals } from '../../support/random';
import { takeOf } from '../../support/takes';

const noise = normals(1, 10_000);
const take = (fit: { from: number; to: number }[], heldOut: { from: number; to: number }[] = []) =>
  takeOf([noise], noise, { fit, heldOut });
const options = { length: 40, delays: [-5, 0, 10], measured: null };

describe('blocks of one take', () => {
  const folds = cutFolds([take([{ from: 1000, to: 7000 }])], options);

  it('are ten, equal, end to end, and cover all n of the fit', () => {
    expect(folds.by).toBe('blocks');
    const blocks = folds.folds.map((fold) => fold.blocks);
    expect(blocks.map((own) => samplesOf(own))).toEqual(new Array(10).fill(600));
    expect(blocks.flatMap(([{ intervals }]) => intervals).at(0)).toEqual({ from: 1000, to: 1600 });
    expect(folds.samples).toBe(6000);
    expect(folds.blocks).toBe(10);
  });

  it('have M + max |Δ| unused samples on both sides, and every other n is fitted on', () => {
    expect(folds.gap).toBe(50);
    for (const { training, blocks } of folds.folds) {
      const [{ intervals: rest }] = training;
      const [{ from, to }] = blocks[0].intervals;
      expect(intersect(rest, [{ from: from - 50, to: to + 50 }])).toEqual([]);
      expect(totalLength(rest)).toBe(6000 - (Math.min(7000, to + 50) - Math.max(1000, from - 50)));
    }
    expect(folds.leastTraining).toBe(6000 - 700);
  });

  it('are fewer where they would be shorter than two gaps, but two at least', () => {
    expect(cutFolds([take([{ from: 1000, to: 1550 }])], options).blocks).toBe(5);
    expect(cutFolds([take([{ from: 1000, to: 1120 }])], options).blocks).toBe(2);
  });

  it('may run over a gap between fit intervals, whose history counts for every candidate', () => {
    const fit = [
      { from: 1000, to: 1450 },
      { from: 2000, to: 3000 },
    ];
    const { all, folds: cut } = cutFolds([take(fit)], options);
    // After the gap come M - 1 samples of history and the largest delay; before it, for the smallest, five are lost.
    const used = [
      { from: 1000, to: 1445 },
      { from: 2039, to: 3000 },
    ];
    expect(all).toEqual([{ take: 0, intervals: used }]);
    const over = cut.find(({ blocks }) => blocks[0].intervals.length === 2);
    expect(over?.blocks[0].intervals.map(({ to }) => to).at(0)).toBe(1445);
    expect(over?.training[0].intervals.every(({ from, to }) => to <= 1445 - 50 || from >= 2039)).toBe(true);
  });
});

describe('several takes', () => {
  const takes = [
    take([{ from: 1000, to: 4000 }]),
    take([{ from: 0, to: 2000 }]),
    take([{ from: 500, to: 5500 }]),
  ];

  it('are left out one after the other, in blocks for the standard error', () => {
    const folds = cutFolds(takes, options);
    expect(folds.by).toBe('takes');
    expect(folds.folds.map(({ training }) => training.map((part) => part.take))).toEqual([
      [1, 2],
      [0, 2],
      [0, 1],
    ]);
    expect(folds.folds.map(({ blocks }) => blocks.map((part) => part.take))).toEqual([
      [0, 0, 0],
      [1, 1],
      [2, 2, 2, 2, 2],
    ]);
  });

  it('have their error taken only where it can be measured', () => {
    const bare = takes.map((one, t) =>
      t === 1 ? one : { ...one, disturbanceOnly: [{ from: 1500, to: 2500 }] },
    );
    const folds = cutFolds(bare, { ...options, measured: (one) => intersect(one.fit, one.disturbanceOnly) });
    expect(folds.folds.map(({ blocks }) => samplesOf(blocks))).toEqual([1000, 1000]);
    expect(folds.folds[0].training.map((part) => part.take)).toEqual([1, 2]);
  });
});
