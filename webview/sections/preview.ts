import type { FirmwareView } from '../../core/protocol/views';
import type { PageContext } from '../context';
import { newButton } from '../controls';
import { el, setText } from '../elements';
import { t } from '../words';
import { newDetails } from './details';

/** The coefficient file as it would be written. */
export function newPreview(context: PageContext): {
  element: HTMLElement;
  show(preview: FirmwareView['preview']): void;
} {
  const name = el('span', { class: 'place' });
  const text = el('pre', {
    tabindex: '0',
    role: 'region',
    'aria-label': t('Preview of the coefficient file'),
  });
  const said = el('span', { role: 'status' });
  const copy = newButton(t('Copy'), () => {
    navigator.clipboard.writeText(text.textContent ?? '').then(
      () => setText(said, t('Copied.')),
      () => setText(said, t('The workbench does not allow copying here; select the text instead.')),
    );
  });
  const row = el('div', { class: 'buttons' }, name, copy.element, said);
  const element = newDetails('preview', t('Preview'), true, context, row, text);
  return {
    element,
    show(preview) {
      setText(name, preview?.path ?? '');
      setText(text, preview?.text ?? '');
      setText(said, '');
      row.hidden = preview === null;
      text.hidden = preview === null;
    },
  };
}
