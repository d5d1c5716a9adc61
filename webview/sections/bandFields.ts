import type { Change } from '../../core/protocol/messages';
import type { FormView } from '../../core/protocol/views';
import type { Field } from '../form/fieldBook';
import { newNumberField } from '../form/numberField';
import type { NumberRule } from '../numbers';
import { type Draft, pairedChange } from '../pairedValues';
import { type Path, valueAt } from '../paths';
import { t } from '../words';

type Edit = (changes: Change[]) => void;
type Now = () => FormView | null;

/** The band to which the error is weighted: both ends or none. */
export function bandFields(edit: Edit, now: Now): Field[] {
  const rule = { min: 0, max: 1e12, optional: true };
  const help = t('Weights the error to a band of frequencies; both ends empty: all count alike.');
  return paired(['prepare', 'band'], ['from', 'to'], edit, now, [
    { key: 'from', label: t('Band from'), unit: t('Hz'), help, rule },
    { key: 'to', label: t('Band to'), unit: t('Hz'), help, rule },
  ]);
}

/** A gain that is held at one frequency. */
export function gainFields(edit: Edit, now: Now): Field[] {
  const help = t('The response of one input is held to this gain at this frequency; empty: nothing is held.');
  return paired(['filter', 'fixedGain'], ['frequency', 'gain'], edit, now, [
    {
      key: 'input',
      label: t('Held input'),
      unit: '',
      help,
      rule: { min: 1, max: 64, whole: true, optional: true },
    },
    {
      key: 'frequency',
      label: t('Held frequency'),
      unit: t('Hz'),
      help,
      rule: { min: 0, max: 1e12, optional: true },
    },
    { key: 'gain', label: t('Held gain'), unit: '', help, rule: { min: -1e30, max: 1e30, optional: true } },
  ]);
}

interface One {
  key: string;
  label: string;
  unit: string;
  help: string;
  rule: NumberRule;
}

function paired(path: Path, needed: string[], edit: Edit, now: Now, ones: readonly One[]): Field[] {
  let waiting: Draft = {};
  const present = () => (valueAt(now()?.document, path) ?? null) as Draft | null;
  return ones.map(({ key, ...words }) =>
    newNumberField(
      {
        ...words,
        path: [...path, key],
        read: (form) => {
          const whole = (valueAt(form.document, path) ?? null) as Draft | null;
          // What waits for its counterpart stays in the field.
          return whole === null ? (waiting[key] ?? null) : (whole[key] ?? null);
        },
        changes(value) {
          const next = pairedChange(path, present(), waiting, key, value, needed);
          waiting = next.waiting;
          return next.changes;
        },
      },
      edit,
    ),
  );
}
