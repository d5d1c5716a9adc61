import { exactSums } from './exactSums';
import type { IntegerFormat } from './scaling';
import { splitSums, wideSums } from './wideSums';
import { clamp, powerOfTwo, type WordRange, wordRange, wrap } from './words';
import { worstCase } from './worstCase';

/** Output of a bit-true run. */
export interface Simulation {
  /** One output for each n, in counts. */
  output: Float64Array;
  /**
   * Outputs that the accumulator spoilt: its sum did not fit (`wrap`; sums that leave the range on their way and come
   * back do no harm there), or was clamped on its way (`saturate`).
   */
  accumulatorOverflows: number;
  /** Outputs that did not fit the output word. */
  outputOverflows: number;
}

/** Runs a filter over inputs that begin with M-1 samples of history: `inputs[r][n + M - 1]` is x_r[n]. */
export type Simulator = (inputs: readonly Float64Array[]) => Simulation;

/**
 * The integer filter, bit by bit: `acc = Σ_r Σ_k v_r[k] x_r[n-k]` in this order, then the rounding term; each
 * addition wraps or clamps; `floor(acc / 2^F)`; then the output word saturates or wraps.
 * Where no addition can clamp the order does not matter, and the sums are found fast; otherwise one by one.
 * @param values integer coefficients, one row an input, newest-first
 */
export function integerSimulator(values: readonly Float64Array[], format: IntegerFormat): Simulator {
  const { bits } = worstCase(values, format);
  const narrow = bits <= 53;
  if (format.accumulatorOverflow === 'saturate' && bits > format.accumulator) {
    return clampingSimulator(values, format);
  }
  if (narrow) return narrowSimulator(values, format);
  // Outputs beyond 2^53 lose low digits: no harm where they saturate.
  const exact = format.overflow === 'saturate' || bits - format.fractionBits <= 53;
  return bits <= format.accumulator && exact ? roomySimulator(values, format) : wideSimulator(values, format);
}

/** Sums in doubles; an accumulator of more than 53 bits cannot wrap here. */
function narrowSimulator(values: readonly Float64Array[], format: IntegerFormat): Simulator {
  const sums = exactSums(values, powerOfTwo(format.inputWord - 1));
  const rounding = format.fractionBits > 0 ? powerOfTwo(format.fractionBits - 1) : 0;
  const unit = powerOfTwo(format.fractionBits);
  const accumulator = wordRange(Math.min(format.accumulator, 54));
  const word = wordRange(format.outputWord);
  const intoWord = format.overflow === 'saturate' ? clamp : wrap;
  return (inputs) => {
    const output = sums(inputs);
    let accumulatorOverflows = 0;
    let outputOverflows = 0;
    for (let n = 0; n < output.length; n++) {
      let acc = output[n] + rounding;
      if (acc > accumulator.max || acc < accumulator.min) {
        accumulatorOverflows++;
        acc = wrap(acc, accumulator);
      }
      const value = Math.floor(acc / unit);
      if (value > word.max || value < word.min) outputOverflows++;
      output[n] = intoWord(value, word);
    }
    return { output, accumulatorOverflows, outputOverflows };
  };
}

/** Sums beyond doubles in an accumulator that none of them overflows: two doubles do. */
function roomySimulator(values: readonly Float64Array[], format: IntegerFormat): Simulator {
  const sums = splitSums(values);
  const { fractionBits } = format;
  const word = wordRange(format.outputWord);
  const intoWord = format.overflow === 'saturate' ? clamp : wrap;
  // The rounding term lies in the lower or in the upper part.
  const lowRounding = fractionBits > 0 && fractionBits <= 32 ? powerOfTwo(fractionBits - 1) : 0;
  const highRounding = fractionBits > 32 ? powerOfTwo(fractionBits - 33) : 0;
  const unit = powerOfTwo(fractionBits);
  const highUnit = powerOfTwo(fractionBits - 32);
  return (inputs) => {
    const { high, low } = sums(inputs);
    const output = new Float64Array(high.length);
    let outputOverflows = 0;
    for (let n = 0; n < output.length; n++) {
      const value =
        fractionBits <= 32
          ? high[n] / highUnit + Math.floor((low[n] + lowRounding) / unit)
          : Math.floor((high[n] + highRounding) / highUnit);
      if (value > word.max || value < word.min) outputOverflows++;
      output[n] = intoWord(value, word);
    }
    return { output, accumulatorOverflows: 0, outputOverflows };
  };
}

function wideSimulator(values: readonly Float64Array[], format: IntegerFormat): Simulator {
  const sums = wideSums(values);
  const finish = wideFinish(format);
  const rounding = format.fractionBits > 0 ? 1n << BigInt(format.fractionBits - 1) : 0n;
  return (inputs) => {
    const all = sums(inputs);
    const run = { output: new Float64Array(all.length), accumulatorOverflows: 0, outputOverflows: 0 };
    all.forEach((sum, n) => {
      const acc = BigInt.asIntN(format.accumulator, sum + rounding);
      if (acc !== sum + rounding) run.accumulatorOverflows++;
      finish(acc, n, run);
    });
    return run;
  };
}

/** Every addition by itself, as clamping needs it. */
function clampingSimulator(values: readonly Float64Array[], format: IntegerFormat): Simulator {
  const length = values[0].length;
  const rows = values.map((row) => Array.from(row, BigInt));
  const max = (1n << BigInt(format.accumulator - 1)) - 1n;
  const min = -max - 1n;
  const finish = wideFinish(format);
  const rounding = format.fractionBits > 0 ? 1n << BigInt(format.fractionBits - 1) : 0n;
  return (inputs) => {
    const x = inputs.map((samples) => Array.from(samples, BigInt));
    const count = inputs[0].length - length + 1;
    const run = { output: new Float64Array(count), accumulatorOverflows: 0, outputOverflows: 0 };
    for (let n = 0; n < count; n++) {
      let acc = 0n;
      let clamped = false;
      const add = (term: bigint) => {
        acc += term;
        if (acc > max || acc < min) {
          acc = acc > max ? max : min;
          clamped = true;
        }
      };
      rows.forEach((row, r) => {
        for (let k = 0, i = n + length - 1; k < length; k++, i--) add(row[k] * x[r][i]);
      });
      add(rounding);
      if (clamped) run.accumulatorOverflows++;
      finish(acc, n, run);
    }
    return run;
  };
}

/** Shift and output word of an accumulator in big integers. */
function wideFinish(format: IntegerFormat): (acc: bigint, n: number, run: Simulation) => void {
  const shift = BigInt(format.fractionBits);
  const word: WordRange = wordRange(format.outputWord);
  return (acc, n, run) => {
    const value = acc >> shift;
    const wrapped = BigInt.asIntN(format.outputWord, value);
    if (wrapped !== value) run.outputOverflows++;
    run.output[n] =
      format.overflow === 'wrap' || wrapped === value ? Number(wrapped) : value > 0n ? word.max : word.min;
  };
}

/** The filter in float arithmetic: each product and each sum rounded to the word, in the order of the integer filter. */
export function floatSimulator(values: readonly Float64Array[], word: 'float32' | 'float64'): Simulator {
  const round = word === 'float32' ? Math.fround : (value: number) => value;
  const length = values[0].length;
  return (inputs) => {
    const output = new Float64Array(inputs[0].length - length + 1);
    for (let n = 0; n < output.length; n++) {
      let acc = 0;
      for (let r = 0; r < values.length; r++) {
        const row = values[r];
        const x = inputs[r];
        for (let k = 0, i = n + length - 1; k < length; k++, i--) acc = round(acc + round(row[k] * x[i]));
      }
      output[n] = acc;
    }
    return { output, accumulatorOverflows: 0, outputOverflows: 0 };
  };
}
