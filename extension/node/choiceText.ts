import { type Candidate, crossValidated, crossValidatedError, fitted } from '../../core/choice/candidate';
import type { SearchResult } from '../../core/choice/searchResult';
import { decibels, powerDecibels } from '../../core/figures/decibels';
import { counted, fixed, grouped, noFigure, significant } from '../../core/figures/numbers';
import { visible } from '../../core/figures/visible';
import { macsPerSample } from '../../core/files/filterCost';
import type { Choice } from '../../core/pipeline/choose';

/** Columns of the map at most, so that it fits a terminal. */
const mapColumns = 11;

/** 10 / ln 10: a relative error in decibels, to first order. */
const decibelsOfE = 4.342944819032518;

/** Curves through the suggestion, the map of length and delay, and the suggestion, for a terminal. */
export function choiceText(choice: Choice): string {
  const { search, suggestion, folds, pairing, opinions, heldOut, attainableDb } = choice;
  const { grid, inputs } = search;
  const { chosen } = suggestion;
  const places: Candidate = {
    length: grid.lengths.indexOf(chosen.length),
    delay: grid.delays.indexOf(chosen.delay),
    regularisation: grid.regularisations.indexOf(chosen.regularisation),
  };
  const curve = (
    name: keyof Candidate,
    values: readonly number[],
    more: (value: number) => string[] = () => [],
  ) =>
    values.map((value, place) => {
      const candidate = { ...places, [name]: place };
      const mark = place === places[name] ? '*' : '';
      return [
        `${name === 'regularisation' ? significant(value) : value}${mark}`,
        ...more(value),
        ...figures(search, candidate),
      ];
    });
  const { symmetry } = pairing.document.filter;
  const macs = (length: number) => [grouped(macsPerSample(inputs, length, symmetry))];
  const how =
    folds.by === 'takes'
      ? `each of ${counted(folds.folds.length, 'take')} left out in turn, ${counted(folds.blocks, 'block')} in all`
      : `${counted(folds.blocks, 'block')} left out in turn, ${counted(folds.gap, 'sample')} on both sides unused`;
  const head = ['cross-validated', '±', 'fit'];
  const rest = (name: string) => `at ${name}, in dB (* suggested)`;
  const lines = [
    `${visible(pairing.document.title)}: ${how}`,
    '',
    `Error against length ${rest(`delay ${chosen.delay} and regularisation ${significant(chosen.regularisation)}`)}:`,
    ...columns([['taps', 'MACs', ...head], ...curve('length', grid.lengths, macs)]),
    '',
    `Error against delay ${rest(`${counted(chosen.length, 'tap')} and regularisation ${significant(chosen.regularisation)}`)}:`,
    ...columns([['delay', ...head], ...curve('delay', grid.delays)]),
    '',
    `Error against regularisation ${rest(`${counted(chosen.length, 'tap')} and delay ${chosen.delay}`)}:`,
    ...columns([['regularisation', ...head], ...curve('regularisation', grid.regularisations)]),
    '',
    'Cross-validated error by length and delay in dB, the best regularisation of each:',
    ...columns(mapRows(search, places.delay)),
    '',
    `Attainable from the coherence: ${attainableDb === null ? 'not known' : decibels(-attainableDb)}`,
    ...opinions.map(
      (opinion) =>
        `${opinion.criterion.toUpperCase()} would take ${counted(opinion.length, 'tap')}, delay ${opinion.delay}, regularisation ${significant(opinion.regularisation)}`,
    ),
    '',
    choice.reason,
    heldOut === null
      ? 'Nothing was held out to prove it on.'
      : `Held out: ${decibels(heldOut.nmseDb)} over ${counted(heldOut.samples, 'sample')}.`,
  ];
  return lines.join('\n');
}

function figures(search: SearchResult, candidate: Candidate): string[] {
  const relative = crossValidatedError(search, candidate);
  return [
    inDecibels(crossValidated(search, candidate)),
    relative === null ? noFigure : fixed(decibelsOfE * relative, 2),
    inDecibels(fitted(search, candidate)),
  ];
}

function inDecibels(share: number): string {
  return Number.isNaN(share) ? noFigure : fixed(powerDecibels(share), 2);
}

function mapRows(search: SearchResult, chosenDelay: number): string[][] {
  const { lengths, delays, regularisations } = search.grid;
  const every = Math.ceil(delays.length / mapColumns);
  const shown = delays.map((_, d) => d).filter((d) => (d - chosenDelay) % every === 0);
  const least = (length: number, delay: number) =>
    regularisations.reduce((best, _, regularisation) => {
      const share = crossValidated(search, { length, delay, regularisation });
      return Number.isNaN(best) || share < best ? share : best;
    }, Number.NaN);
  return [
    ['taps', ...shown.map((d) => String(delays[d]))],
    ...lengths.map((taps, l) => [String(taps), ...shown.map((d) => inDecibels(least(l, d)))]),
  ];
}

function columns(rows: readonly string[][]): string[] {
  const widths = rows[0].map((_, i) => Math.max(...rows.map((row) => row[i].length)));
  return rows.map((row) => `  ${row.map((cell, i) => cell.padStart(widths[i])).join('  ')}`);
}
