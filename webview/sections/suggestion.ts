import type { ChoiceView } from '../../core/protocol/views';
import type { PageContext } from '../context';
import { newButton } from '../controls';
import { el, setText } from '../elements';
import { decibels } from '../figures';
import { freshness, type PageState, viewOf } from '../state';
import { suggestionEdit } from '../suggestionEdit';
import { phrase, t } from '../words';

/** The suggested choice with its reason, and the button that takes it over. */
export function newSuggestion(context: PageContext): {
  element: HTMLElement;
  update(state: PageState): void;
} {
  const words = el('p', { id: 'suggestion' });
  const button = newButton(
    t('Suggest'),
    () => {
      const { form } = context.state();
      const suggestion = viewOf(context.state(), 'choice')?.suggestion ?? null;
      if (form !== null && suggestion !== null) context.edit(suggestionEdit(form, suggestion));
    },
    { describedBy: words.id },
  );
  return {
    element: el('div', { class: 'suggestion' }, button.element, words),
    update(state) {
      const { form } = state;
      const how = freshness(state, 'choice');
      const suggestion = viewOf(state, 'choice')?.suggestion ?? null;
      const open = form !== null && suggestion !== null && suggestionEdit(form, suggestion).length > 0;
      button.setDisabled(!open || how !== 'fresh');
      words.classList.toggle('stale', how === 'computing' || how === 'outdated');
      if (suggestion !== null)
        setText(words, `${inWords(suggestion)} ${open ? '' : t('The document has it.')}`);
      else if (how === 'missing' || how === 'outdated')
        setText(words, t('No suggestion; the findings say why.'));
      else setText(words, t('The search goes on.'));
    },
  };
}

/** The reason names the three numbers and their cost. */
function inWords({ heldOutDb, reason }: NonNullable<ChoiceView['suggestion']>): string {
  const why = phrase(reason);
  return heldOutDb === null ? why : `${why} ${t('Held-out: {0}.', decibels(heldOutDb))}`;
}
