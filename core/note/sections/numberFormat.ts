import type { Word } from '../../document/pairingDocument';
import { decibels } from '../../figures/decibels';
import { grouped, noFigure, significant } from '../../figures/numbers';
import { wordInWords } from '../../files/numberTypes';
import { signalWords } from '../../files/signalWords';
import { powerOfTwo, wordRange } from '../../numbers/words';
import type { DesignResult } from '../../pipeline/designResult';
import { name, section, table } from '../markdown';
import { wantedSignalReminder } from '../wantedSignal';
import { wordStudy } from '../wordStudy';

/** The number format of the target, its room against overflow, and what it costs in accuracy. */
export function numberFormat(result: DesignResult): string {
  return section(
    'Number format and loss',
    table(['what', 'value'], formatRows(result, name)),
    lossIntroduction(result),
    table(['what', 'value'], loss(result), ['value']),
    ...wordStudy(result),
    wantedSignalReminder(result),
  );
}

/**
 * Words, ranges and room against overflow, as label and value.
 * @param show how the name of a signal is written
 */
export function formatRows(result: DesignResult, show: (label: string) => string): string[][] {
  return [...coefficients(result), ...accumulator(result), ...wordsOfSignals(result, show)];
}

function coefficients({ document, arithmetic }: DesignResult): string[][] {
  const { word, rounding } = document.arithmetic;
  if (typeof word !== 'number' || arithmetic.fractionBits === null)
    return [['coefficients', word.toString()]];
  const { min, max } = wordRange(word);
  const unit = powerOfTwo(-arithmetic.fractionBits);
  const largest = Math.max(
    ...arithmetic.values.map((row) => row.reduce((m, v) => Math.max(m, Math.abs(v)), 0)),
  );
  return [
    ['coefficients', `${word}-bit integers, ${arithmetic.fractionBits} fraction bits, ${rounding} rounding`],
    [
      'range and step of a coefficient',
      `${significant(min * unit)} to ${significant(max * unit, 6)}, step ${significant(unit)}`,
    ],
    [
      'largest coefficient',
      `${grouped(largest)} of ${grouped(max)} counts (${significant((100 * largest) / max, 3)} % of the word)`,
    ],
  ];
}

function accumulator({ document, arithmetic }: DesignResult): string[][] {
  const { accumulator: bits, accumulatorOverflow, overflow } = document.arithmetic;
  const { worstCase, recordedCase } = arithmetic;
  if (worstCase === null || recordedCase === null) return [];
  const room = bits - worstCase.bits;
  const verdict =
    room >= 0
      ? `cannot overflow, ${room} bits to spare`
      : `can overflow by ${-room} bits, then additions ${accumulatorOverflow === 'wrap' ? 'wrap' : 'saturate'}`;
  return [
    [
      'worst case of the accumulator',
      `${grouped(worstCase.min)} to ${grouped(worstCase.max)}, rounding term included: ${worstCase.bits} bits`,
    ],
    [
      'the same for the extremes of the recordings',
      `${grouped(recordedCase.min)} to ${grouped(recordedCase.max)}: ${recordedCase.bits} bits`,
    ],
    ['accumulator', `${bits} bits: ${verdict}`],
    ['output beyond its word', overflow === 'saturate' ? 'saturates' : 'wraps'],
  ];
}

function wordsOfSignals(
  { document, arithmetic, inputs, desired }: DesignResult,
  show: (label: string) => string,
): string[][] {
  const { input, output } = signalWords(document);
  const signal = (word: Word, fullScale: number, count: number) =>
    typeof word === 'number'
      ? `${wordInWords(word)}, full scale ${significant(fullScale, 9)}, one count is ${significant(count)}`
      : word;
  return [
    ...inputs.map((label, r) => [
      `input ${show(label)}`,
      signal(input, arithmetic.inputFullScale[r], arithmetic.inputCount[r]),
    ]),
    [
      `output, in the unit of ${show(desired)}`,
      signal(output, arithmetic.outputFullScale, arithmetic.outputCount),
    ],
  ];
}

function lossIntroduction({ arithmetic, heldOut }: DesignResult): string {
  const data = heldOut === null ? 'fit' : 'held-out';
  return arithmetic.samples === 0
    ? 'The filter was not run in the numbers of the target, so its loss is not known.'
    : `The filter was run in the numbers of the target over the ${grouped(arithmetic.samples)} ${data} samples:`;
}

function loss({ arithmetic, heldOut, fit }: DesignResult): string[][] {
  const overflows = (count: number) => `${grouped(count)} of ${grouped(arithmetic.samples)} samples`;
  return [
    ['NMSE as designed', decibels((heldOut ?? fit).nmseDb)],
    ['NMSE in the numbers of the target', decibels(arithmetic.heldOutNmseDb)],
    ['quantisation loss (the rise)', decibels(arithmetic.quantisationLossDb)],
    ['error of the output against the design, relative to the output', decibels(arithmetic.outputErrorDb)],
    [
      'accumulator overflows',
      arithmetic.samples === 0 ? noFigure : overflows(arithmetic.accumulatorOverflows),
    ],
    ['output overflows', arithmetic.samples === 0 ? noFigure : overflows(arithmetic.outputOverflows)],
  ];
}
