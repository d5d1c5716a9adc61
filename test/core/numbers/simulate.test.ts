import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { exactSums } from '../../../core/numbers/exactSums';
import type { IntegerFormat } from '../../../core/numbers/scaling';
import { integerSimulator } from '../../../core/numbers/simulate';
import { wordRange } from '../../../core/numbers/words';
import { accumulatorBound, worstCase } from '../../../core/numbers/worstCase';
import { seededUniform } from '../../support/random';

/** The contract's arithmetic in big integers alone: every addition on its own, then floor, then the output word. */
function reference(values: number[][], inputs: number[][], f: IntegerFormat) {
  const M = values[0].length;
  const max = (1n << BigInt(f.accumulator - 1)) - 1n;
  const min = -(1n << BigInt(f.accumulator - 1));
  const outMax = (1n << BigInt(f.outputWord - 1)) - 1n;
  const outMin = -(1n << BigInt(f.outputWord - 1));
  let overflows = 0;
  let outputOverflows = 0;
  const output: number[] = [];
  for (let n = M - 1; n < inputs[0].length; n++) {
    let acc = 0n;
    let whole = 0n;
    let clamped = false;
    const add = (term: bigint) => {
      whole += term;
      acc += term;
      if (acc <= max && acc >= min) return;
      if (f.accumulatorOverflow === 'wrap') acc = BigInt.asIntN(f.accumulator, acc);
      else {
        acc = acc > max ? max : min;
        clamped = true;
      }
    };
    for (let r = 0; r < values.length; r++) {
      for (let k = 0; k < M; k++) add(BigInt(values[r][k]) * BigInt(inputs[r][n - k]));
    }
    if (f.fractionBits > 0) add(1n << BigInt(f.fractionBits - 1));
    if (clamped || (f.accumulatorOverflow === 'wrap' && acc !== whole)) overflows++;
    let y = acc >> BigInt(f.fractionBits);
    if (y > outMax || y < outMin) {
      outputOverflows++;
      y = f.overflow === 'wrap' ? BigInt.asIntN(f.outputWord, y) : y > outMax ? outMax : outMin;
    }
    output.push(Number(y));
  }
  return { output, accumulatorOverflows: overflows, outputOverflows };
}

const word = fc.constantFrom(8, 12, 16, 24, 32);
const overflow = fc.constantFrom('wrap' as const, 'saturate' as const);

const cases = fc
  .record({
    word,
    inputWord: word,
    outputWord: word,
    accumulator: fc.integer({ min: 8, max: 64 }),
    accumulatorOverflow: overflow,
    overflow,
    inputs: fc.integer({ min: 1, max: 3 }),
    length: fc.integer({ min: 1, max: 6 }),
    samples: fc.integer({ min: 1, max: 8 }),
  })
  .chain((shape) => {
    const within = (bits: number) => {
      const { min, max } = wordRange(bits);
      return fc.oneof(fc.integer({ min, max }), fc.constantFrom(min, max, 0, -1));
    };
    const rows = (bits: number, count: number) =>
      fc.array(fc.array(within(bits), { minLength: count, maxLength: count }), {
        minLength: shape.inputs,
        maxLength: shape.inputs,
      });
    return fc.record({
      format: fc
        .integer({ min: 0, max: shape.accumulator - 2 })
        .map((fractionBits): IntegerFormat => ({ ...shape, fractionBits })),
      values: rows(shape.word, shape.length),
      inputs: rows(shape.inputWord, shape.length - 1 + shape.samples),
    });
  });

describe('integerSimulator', () => {
  it('equals the same arithmetic in big integers, overflow or not', () => {
    fc.assert(
      fc.property(cases, ({ format, values, inputs }) => {
        const got = integerSimulator(
          values.map((row) => Float64Array.from(row)),
          format,
        )(inputs.map((row) => Float64Array.from(row)));
        const want = reference(values, inputs, format);
        expect(Array.from(got.output, (v) => v + 0)).toEqual(want.output);
        expect(got.accumulatorOverflows).toBe(want.accumulatorOverflows);
        expect(got.outputOverflows).toBe(want.outputOverflows);
      }),
      { numRuns: 3000 },
    );
  });
});

describe('exactSums', () => {
  it.each([
    [16, 16, 1],
    [16, 16, 3],
    [24, 16, 2],
    [32, 12, 1],
  ])('are exact for %i-bit taps on %i-bit words, %i inputs, at the extremes', (word, inputWord, rows) => {
    const uniform = seededUniform(word + rows);
    const extremes = (bits: number, count: number) => {
      const { min, max } = wordRange(bits);
      return Float64Array.from({ length: count }, () => {
        const u = uniform();
        return u < 0.3 ? min : u < 0.6 ? max : Math.floor(min + uniform() * (max - min + 1));
      });
    };
    const length = 200;
    const values = Array.from({ length: rows }, () => extremes(word, length));
    const inputs = Array.from({ length: rows }, () => extremes(inputWord, 5000));
    const sums = exactSums(values, 2 ** (inputWord - 1))(inputs);
    expect(sums.length).toBe(5000 - length + 1);
    for (let n = 0; n < sums.length; n += 7) {
      let want = 0n;
      for (let r = 0; r < rows; r++) {
        for (let k = 0; k < length; k++) want += BigInt(values[r][k]) * BigInt(inputs[r][n + length - 1 - k]);
      }
      expect(BigInt(sums[n])).toBe(want);
    }
  });
});

describe('accumulatorBound', () => {
  // Common practice: max|y| ≤ max|x| Σ|w|, which the two-sided bound never passes and inputs of both signs reach.
  it('keeps within max|x| Σ|w| and covers every sum of inputs that keep to their ranges', () => {
    fc.assert(
      fc.property(cases, fc.integer({ min: 0, max: 100 }), ({ format, values, inputs }, share) => {
        const largest = Math.floor((wordRange(format.inputWord).max * share) / 100);
        const range = { min: -largest, max: largest };
        const rows = values.map((row) => Float64Array.from(row));
        const bare = { ...format, fractionBits: 0 };
        const bound = accumulatorBound(
          rows,
          bare,
          rows.map(() => range),
        );
        const sum = values.flat().reduce((total, v) => total + BigInt(Math.abs(v)), 0n);
        expect(bound.max).toBe(sum * BigInt(largest));
        expect(bound.min).toBe(-sum * BigInt(largest));
        const M = values[0].length;
        for (let n = M - 1; n < inputs[0].length; n++) {
          let acc = 0n;
          values.forEach((row, r) => {
            row.forEach((v, k) => {
              const x = Math.max(range.min, Math.min(range.max, inputs[r][n - k]));
              acc += BigInt(v) * BigInt(x);
            });
          });
          expect(acc <= bound.max && acc >= bound.min).toBe(true);
        }
      }),
      { numRuns: 500 },
    );
  });
});

describe('worstCase', () => {
  it('is never exceeded and is reached by the input made for it', () => {
    fc.assert(
      fc.property(cases, ({ format, values, inputs }) => {
        const worst = worstCase(
          values.map((row) => Float64Array.from(row)),
          format,
        );
        const rounding = format.fractionBits > 0 ? 1n << BigInt(format.fractionBits - 1) : 0n;
        const sum = (x: (r: number, k: number) => number) =>
          values.reduce(
            (total, row, r) => total + row.reduce((s, v, k) => s + BigInt(v) * BigInt(x(r, k)), 0n),
            rounding,
          );
        const M = values[0].length;
        for (let n = M - 1; n < inputs[0].length; n++) {
          const acc = sum((r, k) => inputs[r][n - k]);
          expect(acc <= worst.max && acc >= worst.min).toBe(true);
        }
        const { min, max } = wordRange(format.inputWord);
        expect(sum((r, k) => (values[r][k] > 0 ? max : min))).toBe(worst.max);
        expect(sum((r, k) => (values[r][k] > 0 ? min : max))).toBe(worst.min);
        const span = 1n << BigInt(worst.bits - 1);
        expect(worst.max < span && worst.min >= -span).toBe(true);
      }),
      { numRuns: 1000 },
    );
  });
});
