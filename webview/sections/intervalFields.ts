import type { FormView, TakeView } from '../../core/protocol/views';
import type { PageContext } from '../context';
import { newButton } from '../controls';
import { el } from '../elements';
import { newGroup } from '../form/choiceField';
import type { Field } from '../form/fieldBook';
import { newNumberField } from '../form/numberField';
import { freeStretch } from '../freeStretch';
import {
  addInterval,
  type IntervalKind,
  type IntervalList,
  intervalRows,
  removeInterval,
  secondsOf,
  setEnd,
} from '../intervalEdits';
import { t } from '../words';

/** What the intervals of one kind are called, and what they do. */
function wordsOf(kind: IntervalKind) {
  return {
    fit: {
      legend: t('Fit intervals'),
      one: t('Fit'),
      add: t('Add fit interval'),
      help: t('The taps are fitted over these stretches.'),
      leftOut: t('Left out in the document: what is not held out, or the first two thirds.'),
    },
    heldOut: {
      legend: t('Held-out intervals'),
      one: t('Held-out'),
      add: t('Add held-out interval'),
      help: t('The filter is judged over these stretches, which the fit never sees.'),
      leftOut: t('Left out in the document: the last third, or none where the fit is given.'),
    },
    disturbanceOnly: {
      legend: t('Disturbance only'),
      one: t('Disturbance only'),
      add: t('Add disturbance-only interval'),
      help: t('Stretches in which the wanted signal is known to be absent.'),
      leftOut: t('None given.'),
    },
  }[kind];
}

/** The intervals of one kind as typed numbers. Built anew whenever their number changes. */
export function intervalFields(
  list: IntervalList,
  form: FormView,
  take: TakeView | null,
  sampleRate: number | null,
  context: PageContext,
): { group: Field; fields: Field[] } {
  const words = wordsOf(list.kind);
  const now = () => {
    const current = context.state().form ?? form;
    return { current, rows: intervalRows(current, list, take, sampleRate).rows };
  };
  const { rows, leftOut } = intervalRows(form, list, take, sampleRate);
  const fields: Field[] = [];
  const lines = rows.map((row, i) => {
    const name = rows.length === 1 ? words.one : `${words.one} ${i + 1}`;
    const ends = (['from', 'to'] as const).map((end) =>
      newNumberField(
        {
          path: [...row.path, end],
          label: end === 'from' ? t('{0} from', name) : t('{0} to', name),
          unit: row.samples ? t('samples') : t('s'),
          help: words.help,
          rule: { min: 0, max: Number.MAX_SAFE_INTEGER, whole: row.samples },
          read: (shown) => intervalRows(shown, list, take, sampleRate).rows[i]?.[end] ?? null,
          check: (value) => checkEnd(value, now().rows[i], end),
          changes: (value) => setEnd(now().current, list, now().rows, i, end, value!),
        },
        context.edit,
      ),
    );
    fields.push(...ends);
    const remove = newButton(t('Remove'), () =>
      context.edit(removeInterval(now().current, list, now().rows, i)),
    );
    remove.element.setAttribute('aria-label', t('Remove {0}', name));
    return el('div', { class: 'ends' }, ...ends.map(({ element }) => element), remove.element);
  });
  const free = take === null ? null : freeStretch(take, list.kind);
  const add = newButton(words.add, () => {
    if (free === null) return;
    const { from, to } = free;
    const entry =
      sampleRate === null
        ? { from, to, samples: true }
        : { from: secondsOf(from, sampleRate), to: secondsOf(to, sampleRate), samples: false };
    context.edit(addInterval(now().current, list, now().rows, entry));
  });
  add.setDisabled(free === null);
  const note = leftOut ? el('p', { class: 'rest' }, words.leftOut) : null;
  const parts = [...(note ? [note] : []), ...lines, add.element];
  return { group: newGroup(['takes', list.take, list.kind], words.legend, ...parts), fields };
}

function checkEnd(value: number | null, row: { from: number; to: number } | undefined, end: 'from' | 'to') {
  if (value === null || row === undefined) return { value };
  const rises = end === 'from' ? row.to > value : value > row.from;
  return rises ? { value } : { error: t('The end must come after the start.') };
}
