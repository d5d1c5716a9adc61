import type { DesignResult } from '../pipeline/designResult';
import { wrapped } from './asciiText';
import { cAccumulate, cFinish } from './cArithmetic';
import { type Mark, markLine } from './generatedMark';
import { numberType } from './numberTypes';
import { signalWords } from './signalWords';

/** Text of `SYMBOL_filter.h`: what `SYMBOL_filter.c` offers. */
export function cFilterHeader(result: DesignResult, mark: Mark): string {
  const { document, inputs } = result;
  const { symbol } = document.write;
  const guard = `${symbol.toUpperCase()}_FILTER_H`;
  const words = signalWords(document);
  const input = numberType(words.input);
  const output = numberType(words.output);
  const size = inputs.length * document.filter.length;
  return [
    markLine(mark, 'c'),
    '/*',
    ...wrapped(
      `A plain reference of the filter of ${symbol}_taps.h: every sample by the rules of its comment, steps 3 to 5, without any attempt at speed. Hold faster code against it.`,
      96,
    ).map((line) => ` * ${line}`),
    ' */',
    `#ifndef ${guard}`,
    `#define ${guard}`,
    '',
    ...(input.float ? [] : ['#include <stdint.h>', '']),
    '#ifdef __cplusplus',
    'extern "C" {',
    '#endif',
    '',
    'typedef struct {',
    `    ${input.c} history[${size}]; /* the last samples of each input, the newest first */`,
    `} ${symbol}_state;`,
    '',
    '/* Silence before the first sample. */',
    `void ${symbol}_reset(${symbol}_state *state);`,
    '',
    `/* y[n] from x[0 .. ${inputs.length - 1}], one new sample of each input with its mean off. */`,
    `${output.c} ${symbol}_step(${symbol}_state *state, const ${input.c} *x);`,
    '',
    '#ifdef __cplusplus',
    '}',
    '#endif',
    '',
    `#endif /* ${guard} */`,
    '',
  ].join('\n');
}

/** Text of `SYMBOL_filter.c`: the filter in C99 that relies on nothing the standard leaves open. */
export function cFilterSource(result: DesignResult, mark: Mark): string {
  const { document } = result;
  const { symbol, order } = document.write;
  const prefix = symbol.toUpperCase();
  const words = signalWords(document);
  const input = numberType(words.input);
  const output = numberType(words.output);
  const at = order === 'newest-first' ? 'k' : `${prefix}_LENGTH - 1 - k`;
  const wide = input.float ? input.c : 'int64_t';
  const product = `(${wide})${symbol}_taps[r * ${prefix}_LENGTH + ${at}] * history[k]`;
  return [
    markLine(mark, 'c'),
    `#include "${symbol}_filter.h"`,
    `#include "${symbol}_taps.h"`,
    '',
    ...cAccumulate(result),
    `void ${symbol}_reset(${symbol}_state *state)`,
    '{',
    '    int i;',
    `    for (i = 0; i < ${prefix}_INPUTS * ${prefix}_LENGTH; i++) state->history[i] = 0;`,
    '}',
    '',
    `${output.c} ${symbol}_step(${symbol}_state *state, const ${input.c} *x)`,
    '{',
    `    ${wide} acc = 0;`,
    '    int r, k;',
    `    for (r = 0; r < ${prefix}_INPUTS; r++) {`,
    `        ${input.c} *history = state->history + r * ${prefix}_LENGTH;`,
    `        for (k = ${prefix}_LENGTH - 1; k > 0; k--) history[k] = history[k - 1];`,
    '        history[0] = x[r];',
    `        for (k = 0; k < ${prefix}_LENGTH; k++) {`,
    ...(input.float
      ? [`            ${wide} product = ${product};`, '            acc = acc + product;']
      : [`            acc = add(acc, ${product});`]),
    '        }',
    '    }',
    ...cFinish(result),
    '}',
    '',
  ].join('\n');
}
