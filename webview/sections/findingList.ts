import type { FindingView } from '../../core/protocol/views';
import type { PageContext } from '../context';
import { newButton } from '../controls';
import { el } from '../elements';
import { severityMark } from '../severity';
import { placeOf, t, textOf } from '../words';

/** Findings worst first, each with the way to its place. */
export function findingList(findings: readonly FindingView[], context: PageContext): HTMLElement {
  return el('ul', { class: 'findings' }, ...findings.map((found) => findingItem(found, context)));
}

function findingItem(found: FindingView, context: PageContext): HTMLElement {
  const item = el('li', { 'data-code': found.code }, severityMark(found.severity), ' ');
  const lead = context.leadTo(found);
  const [place, text] = [placeOf(found), textOf(found)];
  if (place !== '') item.append(el('span', { class: 'place' }, `${place}: `));
  item.append(text);
  if (lead !== null) {
    const button = newButton(t('Show'), lead);
    button.element.setAttribute('aria-label', t('Show: {0}', place === '' ? text : place));
    item.append(' ', button.element);
  }
  return item;
}

/** `nothing else found (17 checks)`. */
export function nothingElse(findings: readonly FindingView[], checks: number): HTMLElement {
  const text =
    findings.length === 0
      ? t('nothing found ({0} checks)', checks)
      : t('nothing else found ({0} checks)', checks);
  return el('p', { class: 'rest' }, el('span', { 'aria-hidden': 'true' }, '● '), text);
}
