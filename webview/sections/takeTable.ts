import type { FormView, RecordingsView } from '../../core/protocol/views';
import type { PageContext } from '../context';
import { el } from '../elements';
import { count, plain } from '../figures';
import { table } from '../tables';
import { t } from '../words';

/** The takes, one of which is looked at. */
export function takeTable(form: FormView, view: RecordingsView | null, context: PageContext): HTMLElement {
  const chosen = context.take();
  const rows = form.document.takes.map((entry, i) => {
    const known = view?.takes.find(({ name }) => name === entry.name) ?? null;
    const button = el(
      'button',
      { type: 'button', class: 'link', 'aria-pressed': String(i === chosen) },
      entry.name,
    );
    button.addEventListener('click', () => context.chooseTake(i));
    const inputs = entry.inputs.map(({ file, channel }) => `${file} · ${channel}`).join(', ');
    const rate = view?.sampleRate ?? null;
    const length =
      known === null
        ? '–'
        : rate === null
          ? t('{0} samples', count(known.samples))
          : t('{0} s', plain(known.samples / rate, 6));
    return [button, inputs, `${entry.desired.file} · ${entry.desired.channel}`, length];
  });
  const element = table(t('Takes'), [t('take'), t('inputs'), t('desired'), t('length')], rows, [3]);
  element.classList.add('takes');
  return element;
}
