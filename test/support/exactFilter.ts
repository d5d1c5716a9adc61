import type { PairingDocument } from '../../core/document/pairingDocument';

interface ExactInput {
  /** One row an input, newest-first. */
  values: readonly Float64Array[];
  /** Null for float words. */
  fractionBits: number | null;
  input: readonly Float64Array[];
  document: PairingDocument;
}

/** The contract's arithmetic in big integers (floats: in the word's own rounding), written for tests alone. */
export function exactFilter({ values, fractionBits, input, document }: ExactInput): {
  output: Float64Array;
  worstCase: { min: bigint; max: bigint; bits: number } | null;
} {
  if (fractionBits === null) return { output: inFloats(values, input, document), worstCase: null };
  const { accumulator, accumulatorOverflow, overflow, output } = document.arithmetic;
  const held = (value: bigint, bits: number, rule: 'saturate' | 'wrap') => {
    const half = 1n << BigInt(bits - 1);
    if (rule === 'saturate') return value >= half ? half - 1n : value < -half ? -half : value;
    const modulus = 2n * half;
    const low = ((value % modulus) + modulus) % modulus;
    return low >= half ? low - modulus : low;
  };
  const half = fractionBits > 0 ? 1n << BigInt(fractionBits - 1) : 0n;
  const scale = 1n << BigInt(fractionBits);
  const floor = (value: bigint) => (value >= 0n ? value / scale : -((-value + scale - 1n) / scale));
  const expected = input[0].map((_, n) => {
    let acc = 0n;
    values.forEach((row, r) => {
      row.forEach((v, k) => {
        const x = n - k >= 0 ? BigInt(input[r][n - k]) : 0n;
        acc = held(acc + BigInt(v) * x, accumulator, accumulatorOverflow);
      });
    });
    acc = held(acc + half, accumulator, accumulatorOverflow);
    return Number(held(floor(acc), output.word as number, overflow));
  });
  return { output: expected, worstCase: extremes(values, document.arithmetic.input.word as number, half) };
}

function extremes(values: readonly Float64Array[], inputWord: number, half: bigint) {
  const low = 1n << BigInt(inputWord - 1);
  let max = half;
  let min = half;
  for (const value of values.flatMap((row) => Array.from(row, BigInt))) {
    max += value > 0n ? value * (low - 1n) : -value * low;
    min += value > 0n ? -value * low : value * (low - 1n);
  }
  let bits = 1;
  while (max >= 1n << BigInt(bits - 1) || min - half < -(1n << BigInt(bits - 1))) bits++;
  return { min, max, bits };
}

function inFloats(
  values: readonly Float64Array[],
  input: readonly Float64Array[],
  { arithmetic }: PairingDocument,
): Float64Array {
  const round = arithmetic.word === 'float32' ? Math.fround : (value: number) => value;
  return input[0].map((_, n) => {
    let acc = 0;
    values.forEach((row, r) => {
      row.forEach((v, k) => {
        if (n >= k) acc = round(acc + round(v * input[r][n - k]));
      });
    });
    return acc;
  });
}
