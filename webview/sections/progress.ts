import type { Part } from '../../core/protocol/views';
import type { PageContext } from '../context';
import { newButton } from '../controls';
import { el, newId, setText } from '../elements';
import { freshness, type PageState, wasStopped } from '../state';
import { phrase, t } from '../words';

/** Milliseconds of work before progress shows: what is over sooner would only flicker. */
const patience = 250;

/** What is being computed, how far it is, and a button that stops it or goes on. */
export function newProgress(
  context: PageContext,
  parts: readonly Part[],
): { element: HTMLElement; update(state: PageState): void } {
  const words = el('span', { id: newId('progress') });
  const bar = el('progress', { max: '1', 'aria-labelledby': words.id });
  const stop = newButton(t('Stop'), () => context.calls.stop(null).catch(context.fail));
  const goOn = newButton(t('Go on'), () => context.calls.resume(null).catch(context.fail));
  const element = el('div', { class: 'progress' }, bar, words, stop.element, goOn.element);
  element.hidden = true;
  let timer: ReturnType<typeof setTimeout> | undefined;

  const show = () => {
    timer = undefined;
    element.hidden = false;
  };
  const hide = () => {
    clearTimeout(timer);
    timer = undefined;
    element.hidden = true;
  };
  return {
    element,
    update(state) {
      const part = parts.find((one) => state.busy.has(one));
      const unfinished = parts.some((one) => ['outdated', 'missing'].includes(freshness(state, one)));
      const stopped = part === undefined && wasStopped(state) && unfinished;
      bar.hidden = stop.element.hidden = part === undefined;
      goOn.element.hidden = !stopped;
      if (part !== undefined) {
        const { what, share } = state.busy.get(part)!;
        bar.value = share;
        setText(words, t('{0}: {1} %', what === '' ? t('computing') : phrase(what), Math.floor(100 * share)));
        if (element.hidden) timer ??= setTimeout(show, patience);
      } else if (stopped) {
        setText(words, t('Stopped. What is shown is not of this document.'));
        show();
      } else hide();
    },
  };
}
