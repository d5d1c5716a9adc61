import type { DesignResult } from '../pipeline/designResult';
import { numberType } from './numberTypes';
import { signalWords } from './signalWords';

/**
 * The accumulator's addition in C: wrapping goes by unsigned arithmetic, which C defines; saturating tests before it adds.
 * Nothing for float words.
 */
export function cAccumulate({ document, arithmetic }: DesignResult): string[] {
  if (arithmetic.fractionBits === null) return [];
  const { accumulator, accumulatorOverflow, overflow } = document.arithmetic;
  const wraps = accumulatorOverflow === 'wrap';
  const kept = [
    "/* The value that the low bits of a number stand for, two's complement. */",
    'static int64_t keep(uint64_t value, int bits)',
    '{',
    '    uint64_t mask = UINT64_MAX >> (64 - bits);',
    '    value &= mask;',
    '    return value <= mask / 2 ? (int64_t)value : -(int64_t)(mask - value) - 1;',
    '}',
    '',
  ];
  const max = `(INT64_MAX >> ${64 - accumulator})`;
  const addition = wraps
    ? [
        `/* An addition in an accumulator of ${accumulator} bits, which wraps. */`,
        'static int64_t add(int64_t acc, int64_t term)',
        '{',
        `    return keep((uint64_t)acc + (uint64_t)term, ${accumulator});`,
        '}',
        '',
      ]
    : [
        `/* An addition in an accumulator of ${accumulator} bits, which stops at its limits. */`,
        'static int64_t add(int64_t acc, int64_t term)',
        '{',
        `    const int64_t max = ${max};`,
        '    const int64_t min = -max - 1;',
        '    if (term > 0 && acc > max - term) return max;',
        '    if (term < 0 && acc < min - term) return min;',
        '    return acc + term;',
        '}',
        '',
      ];
  return [...(wraps || overflow === 'wrap' ? kept : []), ...addition];
}

/** The end of the filter's function in C: rounding term, shift, output word. */
export function cFinish({ document, arithmetic }: DesignResult): string[] {
  const fraction = arithmetic.fractionBits;
  if (fraction === null) return ['    return acc;'];
  const { output } = signalWords(document);
  const bits = typeof output === 'number' ? output : 32;
  const type = numberType(output).c;
  const half = fraction > 0 ? [`    acc = add(acc, (int64_t)1 << ${fraction - 1});`] : [];
  const shift =
    fraction > 0
      ? [
          '    /* Down, not towards zero; C leaves the shift of a negative number to the compiler. */',
          `    acc = acc >= 0 ? acc >> ${fraction} : ~(~acc >> ${fraction});`,
        ]
      : [];
  const fit =
    document.arithmetic.overflow === 'wrap'
      ? [`    return (${type})keep((uint64_t)acc, ${bits});`]
      : [
          `    if (acc > ${limit(bits)}) return ${limit(bits)};`,
          `    if (acc < -${limit(bits)} - 1) return -${limit(bits)} - 1;`,
          `    return (${type})acc;`,
        ];
  return [...half, ...shift, ...fit];
}

/** 2^(bits-1) - 1 as a constant of C. */
function limit(bits: number): string {
  return String(2147483647 >> (32 - bits));
}
