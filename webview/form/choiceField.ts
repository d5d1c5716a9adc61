import type { Change } from '../../core/protocol/messages';
import type { FormView } from '../../core/protocol/views';
import { type Choice, newCheckbox, newDropdown } from '../controls';
import { el } from '../elements';
import { type Path, valueAt } from '../paths';
import type { Field } from './fieldBook';
import { type FieldWords, newShell } from './shell';

export interface ChoiceSpec extends FieldWords {
  path: Path;
  choices: readonly Choice[];
  /** The choice that stands for the document's value; its text by default. */
  read?(form: FormView): string;
  changes?(value: string): Change[];
}

/** One of a few values, committed when it is chosen. */
export function newChoiceField(spec: ChoiceSpec, edit: (changes: Change[]) => void): Field {
  const { path } = spec;
  const changes = spec.changes ?? ((value: string) => [{ path: [...path], value }]);
  const read = spec.read ?? ((form: FormView) => String(valueAt(form.document, path)));
  const control = newDropdown(spec.label, (value) => edit(changes(value)));
  control.setChoices(spec.choices);
  const shell = newShell(spec, control.element);
  return {
    path,
    element: shell.element,
    fill: (form) => control.set(read(form)),
    showFindings: shell.showFindings,
    setDisabled: control.setDisabled,
    focus: () => control.element.focus(),
  };
}

export interface CheckSpec extends FieldWords {
  path: Path;
  read?(form: FormView): boolean;
  changes?(checked: boolean): Change[];
}

/** Yes or no. */
export function newCheckField(spec: CheckSpec, edit: (changes: Change[]) => void): Field {
  const { path } = spec;
  const changes = spec.changes ?? ((value: boolean) => [{ path: [...path], value }]);
  const read = spec.read ?? ((form: FormView) => valueAt(form.document, path) === true);
  const control = newCheckbox(spec.label, (checked) => edit(changes(checked)));
  const shell = newShell(spec, control.element);
  // The box carries its own label.
  shell.element.querySelector('label')?.remove();
  return {
    path,
    element: shell.element,
    fill: (form) => control.set(read(form)),
    showFindings: shell.showFindings,
    setDisabled: control.setDisabled,
    focus: () => control.element.focus(),
  };
}

/** Fields under one legend; findings about the whole group stand below it. */
export function newGroup(path: Path, legend: string, ...fields: HTMLElement[]): Field {
  const found = newShell({ label: legend, help: '' }, el('div'));
  const list = found.element.querySelector('.found')!;
  const element = el(
    'fieldset',
    { tabindex: '-1' },
    el('legend', {}, legend),
    ...fields,
    list as HTMLElement,
  );
  return {
    path,
    element,
    fill() {},
    showFindings: found.showFindings,
    setDisabled() {},
    focus: () => element.focus(),
  };
}
