import type { Severity } from '../core/findings/finding';
import { el } from './elements';
import { t } from './words';

/** Shape and word of a severity, beside its colour. */
export function severityMark(severity: Severity): HTMLElement {
  const shape = { blocker: '■', caution: '▲', note: '●' }[severity];
  const word = { blocker: t('blocker'), caution: t('caution'), note: t('note') }[severity];
  return el(
    'span',
    { class: `severity ${severity}` },
    el('span', { 'aria-hidden': 'true' }, `${shape} `),
    word,
  );
}
