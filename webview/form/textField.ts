import type { Change } from '../../core/protocol/messages';
import type { FormView } from '../../core/protocol/views';
import { el } from '../elements';
import type { Checked } from '../numbers';
import type { Path } from '../paths';
import type { Field } from './fieldBook';
import { type FieldWords, newShell } from './shell';
import { fill, isOpen, newTyping, ownsUndo, restore, type Typing } from './typing';

/** What a typed field stands for. `V`: its value, as a text can be read as. */
export interface TypedField<V> extends FieldWords {
  path: Path;
  numeric?: boolean;
  /** Shown in the empty field. */
  empty?: string;
  read(form: FormView): V;
  show(value: V): string;
  check(text: string): Checked<V>;
  changes(value: V): Change[];
  /** Beside the field. */
  beside?(value: V): string;
}

/** An input that commits on change, Enter and leaving, and gives the document's text back on Escape. */
export function newTextField<V>(spec: TypedField<V>, edit: (changes: Change[]) => void): Field {
  const input = el('input', {
    type: 'text',
    class: spec.numeric ? 'numeric' : undefined,
    inputmode: spec.numeric ? 'decimal' : undefined,
    placeholder: spec.empty,
    autocomplete: 'off',
    spellcheck: 'false',
  });
  const shell = newShell(spec, input);
  let typing: Typing = newTyping();
  const show = (next: Typing) => {
    typing = next;
    if (input.value !== typing.typed) input.value = typing.typed;
    if (!typing.wrong) shell.showFault(null);
    sayBeside();
  };
  const sayBeside = () => {
    if (spec.beside === undefined) return;
    const checked = spec.check(input.value);
    shell.beside.textContent = 'value' in checked ? spec.beside(checked.value) : '';
  };
  const commit = () => {
    if (!isOpen(typing)) return;
    const checked = spec.check(typing.typed);
    if ('error' in checked) {
      typing = { ...typing, wrong: true };
      shell.showFault(checked.error);
      return;
    }
    const text = spec.show(checked.value);
    const changed = text !== typing.kept;
    show({ ...typing, kept: text, typed: text, wrong: false });
    if (changed) edit(spec.changes(checked.value));
  };

  input.addEventListener('input', () => {
    typing = { ...typing, typed: input.value };
    if (typing.wrong && !('error' in spec.check(input.value))) {
      typing = { ...typing, wrong: false };
      shell.showFault(null);
    }
    sayBeside();
  });
  input.addEventListener('focus', () => {
    typing = { ...typing, focused: true };
  });
  input.addEventListener('blur', () => {
    typing = { ...typing, focused: false };
    commit();
  });
  input.addEventListener('change', commit);
  input.addEventListener('keydown', (event) => {
    if (event.key === 'Enter') commit();
    if (event.key === 'Escape' && isOpen(typing)) {
      show(restore(typing));
      event.stopPropagation();
    }
    // Otherwise the workbench would undo in the document what was never in it.
    if (ownsUndo(typing, event)) event.stopPropagation();
  });
  return {
    path: spec.path,
    element: shell.element,
    fill: (form) => show(fill(typing, spec.show(spec.read(form)))),
    showFindings: shell.showFindings,
    setDisabled(disabled) {
      input.disabled = disabled;
    },
    focus: () => input.focus(),
    isOpen: () => typing.focused && isOpen(typing),
  };
}
