import type { PageContext, Section } from './context';
import { newButton } from './controls';
import { el, setText } from './elements';
import { stripText } from './stripText';
import { t } from './words';

export interface Strip extends Section {
  /** What a check or a writing came to; null: nothing. */
  say(outcome: string | null): void;
}

/** The answer, always in sight. */
export function newStrip(context: PageContext, check: () => void): Strip {
  const title = el('h1');
  const figures = el('p', { class: 'figures' });
  const why = el('p', { class: 'why' });
  const findings = el('span');
  const files = el('span');
  const outcome = el('span');
  const status = el(
    'div',
    { class: 'status', role: 'status', 'aria-live': 'polite', 'data-strip': '' },
    figures,
    why,
    el('p', {}, findings, ' ', files, ' ', outcome),
  );
  const checking = newButton(t('Check'), check);
  const writing = newButton(t('Write files'), () => context.write(), { primary: true });
  const buttons = el('div', { class: 'buttons' }, checking.element, writing.element);
  const trust = newButton(t('Manage trust'), () => context.calls.manageTrust(null).catch(context.fail));
  const distrust = el('p', { class: 'why' }, t('Writing needs a trusted workspace.'), ' ', trust.element);
  const spans: HTMLElement[] = [];

  return {
    element: el('header', { class: 'strip' }, el('div', { class: 'top' }, title, buttons), status, distrust),
    say: (text) => setText(outcome, text ?? ''),
    update(state) {
      const text = stripText(state);
      setText(title, text.title);
      while (spans.length > text.figures.length) spans.pop()?.remove();
      text.figures.forEach((figure, i) => {
        if (i === spans.length) {
          spans.push(el('span'));
          figures.append(spans[i], ' ');
        }
        setText(spans[i], figure.text);
        spans[i].classList.toggle('stale', figure.freshness !== 'fresh');
      });
      setText(why, text.why ?? '');
      why.hidden = text.why === null;
      setText(findings, text.findings);
      setText(files, text.files?.text ?? '');
      files.classList.toggle('stale', text.files !== null && text.files.freshness !== 'fresh');
      const editor = state.kind === 'pairing';
      buttons.hidden = !editor;
      distrust.hidden = state.trusted || !editor;
      writing.setDisabled(!state.trusted || !state.readable);
      checking.setDisabled(!state.readable);
    },
  };
}
