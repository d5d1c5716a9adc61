import type { DesignResult } from '../pipeline/designResult';
import { asciiText } from './asciiText';
import { cMacros } from './cMacros';
import { type Mark, markLine } from './generatedMark';
import { headComment } from './headComment';
import { cLiteral, listed } from './literals';
import { numberType } from './numberTypes';
import { orderedRow } from './orderedRow';

/**
 * Text of `SYMBOL_taps.h`: the coefficients for C99 and C++, with the macros and the comments that a firmware engineer
 * needs to run them. ASCII, no line end but LF.
 */
export function cTaps(result: DesignResult, mark: Mark): string {
  const { symbol } = result.document.write;
  const guard = `${symbol.toUpperCase()}_TAPS_H`;
  const integers = typeof result.document.arithmetic.word === 'number';
  return [
    markLine(mark, 'c'),
    ...commentBlock(result),
    `#ifndef ${guard}`,
    `#define ${guard}`,
    '',
    ...(integers ? ['#include <stdint.h>', ''] : []),
    ...cMacros(result),
    '',
    ...array(result),
    '',
    `#endif /* ${guard} */`,
    '',
  ].join('\n');
}

function commentBlock(result: DesignResult): string[] {
  const shifts = (result.arithmetic.fractionBits ?? 0) > 0;
  const lines = [...headComment(result), ...(shifts ? ['', ...shift] : [])];
  return ['/*', ...lines.map((line) => ` * ${line}`.trimEnd()), ' */'];
}

const shift = [
  'C leaves the right shift of a negative number to the compiler. With acc of type int64_t this is',
  'floor(acc / 2^F) everywhere: acc >= 0 ? acc >> F : ~(~acc >> F)',
];

function array({ document, arithmetic, inputs }: DesignResult): string[] {
  const { symbol, order, attributes } = document.write;
  const before = attributes.cBefore === '' ? '' : `${attributes.cBefore} `;
  const after = attributes.cAfter === '' ? '' : ` ${attributes.cAfter}`;
  const type = numberType(document.arithmetic.word);
  const prefix = symbol.toUpperCase();
  const row = inputs.length === 1 ? '' : `r * ${prefix}_LENGTH + `;
  const at = order === 'newest-first' ? 'k' : `${prefix}_LENGTH - 1 - k`;
  const of = inputs.length === 1 ? '' : '_r';
  return [
    `/* tap${of}[k], which multiplies x${of}[n - k], is ${symbol}_taps[${row}${at}] */`,
    `static const ${type.c} ${before}${symbol}_taps[${prefix}_INPUTS * ${prefix}_LENGTH]${after} = {`,
    ...arithmetic.values.flatMap((row, r) => [
      `    /* ${r}: ${asciiText(inputs[r])} */`,
      listed(
        Array.from(orderedRow(row, order), (v) => cLiteral(v, type)),
        '    ',
      ),
    ]),
    '};',
  ];
}
