import { describe, expect, it } from 'vitest';
import type { IntegerFormat, Scaling } from '../../../core/numbers/scaling';
import type { TargetFilter } from '../../../core/numbers/targetFilter';
import { testVectors } from '../../../core/numbers/testVectors';
import { worstCase } from '../../../core/numbers/worstCase';

const format: IntegerFormat = {
  word: 8,
  fractionBits: 5,
  inputWord: 8,
  outputWord: 8,
  accumulator: 24,
  accumulatorOverflow: 'wrap',
  overflow: 'saturate',
};
const scaling: Scaling = {
  inputFullScale: [1, 1],
  outputFullScale: 1,
  inputCount: [1, 1],
  outputCount: 1,
  inputMeanCounts: [0, 0],
  desiredMeanCounts: 0,
};
const values = [Float64Array.of(3, -7, 0, 12), Float64Array.of(-128, 127, 5, -1)];
const target: TargetFilter = { values, scaling, format };
const excerpt = [Float64Array.of(1, 2, 3, 4, 5), Float64Array.of(-5, 4, -3, 2, -1)];

/** The accumulator after sample n, rounding term included, in big integers. */
function accumulator(input: readonly Float64Array[], n: number): bigint {
  let acc = 1n << BigInt(format.fractionBits - 1);
  values.forEach((row, r) => {
    row.forEach((v, k) => {
      acc += BigInt(v) * BigInt(n >= k ? input[r][n - k] : 0);
    });
  });
  return acc;
}

describe('test vectors', () => {
  const { input, expected, parts } = testVectors(target, excerpt);
  const place = (part: string, of: number | null = null) => {
    const found = parts.find((entry) => entry.part === part && entry.input === of);
    if (found === undefined) throw new Error(part);
    return found;
  };

  it('follow one another without gaps', () => {
    expect(parts.map(({ part }) => part)).toEqual([
      'silence',
      'impulse',
      'impulse',
      'excerpt',
      'highest',
      'lowest',
    ]);
    parts.forEach(({ from, to }, i) => {
      expect(from).toBe(i === 0 ? 0 : parts[i - 1].to);
      expect(to).toBeGreaterThan(from);
    });
    expect(parts.at(-1)?.to).toBe(expected.length);
    for (const row of input) expect(row.length).toBe(expected.length);
  });

  it('reach the bounds of the accumulator exactly', () => {
    const worst = worstCase(values, format);
    expect(accumulator(input, place('highest').to - 1)).toBe(worst.max);
    expect(accumulator(input, place('lowest').to - 1)).toBe(worst.min);
  });

  it('show each tap in the response to the impulses', () => {
    values.forEach((row, r) => {
      const { from } = place('impulse', r);
      row.forEach((v, k) => {
        const y = Math.floor((v * 127 + 16) / 32);
        expect(expected[from + k] + 0).toBe(Math.max(-128, Math.min(127, y)));
      });
    });
    expect(expected.slice(0, 16).every((y) => y === 0)).toBe(true);
  });

  it('hold the excerpt as given', () => {
    const { from, to } = place('excerpt');
    expect(input.map((row) => row.slice(from, to))).toEqual(excerpt);
  });

  it('are the outputs of the arithmetic in big integers', () => {
    expected.forEach((y, n) => {
      const floor = accumulator(input, n) >> 5n;
      expect(BigInt(y)).toBe(floor > 127n ? 127n : floor < -128n ? -128n : floor);
    });
  });

  it('are none where none are asked for, and have no extremes in floats', () => {
    expect(testVectors(target, [new Float64Array(0), new Float64Array(0)]).parts).toEqual([]);
    const floats = testVectors({ values, scaling, format: 'float32' }, excerpt);
    expect(floats.parts.map(({ part }) => part)).toEqual(['silence', 'impulse', 'impulse', 'excerpt']);
  });
});
