import type { FirmwareView, PlannedFile, Row } from '../../core/protocol/views';
import type { PageContext } from '../context';
import { el } from '../elements';
import { count, decibels } from '../figures';
import { table } from '../tables';
import { phrase, t } from '../words';

/** Label and value in words. */
export function rowTable(caption: string, rows: readonly Row[]): HTMLElement {
  const cells = rows.map(({ label, value, note }) => [
    phrase(label),
    note === undefined ? phrase(value) : `${phrase(value)} (${phrase(note)})`,
  ]);
  return table(caption, [t('what'), t('value')], cells);
}

/** Every word length with either rounding. */
export function wordTable({ words }: FirmwareView): HTMLElement | null {
  if (words === null) return null;
  const rows = words.map((one) => [
    one.chosen ? t('{0} bits (chosen)', one.word) : t('{0} bits', one.word),
    phrase(one.rounding),
    String(one.fractionBits),
    String(one.accumulatorBits),
    decibels(one.lossDb, 2),
    decibels(one.outputErrorDb),
  ]);
  const head = [
    t('word'),
    t('rounding'),
    t('fraction bits'),
    t('accumulator bits'),
    t('loss'),
    t('output error'),
  ];
  return table(t('Word lengths'), head, rows, [2, 3, 4, 5]);
}

/** The files and what would change, or did. */
export function fileList(files: readonly PlannedFile[], context: PageContext, links: boolean): HTMLElement {
  const change = {
    new: t('new'),
    changed: t('changed'),
    unchanged: t('unchanged'),
    foreign: t('not ours: it is never overwritten'),
  };
  const rows = files.map((file) => [
    links || file.change === 'unchanged' || file.change === 'changed' ? link(file.path, context) : file.path,
    change[file.change],
    t('{0} bytes', count(file.size)),
  ]);
  const caption = links ? t('Written') : t('Files that would be written');
  return table(caption, [t('file'), t('change'), t('size')], rows, [2]);
}

function link(path: string, { calls, fail }: PageContext): HTMLElement {
  const button = el('button', { type: 'button', class: 'link' }, path);
  button.addEventListener('click', () => void calls.openFile(path).catch(fail));
  return button;
}
