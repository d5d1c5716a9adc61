import { decibels } from '../../figures/decibels';
import { noFigure, significant } from '../../figures/numbers';
import { changeSentences } from '../../findings/changeSentences';
import { designSentences } from '../../findings/designSentences';
import { recordingSentences } from '../../findings/recordingSentences';
import { residualSentences } from '../../findings/residualSentences';
import { placeInWords, say } from '../../findings/say';
import type { Sentence } from '../../findings/sentence';
import { spectraSentences } from '../../findings/spectraSentences';
import { timingSentences } from '../../findings/timingSentences';
import type { DesignResult } from '../../pipeline/designResult';
import { bandsInWords } from '../../suitability/pair/bands';
import { code, name, plain, section, table } from '../markdown';

/** What was found about recordings, pair and design, worst first, and what was looked for. */
export function suitability(result: DesignResult): string {
  const { findings } = result;
  return section(
    'Suitability',
    findings.length === 0
      ? 'Nothing was found against the recordings, the pair or the design.'
      : table(
          ['severity', 'code', 'where', 'finding'],
          findings.map((found) => [
            found.severity,
            code(found.code),
            plain(placeInWords(found)),
            plain(say(found)),
          ]),
        ),
    ...pairTable(result),
    lookedFor(),
  );
}

/** Lag, clock difference and attainable reduction of every take, and where the model says nothing. */
function pairTable({ inspection, document }: DesignResult): string[] {
  if (inspection === null || document.job === 'predict') return [];
  const { takes, unknownBands } = inspection;
  const numbers = ['lag, samples', 'clock difference', 'attainable'];
  const rows = takes.map(({ name: label, lagSamples, driftPpm, driftPpmStandardError, attainableDb }) => [
    name(label),
    lagSamples === null ? noFigure : significant(lagSamples, 3),
    driftPpm === null
      ? noFigure
      : `${significant(driftPpm, 3)} ppm (standard error ${significant(driftPpmStandardError, 2)})`,
    decibels(attainableDb),
  ]);
  const unknown =
    unknownBands.length === 0
      ? ''
      : `The model says nothing in ${bandsInWords(unknownBands)}: an input is empty there, or the coherence no more than chance.`;
  return [
    'The pair, over the fit intervals: by how much the desired signal follows the inputs where one lag stands out, the difference of the clocks where the files have one each, and what a linear filter of any length could take off.',
    table(['take', ...numbers], rows, numbers),
    unknown,
  ];
}

function lookedFor(): string {
  const rows: [string, Sentence][] = Object.entries({
    ...recordingSentences,
    ...timingSentences,
    ...spectraSentences,
    ...changeSentences,
    ...designSentences,
    ...residualSentences,
  });
  const codes = rows.filter(([, sentence]) => sentence.severity !== 'blocker').map(([name]) => code(name));
  return codes.length === 0
    ? ''
    : `Looked for, by the code that it would be listed under: ${codes.sort().join(', ')}. What makes a design impossible stops it before a note is written.`;
}
