import { describe, expect, it } from 'vitest';
import { addToColumns, columnsFromOutline, planColumns } from '../../../core/recordings/envelope';
import { measureLevels } from '../../../core/recordings/measureLevels';
import { normals } from '../../support/random';
import { pace, recordingOf } from '../../support/takes';

/** Reference: the extremes found sample by sample. */
function extremes(samples: Float64Array, from: number, to: number): [number, number] {
  const part = samples.subarray(Math.max(0, from), Math.min(samples.length, to));
  return [Math.min(...part), Math.max(...part)];
}

describe('columns of a waveform', () => {
  const samples = normals(1, 10_000);

  it('are the samples themselves where there is room for them', () => {
    const columns = planColumns(100, 300, 100, 64);
    addToColumns(columns, samples.subarray(0, 1000), 0);
    expect(columns.step).toBe(1);
    expect(columns.low).toEqual(samples.slice(100, 300));
    expect(columns.high).toEqual(columns.low);
  });

  it('hold the extremes of their samples, brought in blocks of any size', () => {
    const columns = planColumns(37, 9_000, 123, 0);
    for (let at = 0; at < samples.length; at += 777)
      addToColumns(columns, samples.subarray(at, at + 777), at);
    for (let c = 0; c < columns.low.length; c++) {
      const from = columns.from + c * columns.step;
      const [low, high] = extremes(samples, from, from + columns.step);
      expect([columns.low[c], columns.high[c]]).toEqual([low, high]);
    }
  });

  it('come from the outline where they are as wide as its runs', async () => {
    const long = normals(2, 5_000_000);
    const { outlines } = await measureLevels(recordingOf([long]), pace);
    const [outline] = outlines;
    expect(outline.step).toBe(128);
    const columns = planColumns(1_000_000, 4_000_000, 1000, outline.step);
    columnsFromOutline(columns, outline);
    expect(columns.step % outline.step).toBe(0);
    for (const c of [0, 1, 500, columns.low.length - 1]) {
      const from = columns.from + c * columns.step;
      const [low, high] = extremes(long, from, from + columns.step);
      expect([columns.low[c], columns.high[c]]).toEqual([Math.fround(low), Math.fround(high)]);
    }
  });

  it('leave a gap where no sample is a number', () => {
    const broken = samples.slice(0, 400).fill(Number.NaN, 100, 200);
    broken[250] = Number.POSITIVE_INFINITY;
    const columns = planColumns(0, 400, 4, 0);
    addToColumns(columns, broken, 0);
    expect(columns.step).toBe(100);
    expect(columns.low[1]).toBeNaN();
    expect(columns.high[2]).toBe(
      Math.max(...broken.filter((v, n) => n >= 200 && n < 300 && Number.isFinite(v))),
    );
  });

  it('are none where there is nothing', () => {
    expect(planColumns(5, 5, 100, 64).low).toHaveLength(0);
    expect(planColumns(5, 3, 100, 0).low).toHaveLength(0);
  });
});
