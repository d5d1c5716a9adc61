import type { FindingView } from '../core/protocol/views';
import type { PageContext, Section } from './context';
import { newButton } from './controls';
import { el, setText } from './elements';
import { isBroken, missingKeys } from './readable';
import { t, textOf } from './words';

/** What stands in the way of the whole page: a text that cannot be read, a bug; and `failure`, what just failed, for the strip. */
export function newBanners(
  context: PageContext,
): Section & { failure: HTMLElement; fail(text: string): void } {
  const broken = el('p');
  const asText = newButton(t('Open as text'), () => {
    const position = context.state().findings.find((found) => found.position !== null)?.position ?? null;
    context.calls.openAsText(position).catch(context.fail);
  });
  const brokenBanner = el('div', { class: 'banner blocker', role: 'alert' }, broken, asText.element);
  const trouble = el('p');
  const troubleBanner = el('div', { class: 'banner blocker', role: 'alert' }, trouble);
  const failed = el('p');
  const close = newButton(t('Close'), () => {
    failure.hidden = true;
  });
  const failure = el('div', { class: 'banner caution', role: 'alert' }, failed, close.element);
  let generation = 0;
  brokenBanner.hidden = troubleBanner.hidden = failure.hidden = true;
  return {
    element: el('div', {}, brokenBanner, troubleBanner),
    failure,
    fail(text) {
      failure.hidden = false;
      setText(failed, text);
      generation = context.state().generation;
    },
    update(state) {
      // What failed before the newest change is over.
      if (state.generation > generation) failure.hidden = true;
      const first = state.findings.find(({ severity }) => severity === 'blocker');
      brokenBanner.hidden = state.readable || first === undefined || missingKeys(state) !== null;
      if (first !== undefined) setText(broken, unreadable(first, isBroken(state), state.form !== null));
      troubleBanner.hidden = state.trouble === null;
      setText(trouble, state.trouble ?? '');
    },
  };
}

function unreadable(first: FindingView, broken: boolean, shown: boolean): string {
  const parts = [broken ? t('The document is broken.') : t('The document has a fault.')];
  if (shown) parts.push(t('The last good state is shown.'));
  const { position } = first;
  if (position !== null) parts.push(t('Line {0}, column {1}:', position.line, position.column));
  // The sentence of broken JSON begins with its place itself, in any language.
  parts.push(textOf(first).replace(/^\p{L}+ \d+, \p{L}+ \d+: /u, ''));
  return parts.join(' ');
}
