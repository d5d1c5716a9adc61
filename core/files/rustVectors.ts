import type { DesignResult } from '../pipeline/designResult';
import { type Mark, markLine } from './generatedMark';
import { listed, literal } from './literals';
import { type NumberType, numberType } from './numberTypes';
import { signalWords } from './signalWords';
import { partInWords, partName } from './vectorParts';

/** Text of `SYMBOL_vectors.rs`: the test vectors as constants of a Rust module that needs no standard library. */
export function rustVectors(result: DesignResult, mark: Mark): string {
  const { document, vectors } = result;
  const words = signalWords(document);
  const input = numberType(words.input);
  const output = numberType(words.output);
  return [
    markLine(mark, 'rust'),
    `// Test vectors for ${document.write.symbol}_taps.rs: what the filter sees after the means are off, zero before it, and`,
    '// what it puts out before a desired mean is added or the error is taken.',
    '',
    `pub const VECTOR_SAMPLES: usize = ${vectors.expected.length};`,
    `pub const VECTOR_INPUTS: usize = ${vectors.input.length};`,
    ...vectors.parts.flatMap((place) => [
      `/// ${partInWords(place)}`,
      `pub const VECTOR_${partName(place)}: usize = ${place.from};`,
    ]),
    '',
    `pub static INPUT: [[${input.rust}; VECTOR_SAMPLES]; VECTOR_INPUTS] = [`,
    ...vectors.input.flatMap((row) => ['    [', numbers(row, input, '        '), '    ],']),
    '];',
    '',
    `pub static EXPECTED: [${output.rust}; VECTOR_SAMPLES] = [`,
    numbers(vectors.expected, output, '    '),
    '];',
    '',
  ].join('\n');
}

function numbers(row: Float64Array, type: NumberType, indent: string): string {
  return listed(
    Array.from(row, (v) => literal(v, type)),
    indent,
  );
}
