import { counted, grouped, significant } from '../../figures/numbers';
import { memory } from '../../figures/units';
import { numberType, wordInWords } from '../../files/numberTypes';
import { signalWords } from '../../files/signalWords';
import type { DesignResult } from '../../pipeline/designResult';
import { section, table } from '../markdown';

/** What the filter costs the target: multiply-accumulates and memory. */
export function cost(result: DesignResult): string {
  const { document, inputs, sampleRate } = result;
  const { word } = document.arithmetic;
  const { input } = signalWords(document);
  const products = document.filter.length * inputs.length;
  return section(
    'Cost',
    table(
      ['what', 'value'],
      [
        [
          'multiply-accumulates',
          `${grouped(products)} a sample, ${significant((products * sampleRate) / 1e6)} million a second (${wordInWords(word)} × ${wordInWords(input)})`,
        ],
        ['coefficients', memory(products * numberType(word).bytes)],
        ['input history', memory(products * numberType(input).bytes)],
        ...delayLine(result),
      ],
    ),
    'A straight loop over the taps is counted; a circular buffer or block processing may need more memory.',
  );
}

function delayLine({ document, inputs }: DesignResult): string[][] {
  const { delay } = document.filter;
  const { input, output } = signalWords(document);
  if (delay > 0 && document.job === 'cancel') {
    return [
      [`delay of the desired signal, ${counted(delay, 'sample')}`, memory(delay * numberType(output).bytes)],
    ];
  }
  if (delay < 0 && document.job !== 'predict') {
    const bytes = -delay * inputs.length * numberType(input).bytes;
    return [[`delay of the inputs, ${counted(-delay, 'sample')}`, memory(bytes)]];
  }
  return [];
}
