import type { PageContext } from '../context';
import { el } from '../elements';

/** A part that can be closed; the page remembers it. */
export function newDetails(
  name: string,
  summary: string,
  open: boolean,
  context: PageContext,
  ...children: (HTMLElement | null)[]
): HTMLDetailsElement {
  const { keeper } = context;
  const element = el('details', {}, el('summary', {}, summary), ...children);
  element.open = keeper.state.open[name] ?? open;
  element.addEventListener('toggle', () => {
    keeper.change({ open: { ...keeper.state.open, [name]: element.open } });
  });
  return element;
}
