import type { Change } from '../../core/protocol/messages';
import type { FormView } from '../../core/protocol/views';
import {
  type Checked,
  checkNumber,
  checkNumbers,
  fieldText,
  type NumberRule,
  rangeInWords,
} from '../numbers';
import { type Path, valueAt } from '../paths';
import type { Field } from './fieldBook';
import type { FieldWords } from './shell';
import { newTextField, type TypedField } from './textField';

/** A number of the document. An empty optional field takes its key out. */
export interface NumberSpec extends FieldWords {
  path: Path;
  rule: NumberRule;
  empty?: string;
  read?(form: FormView): number | null;
  changes?(value: number | null): Change[];
  beside?(value: number | null): string;
  check?(value: number | null): Checked<number | null>;
}

export function newNumberField(spec: NumberSpec, edit: (changes: Change[]) => void): Field {
  const { path, rule } = spec;
  const typed: TypedField<number | null> = {
    ...spec,
    numeric: true,
    range: spec.range ?? `${capital(rangeInWords(rule))}.`,
    read: spec.read ?? ((form) => (valueAt(form.document, path) as number | null | undefined) ?? null),
    show: fieldText,
    check(text) {
      const checked = checkNumber(text, rule);
      return 'error' in checked || !spec.check ? checked : spec.check(checked.value);
    },
    changes: spec.changes ?? ((value) => [value === null ? { path: [...path] } : { path: [...path], value }]),
  };
  return newTextField(typed, edit);
}

/** One number for all signals, or one for each, between semicolons. */
export function newNumbersField(
  spec: FieldWords & { path: Path; rule: NumberRule; empty?: string },
  edit: (changes: Change[]) => void,
): Field {
  const { path, rule } = spec;
  const typed: TypedField<number[] | null> = {
    ...spec,
    numeric: true,
    range: spec.range ?? `${capital(rangeInWords(rule))}.`,
    read: (form) => valueAt(form.document, path) as number[] | null,
    show(values) {
      if (values === null) return '';
      const alike = values.every((value) => value === values[0]);
      return (alike ? values.slice(0, 1) : values).map(fieldText).join('; ');
    },
    check: (text) => checkNumbers(text, rule),
    changes(values) {
      if (values === null) return [{ path: [...path] }];
      return [{ path: [...path], value: values.length === 1 ? values[0] : values }];
    },
  };
  return newTextField(typed, edit);
}

function capital(text: string): string {
  return text.slice(0, 1).toUpperCase() + text.slice(1);
}
