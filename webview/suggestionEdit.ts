import type { Change } from '../core/protocol/messages';
import type { ChoiceView, FormView } from '../core/protocol/views';

/** The suggestion as one edit; empty where the document has it already. */
export function suggestionEdit(form: FormView, suggestion: NonNullable<ChoiceView['suggestion']>): Change[] {
  const { filter } = form.document;
  const differ = (['length', 'delay', 'regularisation'] as const).filter(
    (key) => filter[key] !== suggestion[key],
  );
  // A delay that is left out follows the length; the suggested one is then written out.
  const loose =
    differ.includes('length') && !form.given.includes('filter/delay') && !differ.includes('delay');
  return [...differ, ...(loose ? (['delay'] as const) : [])].map((key) => ({
    path: ['filter', key],
    value: suggestion[key],
  }));
}
