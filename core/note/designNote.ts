import { type Mark, markLine } from '../files/generatedMark';
import type { DesignResult } from '../pipeline/designResult';
import { plain } from './markdown';
import { cautions } from './sections/cautions';
import { choices } from './sections/choices';
import { cost } from './sections/cost';
import { crossValidation } from './sections/crossValidation';
import { firmware } from './sections/firmware';
import { numberFormat } from './sections/numberFormat';
import { outcome } from './sections/outcome';
import { pictures } from './sections/pictures';
import { recordings } from './sections/recordings';
import { reproduce } from './sections/reproduce';
import { signals } from './sections/signals';
import { suitability } from './sections/suitability';
import { taps } from './sections/taps';
import { verdict } from './sections/verdict';

/**
 * Text of `NAME.note.md`: the design note for the reviewer, in Markdown.
 * @param stem NAME, from which the names of the pictures' folder and of the taps file are made
 */
export function designNote(result: DesignResult, mark: Mark, stem: string): string {
  return `${[
    markLine(mark, 'markup'),
    `# Design note: ${plain(result.document.title)}`,
    verdict(result),
    signals(result),
    recordings(result),
    suitability(result),
    choices(result),
    crossValidation(result, `${stem}.note`),
    outcome(result),
    pictures(result, `${stem}.note`),
    numberFormat(result),
    cost(result),
    firmware(result),
    taps(result, `${stem}.taps.json`),
    reproduce(result, mark.digest),
    cautions(result),
  ]
    .filter((text) => text !== '')
    .join('\n\n')}\n`;
}
