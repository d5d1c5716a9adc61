import { describe, expect, it } from 'vitest';
import { pack, samePacked, unpack } from '../../../core/protocol/pack';

describe('pack', () => {
  const value = {
    name: 'a "quoted" name',
    none: null,
    list: [1, { curve: Float64Array.of(1, Number.NaN, Number.NEGATIVE_INFINITY) }],
    empty: new Float64Array(0),
    // A subarray ships its own values alone.
    part: Float64Array.of(9, 8, 7, 6).subarray(1, 3),
    series: 'a key of the same name as the mark',
  };

  it('brings a value back, numbers that JSON has no word for included', () => {
    const packed = pack(value);
    expect(packed.series.byteLength).toBe(8 * 5);
    expect(unpack(packed)).toEqual(value);
  });

  it('goes through JSON with its buffer beside it, as a message to a page does', () => {
    const { json, series } = pack(value);
    expect(unpack({ json: JSON.parse(JSON.stringify(json)), series: series.slice(0) })).toEqual(value);
  });

  it('tells the same value from another', () => {
    expect(samePacked(pack(value), pack(structuredClone(value)))).toBe(true);
    expect(samePacked(pack(value), pack({ ...value, part: Float64Array.of(8, 7.5) }))).toBe(false);
    expect(samePacked(pack(value), pack({ ...value, name: 'other' }))).toBe(false);
  });
});
