import type { FindingView } from '../core/protocol/views';
import type { PageContext } from './context';
import { leadOf, pathsOf } from './leads';
import { nearestPlace } from './paths';
import type { Lanes } from './plots/types';
import { viewOf } from './state';

/** Makes the way to what a finding is about; null where there is none. */
export function leadTo(
  found: FindingView,
  context: PageContext,
  lanes: () => Lanes | null,
): (() => void) | null {
  const at = (anchor: string) => document.querySelector<HTMLElement>(`[data-anchor="${anchor}"]`);
  const state = context.state();
  const recording = viewOf(state, 'recording')?.file;
  if (recording && found.span !== null) {
    const { span } = found;
    return () => show(lanes()?.element, () => lanes()?.lead(span));
  }
  const takes = viewOf(state, 'recordings')?.takes ?? [];
  const lead = leadOf(
    pathsOf([found], state.form)[0],
    context.fields.paths(),
    takes,
    (anchor) => at(anchor) !== null,
  );
  if (lead === null) return null;
  return () => {
    if (lead.kind === 'text') context.calls.openAsText(lead.position).catch(context.fail);
    if (lead.kind === 'anchor') show(at(lead.anchor));
    if (lead.kind === 'take') context.chooseTake(lead.take);
    if (lead.kind === 'field' || lead.kind === 'take') {
      const path = nearestPlace(context.fields.paths(), lead.path);
      const field = path === null ? null : context.fields.at(path);
      show(field?.element, () => field?.focus());
    }
    if (lead.kind === 'lanes') {
      const name = takes[lead.take].name;
      const number = context.state().form?.document.takes.findIndex((entry) => entry.name === name) ?? -1;
      if (number >= 0) context.chooseTake(number);
      show(lanes()?.element, () => lanes()?.lead(lead.span));
    }
  };
}

function show(element: HTMLElement | null | undefined, after: () => void = () => focusOn(element)): void {
  for (let parent = element?.parentElement; parent; parent = parent.parentElement) {
    if (parent instanceof HTMLDetailsElement) parent.open = true;
  }
  element?.scrollIntoView({ block: 'center' });
  after();
}

function focusOn(element: HTMLElement | null | undefined): void {
  if (!element) return;
  const target = element.querySelector<HTMLElement>('[tabindex="0"], button') ?? element;
  if (target === element && !element.hasAttribute('tabindex')) element.tabIndex = -1;
  target.focus({ preventScroll: true });
}
