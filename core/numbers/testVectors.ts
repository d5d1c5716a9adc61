import { integerFormat, type TargetFilter, targetSimulator } from './targetFilter';
import { type WordRange, wordRange } from './words';

/** What a stretch of the test vectors tries. */
export type VectorPart = 'silence' | 'impulse' | 'excerpt' | 'highest' | 'lowest';

export interface PartPlace {
  part: VectorPart;
  /** Of an impulse: the input that has it, from 0. */
  input: number | null;
  /** Samples `[from, to)` of the vectors. */
  from: number;
  to: number;
}

/** Test vectors for the firmware, one stream; the history before it is zero. */
export interface TestVectors {
  /** One row an input: what the filter sees, means taken off; counts, or amplitudes for float words. */
  input: Float64Array[];
  /** Bit-exact output. */
  expected: Float64Array;
  /** In the order of the stream, without gaps. */
  parts: PartPlace[];
}

/** Samples of silence at the start. */
const silence = 16;

/**
 * The target's output for silence, an impulse of the largest count in each input, an excerpt and, for integers, the two
 * inputs whose last sample brings the accumulator to its highest and lowest value.
 * @param excerpt one row an input, in counts; without samples there are no vectors
 */
export function testVectors(target: TargetFilter, excerpt: readonly Float64Array[]): TestVectors {
  const { values } = target;
  if (excerpt[0].length === 0) return { input: [...excerpt], expected: new Float64Array(0), parts: [] };
  const length = values[0].length;
  const format = integerFormat(target);
  const range = format === null ? null : wordRange(format.inputWord);
  const pieces: { part: VectorPart; input: number | null; rows: Float64Array[] }[] = [];
  const add = (part: VectorPart, rows: Float64Array[], input: number | null = null) =>
    pieces.push({ part, input, rows });
  add(
    'silence',
    values.map(() => new Float64Array(silence)),
  );
  values.forEach((_, r) => {
    const rows = values.map(() => new Float64Array(length));
    rows[r][0] = range?.max ?? 1;
    add('impulse', rows, r);
  });
  add('excerpt', [...excerpt]);
  if (range !== null) {
    add('highest', extremeInput(values, range));
    add('lowest', extremeInput(values, { min: range.max, max: range.min }));
  }
  const input = values.map((_, r) => joined(pieces.map(({ rows }) => rows[r])));
  const padded = input.map((row) => joined([new Float64Array(length - 1), row]));
  let at = 0;
  const parts = pieces.map(({ part, input: r, rows }) => {
    const from = at;
    at += rows[0].length;
    return { part, input: r, from, to: at };
  });
  return { input, expected: targetSimulator(target)(padded).output, parts };
}

/** M samples of each input whose last one sees the largest product at every tap. */
function extremeInput(values: readonly Float64Array[], { min, max }: WordRange): Float64Array[] {
  return values.map((row) =>
    Float64Array.from({ length: row.length }, (_, n) => (row[row.length - 1 - n] < 0 ? min : max)),
  );
}

function joined(rows: readonly Float64Array[]): Float64Array {
  const whole = new Float64Array(rows.reduce((sum, row) => sum + row.length, 0));
  let at = 0;
  for (const row of rows) {
    whole.set(row, at);
    at += row.length;
  }
  return whole;
}
