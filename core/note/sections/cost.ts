import { counted, grouped, significant } from '../../figures/numbers';
import { memory } from '../../figures/units';
import { filterCost } from '../../files/filterCost';
import { wordInWords } from '../../files/numberTypes';
import { signalWords } from '../../files/signalWords';
import type { DesignResult } from '../../pipeline/designResult';
import { section, table } from '../markdown';

/** What the filter costs the target: multiply-accumulates, cycles and memory. */
export function cost(result: DesignResult): string {
  const { symmetry } = result.document.filter;
  return section(
    'Cost',
    table(['what', 'value'], costRows(result)),
    'A straight loop over the taps is counted; a circular buffer or block processing may need more memory, and reading, scaling and rounding take cycles of their own.',
    symmetry === 'none'
      ? ''
      : 'Mirrored taps share a multiplication: add (or subtract) the two samples first, which needs one more bit than a sample has, then multiply once. Without that the count is twice as high.',
  );
}

/** The same as label and value. */
export function costRows(result: DesignResult): string[][] {
  const { document } = result;
  const { word, cyclesPerMac } = document.arithmetic;
  const { input } = signalWords(document);
  const figures = filterCost(result);
  const { delay } = document.filter;
  const lag = counted(Math.abs(delay), 'sample');
  const signal = delay > 0 ? 'the desired signal' : 'the inputs';
  return [
    [
      'multiply-accumulates',
      `${grouped(figures.macsPerSample)} a sample, ${significant(figures.macsPerSecond / 1e6)} million a second (${wordInWords(word)} × ${wordInWords(input)})`,
    ],
    [
      `cycles of these, at ${counted(cyclesPerMac, 'cycle')} each`,
      `${significant(figures.cyclesPerSample)} a sample, ${significant(figures.cyclesPerSecond / 1e6)} million a second`,
    ],
    ['coefficients', memory(figures.coefficientBytes)],
    ['input history', memory(figures.stateBytes)],
    ...(figures.delayBytes > 0 ? [[`delay of ${signal}, ${lag}`, memory(figures.delayBytes)]] : []),
  ];
}
