import type { Job } from '../../document/pairingDocument';
import { hasBareFit } from '../../evaluation/measuredRuns';
import { decibels } from '../../figures/decibels';
import { counted, grouped, significant } from '../../figures/numbers';
import type { ChoiceLine, ChoiceLines } from '../../pipeline/choiceLines';
import type { DesignResult } from '../../pipeline/designResult';
import { section, table, target } from '../markdown';

const lines = ['length', 'delay', 'regularisation'] as const;

/** Difference that is not worth a tap, as in the suggestion of `choose` (common practice). */
const negligible = 0.05;

const wantedSignal =
  '**Caution:** no fit interval is marked `disturbanceOnly`, so the wanted signal, where it is in the fit, counts as error in these figures and makes differences look smaller than they are. Mark some of the fit, and the errors are taken over that alone.';

/** The document's length, delay and regularisation held against others inside the fit intervals. */
export function crossValidation({ choice, document, takes }: DesignResult, folder: string): string {
  if (choice === null) return '';
  const title = 'Held against other values';
  if ('withheld' in choice) return section(title, `Not cross-validated: ${choice.withheld}`);
  const { symmetry, fixedGain, windowing } = document.filter;
  const hidden = document.job === 'cancel' && !takes.some(hasBareFit);
  const shaped = symmetry !== 'none' || fixedGain !== null || windowing !== 'covariance';
  const rows = [
    row('length', choice.length, (taps) => counted(taps, 'tap')),
    ...(choice.delay.values.length > 1 ? [row('delay', choice.delay, (delay) => significant(delay))] : []),
    row('regularisation', choice.regularisation, (rho) => significant(rho)),
  ];
  return section(
    title,
    `${method(choice)} In each row the other two are as in the document; all values are in the picture and in the taps file, and \`tapwright choose\` tries every combination.`,
    shaped
      ? 'These are free taps by exact least squares: symmetry, a fixed gain and other windowing are left out of account.'
      : '',
    table(['choice', 'document', 'one step less', 'one step more', 'least error'], rows, [
      'document',
      'one step less',
      'one step more',
      'least error',
    ]),
    verdict(choice, document.job),
    hidden ? wantedSignal : '',
    `![Cross-validated error and fit error against length, delay and regularisation](${target(`${folder}/choice.svg`)})`,
  );
}

function method({ validation: { by, blocks, gap, samples } }: ChoiceLines): string {
  const cut =
    by === 'takes'
      ? `each take was left out in turn (${counted(blocks, 'block')} in all)`
      : `each of ${counted(blocks, 'block')} was left out in turn, with ${grouped(gap)} unused samples on either side`;
  return `Cross-validated error (NMSE) inside the fit intervals: ${cut}, the filter fitted on the rest and its error taken over the block, ${counted(samples, 'sample')} together. Held-out data was not touched.`;
}

function row(what: string, line: ChoiceLine, shown: (value: number) => string): string[] {
  const at = (place: number) =>
    place < 0 || place >= line.values.length
      ? '–'
      : `${shown(line.values[place])}: ${figure(line.crossDb[place])}`;
  const own = line.errorDb[line.own];
  const error = Number.isFinite(own) ? ` ± ${significant(own, 2)}` : '';
  return [what, `${at(line.own)}${error}`, at(line.own - 1), at(line.own + 1), at(leastPlace(line))];
}

function figure(value: number): string {
  return Number.isFinite(value) ? decibels(value) : 'no solution';
}

/** Of the least cross-validated error; the document's own where none is known. */
export function leastPlace({ crossDb, own }: ChoiceLine): number {
  let place = own;
  for (let i = 0; i < crossDb.length; i++) {
    if (crossDb[i] < crossDb[place] || Number.isNaN(crossDb[place])) place = i;
  }
  return place;
}

function verdict(choice: ChoiceLines, job: Job): string {
  // The horizon of a prediction is what is wanted of it: a nearer one is easier and no better.
  const free = job === 'predict' ? (['length', 'regularisation'] as const) : lines;
  const better = free.flatMap((what) => {
    const line = choice[what];
    const place = leastPlace(line);
    const gain = line.crossDb[line.own] - line.crossDb[place];
    if (!(gain > negligible)) return [];
    const value =
      what === 'length'
        ? counted(line.values[place], 'tap')
        : `a ${what} of ${significant(line.values[place])}`;
    return [
      { longer: what === 'length' && place > line.own, says: `${value} would lower it by ${decibels(gain)}` },
    ];
  });
  const horizon =
    job === 'predict' && choice.delay.values.length > 1
      ? ' The horizon is what the prediction is for, so a nearer one is not counted as better.'
      : '';
  if (better.length === 0) {
    return `No other value on these lines lowers the error by more than ${decibels(negligible)}.${horizon}`;
  }
  const cost = better.some(({ longer }) => longer)
    ? ' What the longer filter costs in multiply-accumulates is for the engineer to weigh.'
    : '';
  return `Of these values, each by itself, ${better.map(({ says }) => says).join('; ')}.${cost}${horizon}`;
}
