import type { DesignResult } from '../pipeline/designResult';
import { asciiText } from './asciiText';
import { type Mark, markLine } from './generatedMark';
import { literal } from './literals';
import { numberType } from './numberTypes';

/**
 * Text of `SYMBOL_taps.csv`: after comment lines that begin with `#`, one row a tap, its delay k first and then the value
 * for each input, in the order asked for. Column names are numbers, so that no name from a document is a cell.
 */
export function csvTaps(result: DesignResult, mark: Mark): string {
  const { document, arithmetic, takes } = result;
  const type = numberType(document.arithmetic.word);
  const { length } = document.filter;
  const delays = Array.from({ length }, (_, i) =>
    document.write.order === 'newest-first' ? i : length - 1 - i,
  );
  return [
    markLine(mark, 'hash'),
    ...takes[0].inputs.map((x, r) => `# tap_${r}: ${asciiText(x.file)}, channel ${asciiText(x.channel)}`),
    ...(arithmetic.fractionBits === null ? [] : [`# fraction bits: ${arithmetic.fractionBits}`]),
    ['k', ...arithmetic.values.map((_, r) => `tap_${r}`)].join(','),
    ...delays.map((k) => [k, ...arithmetic.values.map((row) => literal(row[k], type))].join(',')),
    '',
  ].join('\n');
}
