import type { Part } from '../../core/protocol/views';
import type { PageContext } from '../context';
import { el, newId, setAttribute } from '../elements';
import { type Freshness, freshness, type PageState } from '../state';
import { newProgress } from './progress';

/** A section of the page: a heading, a column of fields, the plots beside it. */
export interface Frame {
  element: HTMLElement;
  fields: HTMLElement;
  plots: HTMLElement;
  /** Dims an element while it shows a part of an older document. */
  follow<E extends HTMLElement>(element: E, part: Part): E;
  update(state: PageState): void;
}

/** @param parts those whose progress is told here */
export function newFrame(name: string, title: string, parts: readonly Part[], context: PageContext): Frame {
  const heading = el('h2', { id: newId(name), tabindex: '-1' }, title);
  const progress = newProgress(context, parts);
  const fields = el('div', { class: 'fields' });
  const plots = el('div', { class: 'plots' });
  const element = el(
    'section',
    { 'data-section': name, 'aria-labelledby': heading.id },
    el('div', { class: 'head' }, heading, progress.element),
    el('div', { class: 'columns' }, fields, plots),
  );
  const followed: { element: HTMLElement; part: Part }[] = [];
  return {
    element,
    fields,
    plots,
    follow(followedElement, part) {
      followed.push({ element: followedElement, part });
      return followedElement;
    },
    update(state) {
      progress.update(state);
      for (const { element: one, part } of followed) dim(one, freshness(state, part));
    },
  };
}

/** Shows by a class and to screen readers how old something is. */
export function dim(element: HTMLElement, how: Freshness): void {
  element.classList.toggle('stale', how === 'computing' || how === 'outdated');
  element.hidden = how === 'missing' || how === 'awaited';
  setAttribute(element, 'aria-busy', how === 'computing' ? 'true' : null);
}
