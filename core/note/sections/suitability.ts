import { designSentences } from '../../findings/designSentences';
import { recordingSentences } from '../../findings/recordingSentences';
import { placeInWords, say } from '../../findings/say';
import type { Sentence } from '../../findings/sentence';
import type { DesignResult } from '../../pipeline/designResult';
import { code, plain, section, table } from '../markdown';

/** What was found about recordings, pair and design, worst first, and what was looked for. */
export function suitability({ findings }: DesignResult): string {
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
    lookedFor(),
  );
}

function lookedFor(): string {
  const rows: [string, Sentence][] = Object.entries({ ...recordingSentences, ...designSentences });
  const codes = rows.filter(([, sentence]) => sentence.severity !== 'blocker').map(([name]) => code(name));
  return codes.length === 0
    ? ''
    : `Looked for, by the code that it would be listed under: ${codes.sort().join(', ')}. What makes a design impossible stops it before a note is written.`;
}
