import { visible } from '../../figures/visible';

/** Keys that lead to a value of the document. */
export type Path = readonly (string | number)[];

/** `takes[0].fit.to`; the document itself is `the document`. */
export function pathInWords(path: Path): string {
  const words = path.map((key) => {
    if (typeof key === 'number') return `[${key}]`;
    return /^[$\w]{1,40}$/.test(key) ? `.${key}` : `[${shortQuote(key)}]`;
  });
  return words.length === 0 ? 'the document' : words.join('').replace(/^\./, '');
}

/** The text in quotes on one line, cut where it is long. */
export function shortQuote(text: string, longest = 60): string {
  const characters = [...text.slice(0, 2 * longest)];
  const cut = characters.length > longest || text.length > 2 * longest;
  return `"${visible(characters.slice(0, longest).join(''))}${cut ? '…' : ''}"`;
}
