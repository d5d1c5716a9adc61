import { describe, expect, it } from 'vitest';
import {
  cellAfterKey,
  cellAt,
  cellBox,
  labelled,
  placeIn,
  shadeOf,
  shadeRange,
} from '../../../webview/plots/mapCells';

const box = { left: 50, top: 10, width: 333, height: 101 };

describe('cells of a map', () => {
  it('cover the box without seams, the first row at the bottom', () => {
    const bottom = cellBox(box, 7, 4, { ix: 0, iy: 0 });
    expect(bottom.left).toBe(50);
    expect(bottom.top + bottom.height).toBe(111);
    for (let ix = 1; ix < 7; ix++) {
      const before = cellBox(box, 7, 4, { ix: ix - 1, iy: 0 });
      expect(cellBox(box, 7, 4, { ix, iy: 0 }).left).toBe(before.left + before.width);
    }
  });

  it('are found under the pointer', () => {
    for (let ix = 0; ix < 7; ix++) {
      for (let iy = 0; iy < 4; iy++) {
        const { left, top, width, height } = cellBox(box, 7, 4, { ix, iy });
        expect(cellAt(box, 7, 4, left + width / 2, top + height / 2)).toEqual({ ix, iy });
      }
    }
    expect(cellAt(box, 7, 4, 49, 50)).toBeNull();
    expect(cellAt(box, 7, 4, 100, 112)).toBeNull();
  });

  it('are walked by keys, up to the edges', () => {
    expect(cellAfterKey({ ix: 2, iy: 2 }, 7, 4, 'ArrowUp', false)).toEqual({ ix: 2, iy: 3 });
    expect(cellAfterKey({ ix: 2, iy: 2 }, 7, 4, 'ArrowRight', true)).toEqual({ ix: 6, iy: 2 });
    expect(cellAfterKey({ ix: 0, iy: 0 }, 7, 4, 'ArrowLeft', false)).toEqual({ ix: 0, iy: 0 });
    expect(cellAfterKey({ ix: 2, iy: 2 }, 7, 4, 'Enter', false)).toBeNull();
  });

  it('hold places between their values too', () => {
    expect(placeIn([1, 2, 4, 8], 4)).toBe(2);
    expect(placeIn([1, 2, 4, 8], 3)).toBe(1.5);
    expect(placeIn([1, 2, 4, 8], 99)).toBe(3);
    expect(placeIn([1, 2, 4, 8], 0)).toBe(0);
  });
});

describe('shades of a map', () => {
  it('are strongest for the lowest value and not spread by a few very bad ones', () => {
    const values = Array.from({ length: 100 }, (_, i) => -20 + i / 10);
    values[99] = 500;
    const range = shadeRange(values)!;
    expect(range.min).toBe(-20);
    expect(range.max).toBeLessThan(-9);
    expect(shadeOf(-20, range)).toBe(1);
    expect(shadeOf(500, range)).toBe(0);
  });

  it('need values, and manage with one', () => {
    expect(shadeRange([Number.NaN])).toBeNull();
    expect(shadeOf(3, shadeRange([3])!)).toBe(1);
  });

  it('have evenly spaced labels', () => {
    expect(labelled(33, 10)).toEqual([0, 4, 8, 12, 16, 20, 24, 28, 32]);
    expect(labelled(3, 10)).toEqual([0, 1, 2]);
  });
});
