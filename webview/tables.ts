import { el } from './elements';

export type Cell = string | Node;

/** Tables that are larger than their place scroll by themselves, by the keyboard too; others are no stop for it. */
const widths = new ResizeObserver((entries) => {
  for (const { target } of entries) {
    const scrolls = target.scrollWidth > target.clientWidth || target.scrollHeight > target.clientHeight + 1;
    const caption = target.querySelector('caption')?.textContent ?? '';
    for (const [name, value] of Object.entries({ tabindex: '0', role: 'region', 'aria-label': caption })) {
      if (scrolls) target.setAttribute(name, value);
      else target.removeAttribute(name);
    }
  }
});

/** A table with a caption; the first cell of each row is its heading. `numeric` are the columns that are set right. */
export function table(
  caption: string,
  head: readonly string[],
  rows: readonly (readonly Cell[])[],
  numeric: readonly number[] = [],
): HTMLElement {
  const align = (i: number) => (numeric.includes(i) ? 'numeric' : undefined);
  const heading = el('tr', {}, ...head.map((text, i) => el('th', { scope: 'col', class: align(i) }, text)));
  const body = rows.map((cells) =>
    el(
      'tr',
      {},
      ...cells.map((cell, i) =>
        i === 0 ? el('th', { scope: 'row', class: align(i) }, cell) : el('td', { class: align(i) }, cell),
      ),
    ),
  );
  const grid = el(
    'table',
    {},
    el('caption', {}, caption),
    head.length > 0 && el('thead', {}, heading),
    el('tbody', {}, ...body),
  );
  const wide = el('div', { class: 'wide' }, grid);
  widths.observe(wide);
  return wide;
}
