import type { FindingView, FormView } from '../../core/protocol/views';
import { type Path, pathKey } from '../paths';
import { findingsAtFields } from './atFields';

/** A field of the form, or a group of fields, by the value of the document it stands for. */
export interface Field {
  path: Path;
  element: HTMLElement;
  /** Shows the document's value. */
  fill(form: FormView): void;
  showFindings(findings: readonly FindingView[]): void;
  setDisabled(disabled: boolean): void;
  focus(): void;
  /** True while it holds text that is being typed: it must not be built anew then. */
  isOpen?(): boolean;
}

/** All fields on the page. */
export interface FieldBook {
  add<F extends Field>(field: F): F;
  remove(field: Field): void;
  paths(): Path[];
  at(path: Path): Field | null;
  fill(form: FormView): void;
  showFindings(findings: readonly FindingView[]): void;
  setDisabled(disabled: boolean): void;
}

export function newFieldBook(): FieldBook {
  const fields = new Set<Field>();
  let disabled = false;
  return {
    add(field) {
      fields.add(field);
      field.setDisabled(disabled);
      return field;
    },
    remove: (field) => void fields.delete(field),
    paths: () => [...fields].map(({ path }) => path),
    at: (path) => [...fields].find((field) => pathKey(field.path) === pathKey(path)) ?? null,
    fill(form) {
      for (const field of fields) field.fill(form);
    },
    showFindings(findings) {
      const byField = findingsAtFields(
        [...fields].map(({ path }) => path),
        findings,
      );
      for (const field of fields) field.showFindings(byField.get(pathKey(field.path)) ?? []);
    },
    setDisabled(next) {
      if (next === disabled) return;
      disabled = next;
      for (const field of fields) field.setDisabled(next);
    },
  };
}
