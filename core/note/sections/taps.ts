import { fixed, significant } from '../../figures/numbers';
import { duration } from '../../figures/units';
import { powerOfTwo } from '../../numbers/words';
import type { DesignResult } from '../../pipeline/designResult';
import { code, name, section, table } from '../markdown';
import { errorsInWords, tapWithError } from '../tapErrors';

const shown = 8;

/** The largest coefficients of each input, as designed and as written. */
export function taps(result: DesignResult, tapsFile: string): string {
  const { coefficients, inputs, document } = result;
  const few = document.filter.length <= shown;
  const where = `${few ? 'All' : `The ${shown} largest`} of each input; with full digits${few ? '' : ', and all of them,'} they are in ${code('coefficients')} (w) and ${code('arithmetic.values')} (v) of ${name(tapsFile)}, newest-first${document.write.order === 'newest-first' ? '' : '; in the source files they are oldest-first'}.`;
  return section(
    'Taps',
    where,
    result.arithmetic.fractionBits === null
      ? ''
      : `w[k] multiplies x[n-k], in the unit of d for the unit of x; c[k] is the same in output counts for an input count; the integer v[k] is what is written and stands for v[k] / 2^${result.arithmetic.fractionBits}; the last column is v[k] less what it stands for, in steps of one.`,
    errorsInWords(result),
    ...coefficients.map(
      (row, r) => `${inputs.length === 1 ? '' : `Input ${name(inputs[r])}:\n\n`}${largest(result, row, r)}`,
    ),
  );
}

function largest(result: DesignResult, row: Float64Array, r: number): string {
  const { arithmetic, sampleRate } = result;
  const integers = arithmetic.fractionBits !== null;
  const scale = arithmetic.inputCount[r] / arithmetic.outputCount;
  const unit = powerOfTwo(-(arithmetic.fractionBits ?? 0));
  const order = Array.from(row, (_, k) => k)
    .sort((a, b) => Math.abs(row[b]) - Math.abs(row[a]) || a - b)
    .slice(0, shown)
    .sort((a, b) => a - b);
  const errors = 'withheld' in result.confidence.errors ? [] : ['standard error'];
  const head = integers
    ? ['k', 'time', 'w[k]', ...errors, 'c[k]', 'v[k]', 'rounding, steps']
    : ['k', 'time', 'w[k]', ...errors, 'written'];
  const rows = order.map((k) => {
    const written = arithmetic.values[r][k];
    const { tap, error } = tapWithError(result, r, k);
    const start = [String(k), duration(k / sampleRate), tap, ...(error === null ? [] : [error])];
    if (!integers) return [...start, significant(written, 9)];
    const counts = row[k] * scale;
    return [
      ...start,
      significant(counts, 6),
      String(written === 0 ? 0 : written),
      fixed(written - counts / unit, 2),
    ];
  });
  return table(head, rows, head);
}
