import { el } from './elements';

export type Cell = string | Node;

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
  // Wide tables scroll by themselves, by the keyboard too.
  return el('div', { class: 'wide', tabindex: '0', role: 'region', 'aria-label': caption }, grid);
}
