import { keywords } from './keywords';

/** Characters of a symbol at most: as many as C99 (5.2.4.1) promises to tell names apart by. */
export const longestSymbol = 63;

/** Characters of a symbol that is drawn from a title at most. */
const longestDrawn = 40;

/** What keeps a text from being the symbol that all generated names start with. */
export type SymbolFault = 'form' | 'long' | 'keyword' | 'reserved';

/**
 * Why a text is no symbol, or null. The names made from it (`belt_taps`, `BELT_LENGTH`) must be free in C and C++:
 * those that start with an underscore (C99, 7.1.3) or have two in a row (C++ [lex.name]) belong to the compiler.
 */
export function symbolFault(name: string): SymbolFault | null {
  if (!/^[A-Za-z_][A-Za-z0-9_]*$/.test(name)) return 'form';
  if (name.length > longestSymbol) return 'long';
  if (keywords.includes(name)) return 'keyword';
  return name.startsWith('_') || name.endsWith('_') || name.includes('__') ? 'reserved' : null;
}

/** A symbol from a title: its Latin letters and digits in lower case, joined by underscores; `filter` where it has none. */
export function defaultSymbol(title: string): string {
  const letters = title.normalize('NFKD').replace(/\p{M}/gu, '').toLowerCase();
  const joined = trimmed(letters.replace(/[^a-z0-9]+/g, '_'));
  if (joined === '') return 'filter';
  const named = /^[0-9]/.test(joined) ? `filter_${joined}` : joined;
  const drawn = trimmed(named.slice(0, longestDrawn));
  return keywords.includes(drawn) ? `${drawn}_filter` : drawn;
}

function trimmed(name: string): string {
  return name.replace(/^_+|_+$/g, '');
}
