/** What the literal of an NPY header can hold. */
export type Literal = string | number | boolean | null | Literal[] | { [key: string]: Literal };

/** Deeper nesting is no header of a recording. */
const deepest = 8;

/**
 * Parses the part of Python's literals that NPY headers use: dictionaries with text keys, tuples, lists, texts, whole
 * numbers, True, False and None. What follows the literal (blanks, a comment) does not matter.
 * @returns null where the text is no such literal (or is `None`)
 */
export function parseLiteral(text: string): Literal {
  let at = 0;
  const skip = () => {
    while (/\s/.test(text[at] ?? '')) at++;
  };
  const take = (token: string): boolean => {
    skip();
    if (!text.startsWith(token, at)) return false;
    at += token.length;
    return true;
  };

  function value(depth: number): Literal | undefined {
    if (depth > deepest) return undefined;
    skip();
    if (take('{')) return dictionary(depth);
    if (take('(')) return list(')', depth);
    if (take('[')) return list(']', depth);
    if (take('True')) return true;
    if (take('False')) return false;
    if (take('None')) return null;
    return number() ?? string();
  }

  function number(): number | undefined {
    const match = /^-?\d{1,15}L?/.exec(text.slice(at, at + 20));
    if (match === null) return undefined;
    at += match[0].length;
    return Number.parseInt(match[0], 10);
  }

  function string(): string | undefined {
    const match = /^u?'([^'\\\n]*)'|^u?"([^"\\\n]*)"/.exec(text.slice(at));
    if (match === null) return undefined;
    at += match[0].length;
    return match[1] ?? match[2];
  }

  function list(end: string, depth: number): Literal[] | undefined {
    const items: Literal[] = [];
    while (!take(end)) {
      const item = value(depth + 1);
      if (item === undefined) return undefined;
      items.push(item);
      if (!take(',')) return take(end) ? items : undefined;
    }
    return items;
  }

  function dictionary(depth: number): { [key: string]: Literal } | undefined {
    const entries: [string, Literal][] = [];
    while (!take('}')) {
      skip();
      const key = string();
      if (key === undefined || !take(':')) return undefined;
      const item = value(depth + 1);
      if (item === undefined) return undefined;
      entries.push([key, item]);
      if (!take(',')) return take('}') ? Object.fromEntries(entries) : undefined;
    }
    return Object.fromEntries(entries);
  }

  return value(0) ?? null;
}
