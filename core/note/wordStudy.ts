import { decibels } from '../figures/decibels';
import { grouped } from '../figures/numbers';
import type { DesignResult } from '../pipeline/designResult';
import { smallestWord, type WordFigures, type WordStudy } from '../pipeline/studyWords';
import { table } from './markdown';

/** The shares of the loss and the table of word lengths, as paragraphs and tables. */
export function wordStudy(result: DesignResult): string[] {
  const { words } = result;
  if (words === null) return [];
  return [
    `Each rounding by itself, over ${grouped(words.samples)} of these samples:`,
    shares(words),
    'Other words, each with the most fraction bits that it allows and an accumulator wide enough, over the same samples:',
    wordTable(result, words),
    advice(result, words),
  ];
}

function shares({ shares: { input, taps, output } }: WordStudy): string {
  const rows = [
    { what: 'inputs to their word', figures: input },
    { what: 'coefficients to theirs', figures: taps },
    { what: 'output to its word', figures: output },
  ];
  return table(
    ['rounding', 'rise of the NMSE', 'error of the output, relative to the output'],
    rows.map(({ what, figures }) => [
      what,
      decibels(figures.quantisationLossDb),
      decibels(figures.outputErrorDb),
    ]),
    ['rise of the NMSE', 'error of the output, relative to the output'],
  );
}

function wordTable({ document }: DesignResult, { words }: WordStudy): string {
  const { word, rounding } = document.arithmetic;
  const numbers = ['fraction bits', 'NMSE', 'loss', 'error of the output', 'accumulator needs'];
  return table(
    ['word', 'rounding', ...numbers],
    words.map((row) => {
      const chosen = row.word === word && row.rounding === rounding;
      const cells = [
        `${row.word}-bit`,
        row.rounding,
        String(row.fractionBits),
        decibels(row.nmseDb),
        decibels(row.quantisationLossDb),
        decibels(row.outputErrorDb),
        `${row.accumulatorBits} bits`,
      ];
      return chosen ? cells.map((cell) => `**${cell}**`) : cells;
    }),
    numbers,
  );
}

function advice({ document }: DesignResult, study: WordStudy): string {
  const limit = document.limits.quantisationLoss;
  if (limit === null) return 'The chosen format is in bold. No limit on the loss is set.';
  const least = smallestWord(study, limit);
  const found: (row: WordFigures) => string = ({ word, rounding }) =>
    `The shortest word that keeps the loss to ${decibels(limit)} has ${word} bits (${rounding} rounding).`;
  return `The chosen format is in bold. ${least === null ? `No word here keeps the loss to ${decibels(limit)}: the words of the signals lose more.` : found(least)}`;
}
