import type { DesignResult } from '../pipeline/designResult';
import { wrapped } from './asciiText';
import { type Mark, markLine } from './generatedMark';
import { cLiteral, listed } from './literals';
import { numberType } from './numberTypes';
import { signalWords } from './signalWords';
import { partInWords, partName } from './vectorParts';

/** Text of `SYMBOL_vectors.h`: input samples and the output they give, for a unit test of the firmware's filter. */
export function cVectors(result: DesignResult, mark: Mark): string {
  const { document, vectors } = result;
  const { symbol } = document.write;
  const prefix = symbol.toUpperCase();
  const guard = `${prefix}_VECTORS_H`;
  const words = signalWords(document);
  const input = numberType(words.input);
  const output = numberType(words.output);
  return [
    markLine(mark, 'c'),
    '/*',
    ...comment(result).map((line) => ` * ${line}`.trimEnd()),
    ' */',
    `#ifndef ${guard}`,
    `#define ${guard}`,
    '',
    ...(input.float && output.float ? [] : ['#include <stdint.h>', '']),
    `#define ${prefix}_VECTOR_SAMPLES ${vectors.expected.length} /* of each input, and of the output */`,
    `#define ${prefix}_VECTOR_INPUTS ${vectors.input.length}`,
    '',
    '/* Where each part of the vectors starts. */',
    ...vectors.parts.map((place) => `#define ${prefix}_VECTOR_${partName(place)} ${place.from}`),
    '',
    `/* ${symbol}_input[r * ${prefix}_VECTOR_SAMPLES + n] is x_r[n] */`,
    `static const ${input.c} ${symbol}_input[${prefix}_VECTOR_INPUTS * ${prefix}_VECTOR_SAMPLES] = {`,
    ...vectors.input.map((row) => numbers(row, input)),
    '};',
    '',
    `static const ${output.c} ${symbol}_expected[${prefix}_VECTOR_SAMPLES] = {`,
    numbers(vectors.expected, output),
    '};',
    '',
    `#endif /* ${guard} */`,
    '',
  ].join('\n');
}

function numbers(row: Float64Array, type: ReturnType<typeof numberType>): string {
  return listed(
    Array.from(row, (v) => cLiteral(v, type)),
    '    ',
  );
}

function comment({ document, arithmetic, vectors }: DesignResult): string[] {
  const { symbol } = document.write;
  const exact =
    arithmetic.fractionBits === null
      ? 'Floating-point sums depend on their order: allow for a difference in the last digits.'
      : 'The output is bit-exact: every sample must agree.';
  return wrapped(
    `Test vectors for ${symbol}_taps.h. The input is x, what the filter sees after the means are off; the history before it is zero. The expected output is y, before a desired mean is added or the error is taken. ${exact}`,
    96,
  ).concat('', ...vectors.parts.flatMap((place) => wrapped(`  ${partInWords(place)}`, 96)));
}
