import type { FindingView } from '../../core/protocol/views';
import { el, newId, setAttribute } from '../elements';
import { severityMark } from '../severity';
import { textOf } from '../words';

/** What every field says about itself. */
export interface FieldWords {
  label: string;
  /** Beside the field; '' for none. */
  unit?: string;
  /** One sentence, shown while the field has the focus. */
  help: string;
  /** In words, with the help. */
  range?: string;
}

export interface Shell {
  element: HTMLElement;
  /** Ids of what describes the control. */
  describedBy: string;
  /** A sentence about a refused text; null: none. */
  showFault(fault: string | null): void;
  showFindings(findings: readonly FindingView[]): void;
  /** After the unit, for example the same value in decibels. */
  beside: HTMLElement;
}

/** Label, unit, help and complaints around a control. */
export function newShell({ label, unit = '', help, range }: FieldWords, control: HTMLElement): Shell {
  const id = newId('field');
  control.id ||= id;
  const helpText = el('p', { id: `${id}-help`, class: 'help' }, range ? `${help} ${range}` : help);
  const fault = el('p', { id: `${id}-fault`, class: 'fault' });
  const found = el('ul', { id: `${id}-found`, class: 'found' });
  const beside = el('span', { class: 'beside' });
  const describedBy = `${fault.id} ${found.id} ${helpText.id}`;
  control.setAttribute('aria-describedby', describedBy);
  const row = el('div', { class: 'control' }, control, el('span', { class: 'unit' }, unit), beside);
  const element = el(
    'div',
    { class: 'field' },
    el('label', { for: control.id }, label),
    row,
    helpText,
    fault,
    found,
  );
  let faulty = false;
  let shown = '[]';
  let blocked = false;
  const mark = () => {
    element.classList.toggle('wrong', faulty || blocked);
    setAttribute(control, 'aria-invalid', faulty || blocked ? 'true' : null);
  };
  return {
    element,
    describedBy,
    beside,
    showFault(text) {
      fault.textContent = text ?? '';
      faulty = text !== null;
      mark();
    },
    showFindings(findings) {
      const key = JSON.stringify(findings.map(({ severity, text }) => [severity, text]));
      if (key === shown) return;
      shown = key;
      found.replaceChildren(
        ...findings.map((one) => el('li', {}, severityMark(one.severity), ' ', textOf(one))),
      );
      blocked = findings.some(({ severity }) => severity === 'blocker');
      mark();
    },
  };
}
