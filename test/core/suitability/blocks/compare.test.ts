import { describe, expect, it } from 'vitest';
import { compareErrors, proves } from '../../../../core/suitability/blocks/compare';
import { studentPoint } from '../../../../core/suitability/blocks/studentPoint';
import { windowsOver } from '../../../../core/suitability/blocks/windows';

describe('windowsOver', () => {
  it('spreads windows evenly, inside the intervals and free of overlaps', () => {
    const intervals = [
      { from: 10, to: 1010 },
      { from: 1500, to: 1550 },
      { from: 2000, to: 9000 },
    ];
    for (const most of [1, 3, 8, 100]) {
      const windows = windowsOver(intervals, 100, most);
      expect(windows).toHaveLength(Math.min(most, 80));
      windows.forEach(({ from, to }, i) => {
        expect(to - from).toBe(100);
        expect(intervals.some((whole) => whole.from <= from && to <= whole.to)).toBe(true);
        if (i > 0) expect(from).toBeGreaterThanOrEqual(windows[i - 1].to);
      });
    }
    // Seven eighths of the slots lie in the third interval.
    expect(windowsOver(intervals, 100, 8).filter(({ from }) => from >= 2000)).toHaveLength(7);
    expect(windowsOver(intervals, 8000, 4)).toEqual([]);
  });
});

describe('comparisons', () => {
  it('have the gain and the scatter of their blocks', () => {
    const others = [10, 12, 9, 11, 10, 12, 9, 11];
    const same = compareErrors(
      others.map((e) => e / 2),
      others,
    )!;
    expect(same.gainDb).toBeCloseTo(3.0103, 4);
    expect(same.standardErrorDb).toBeCloseTo(0, 10);
    expect(proves(same, 1)).toBe(true);
    expect(proves(same, 3.1)).toBe(false);
    const ragged = compareErrors([1, 12, 1, 11, 1, 12, 1, 11], others)!;
    expect(proves(ragged, 1)).toBe(false);
    expect(compareErrors([1, 1, 1], [2, 2, 2])).toBeNull();
  });

  // SciPy 1.10's stats.t.ppf(1 - 5e-5, freedom).
  it.each([
    [5, 11.178],
    [8, 7.12],
    [10, 6.211],
    [20, 4.837],
    [30, 4.482],
  ])('ask for Student’s point at %i degrees of freedom', (freedom, wanted) => {
    expect(Math.abs(studentPoint(freedom) / wanted - 1)).toBeLessThan(freedom < 8 ? 0.07 : 0.015);
  });
});
