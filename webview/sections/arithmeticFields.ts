import type { Change } from '../../core/protocol/messages';
import type { FormView } from '../../core/protocol/views';
import type { PageContext } from '../context';
import { newChoiceField } from '../form/choiceField';
import type { Field } from '../form/fieldBook';
import { newNumberField, newNumbersField } from '../form/numberField';
import { type Path, valueAt } from '../paths';
import { wordEdit } from '../wordEdit';
import { t } from '../words';

/** The number format of the target. */
export function arithmeticFields({ edit, fields, state }: PageContext): Field[] {
  const amplitude = { min: 0, above: true, max: 1e30, optional: true };
  const overflow = [
    { value: 'saturate', label: t('saturate: clip to the range') },
    { value: 'wrap', label: t('wrap: keep the low bits') },
  ];
  const drawn = t('from the recordings');
  const list: Field[] = [
    newChoiceField(
      {
        path: ['arithmetic', 'word'],
        label: t('Coefficient word'),
        help: t('Bits of a coefficient, or its floating-point type.'),
        choices: ['8', '12', '16', '24', '32', 'float32', 'float64'].map((value) => ({
          value,
          label: wordInWords(value),
        })),
        changes: (value) => wordEdit(state().form, value),
      },
      edit,
    ),
    newChoiceField(
      {
        path: ['arithmetic', 'rounding'],
        label: t('Rounding'),
        help: t(
          'Nearest: each coefficient by itself. Error-aware: all together, so that the output error is small.',
        ),
        choices: [
          { value: 'error-aware', label: t('error-aware') },
          { value: 'nearest', label: t('nearest') },
        ],
      },
      edit,
    ),
    newNumberField(
      {
        path: ['arithmetic', 'fractionBits'],
        label: t('Fraction bits'),
        unit: t('bits'),
        help: t('Binary places of the coefficients; empty: as many as the largest allows.'),
        empty: t('as many as fit'),
        rule: { min: 0, max: 62, whole: true, optional: true },
      },
      edit,
    ),
    newNumberField(
      {
        path: ['arithmetic', 'accumulator'],
        label: t('Accumulator'),
        unit: t('bits'),
        help: t('Bits in which the products are added up.'),
        rule: { min: 8, max: 64, whole: true },
      },
      edit,
    ),
    newChoiceField(
      {
        path: ['arithmetic', 'accumulatorOverflow'],
        label: t('Accumulator overflow'),
        help: t('What the accumulator does when a sum does not fit.'),
        choices: overflow,
      },
      edit,
    ),
    newChoiceField(
      {
        path: ['arithmetic', 'overflow'],
        label: t('Output overflow'),
        help: t('What the output does when a value does not fit its word.'),
        choices: overflow,
      },
      edit,
    ),
    signalWord(['arithmetic', 'input', 'word'], t('Input word'), edit),
    newNumbersField(
      {
        path: ['arithmetic', 'input', 'fullScale'],
        label: t('Input full scale'),
        help: t(
          "Amplitude, in the recording's unit, that stands for 2^(bits−1) counts: one number, or one for each input between semicolons.",
        ),
        empty: drawn,
        rule: amplitude,
      },
      edit,
    ),
    signalWord(['arithmetic', 'output', 'word'], t('Output word'), edit),
    newNumbersField(
      {
        path: ['arithmetic', 'output', 'fullScale'],
        label: t('Output full scale'),
        help: t("Amplitude, in the desired signal's unit, that stands for 2^(bits−1) counts."),
        empty: drawn,
        rule: amplitude,
      },
      edit,
    ),
    newNumberField(
      {
        path: ['arithmetic', 'cyclesPerMac'],
        label: t('Cycles per multiply-accumulate'),
        help: t('The cost in cycles is counted with it.'),
        rule: { min: 0, above: true, max: 1e6 },
      },
      edit,
    ),
  ];
  for (const field of list) fields.add(field);
  return list;
}

function wordInWords(value: string): string {
  return /^\d/.test(value) ? t('{0} bits', value) : value;
}

function signalWord(path: Path, label: string, edit: (changes: Change[]) => void): Field {
  const integers = ['8', '10', '12', '14', '16', '18', '20', '24', '32'];
  return newChoiceField(
    {
      path,
      label,
      help: t('Bits of a sample; with float coefficients the same float type.'),
      choices: [...integers, 'float32', 'float64'].map((value) => ({ value, label: wordInWords(value) })),
      read: (form: FormView) => String(valueAt(form.document, path)),
      changes: (value) => [{ path: [...path], value: /^\d/.test(value) ? Number(value) : value }],
    },
    edit,
  );
}
