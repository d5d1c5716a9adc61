import type { IntegerFormat } from './scaling';
import { clamp, powerOfTwo, wordRange, wrap } from './words';
import { worstCase } from './worstCase';

/** Output of a bit-true run. */
export interface Simulation {
  /** One output for each n, in counts. */
  output: Float64Array;
  /** Outputs whose accumulator wrapped or was clamped on its way. */
  accumulatorOverflows: number;
  /** Outputs that did not fit the output word. */
  outputOverflows: number;
}

/** Runs a filter over inputs that begin with M-1 samples of history: `inputs[r][n + M - 1]` is x_r[n]. */
export type Simulator = (inputs: readonly Float64Array[]) => Simulation;

/**
 * The integer filter, bit by bit: `acc = Σ_r Σ_k v_r[k] x_r[n-k]` in this order, then the rounding term; each
 * addition wraps or clamps; `floor(acc / 2^F)`; then the output word saturates or wraps.
 * Where the worst case fits 53 bits the sums are exact in doubles, otherwise big integers are used (slower).
 * @param values integer coefficients, one row an input, newest-first
 */
export function integerSimulator(values: readonly Float64Array[], format: IntegerFormat): Simulator {
  const worst = worstCase(values, format);
  if (worst.bits > 53 || format.accumulator > 53) {
    return worst.bits <= Math.min(53, format.accumulator)
      ? doubleSimulator(values, format, true)
      : bigSimulator(values, format);
  }
  return doubleSimulator(values, format, worst.bits <= format.accumulator);
}

function doubleSimulator(values: readonly Float64Array[], format: IntegerFormat, safe: boolean): Simulator {
  const rounding = format.fractionBits > 0 ? powerOfTwo(format.fractionBits - 1) : 0;
  const unit = powerOfTwo(format.fractionBits);
  const accumulator = wordRange(format.accumulator);
  const saturates = format.accumulatorOverflow === 'saturate';
  return (inputs) =>
    run(values, inputs, format, (n) => {
      let acc = 0;
      let overflowed = false;
      for (let r = 0; r < values.length; r++) {
        const row = values[r];
        const x = inputs[r];
        const newest = n + row.length - 1;
        if (safe) {
          for (let k = 0; k < row.length; k++) acc += row[k] * x[newest - k];
          continue;
        }
        for (let k = 0; k < row.length; k++) {
          acc += row[k] * x[newest - k];
          if (acc > accumulator.max || acc < accumulator.min) {
            overflowed = true;
            acc = saturates ? clamp(acc, accumulator) : wrap(acc, accumulator);
          }
        }
      }
      acc += rounding;
      if (!safe && acc > accumulator.max) {
        overflowed = true;
        acc = saturates ? accumulator.max : wrap(acc, accumulator);
      }
      return { value: Math.floor(acc / unit), overflowed };
    });
}

function bigSimulator(values: readonly Float64Array[], format: IntegerFormat): Simulator {
  const rows = values.map((row) => Array.from(row, BigInt));
  const bits = format.accumulator;
  const max = (1n << BigInt(bits - 1)) - 1n;
  const min = -max - 1n;
  const rounding = format.fractionBits > 0 ? 1n << BigInt(format.fractionBits - 1) : 0n;
  const shift = BigInt(format.fractionBits);
  const saturates = format.accumulatorOverflow === 'saturate';
  return (inputs) => {
    const x = inputs.map((samples) => Array.from(samples, BigInt));
    return run(values, inputs, format, (n) => {
      let acc = 0n;
      let overflowed = false;
      const add = (term: bigint) => {
        acc += term;
        if (acc > max || acc < min) {
          overflowed = true;
          acc = saturates ? (acc > max ? max : min) : BigInt.asIntN(bits, acc);
        }
      };
      rows.forEach((row, r) => {
        const newest = n + row.length - 1;
        for (let k = 0; k < row.length; k++) add(row[k] * x[r][newest - k]);
      });
      add(rounding);
      // An output word has at most 32 bits; what lies far outside needs no exact double to be told apart.
      const value = acc >> shift;
      return {
        value: format.overflow === 'wrap' ? Number(BigInt.asIntN(format.outputWord, value)) : Number(value),
        overflowed,
        outside: !fitsWord(value, format.outputWord),
      };
    });
  };
}

function fitsWord(value: bigint, bits: number): boolean {
  return BigInt.asIntN(bits, value) === value;
}

function run(
  values: readonly Float64Array[],
  inputs: readonly Float64Array[],
  format: IntegerFormat,
  outputAt: (n: number) => { value: number; overflowed: boolean; outside?: boolean },
): Simulation {
  const count = inputs[0].length - (values[0].length - 1);
  const output = new Float64Array(count);
  const word = wordRange(format.outputWord);
  let accumulatorOverflows = 0;
  let outputOverflows = 0;
  for (let n = 0; n < count; n++) {
    const { value, overflowed, outside } = outputAt(n);
    if (overflowed) accumulatorOverflows++;
    if (outside ?? (value > word.max || value < word.min)) outputOverflows++;
    output[n] = format.overflow === 'saturate' ? clamp(value, word) : wrap(value, word);
  }
  return { output, accumulatorOverflows, outputOverflows };
}

/** The filter in float arithmetic: each product and each sum rounded to the word, in the order of the integer filter. */
export function floatSimulator(values: readonly Float64Array[], word: 'float32' | 'float64'): Simulator {
  const round = word === 'float32' ? Math.fround : (value: number) => value;
  return (inputs) => {
    const count = inputs[0].length - (values[0].length - 1);
    const output = new Float64Array(count);
    for (let n = 0; n < count; n++) {
      let acc = 0;
      for (let r = 0; r < values.length; r++) {
        const row = values[r];
        const newest = n + row.length - 1;
        for (let k = 0; k < row.length; k++) acc = round(acc + round(row[k] * inputs[r][newest - k]));
      }
      output[n] = acc;
    }
    return { output, accumulatorOverflows: 0, outputOverflows: 0 };
  };
}
