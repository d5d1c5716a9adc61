/** Separators that are looked for; a blank stands for runs of blanks. */
export type Separator = '\t' | ';' | ',' | ' ';

/**
 * The cells of a line (RFC 4180, and blanks as separators): blanks round cells do not count, quotes hold separators, a
 * doubled quote is a quote.
 */
export function splitCells(line: string, separator: Separator): string[] {
  const text = separator === ' ' ? line.trim() : line;
  const cells: string[] = [];
  let cell = '';
  let quoted = false;
  // Whether the cell holds nothing but blanks so far.
  let bare = true;
  let i = 0;
  const end = () => {
    cells.push(quoted ? cell : cell.trim());
    cell = '';
    quoted = false;
    bare = true;
  };
  while (i < text.length) {
    const character = text[i];
    if (character === '"' && bare && !quoted) {
      cell = '';
      quoted = true;
      bare = false;
      for (i++; i < text.length; i++) {
        if (text[i] !== '"') cell += text[i];
        else if (text[i + 1] === '"') cell += text[i++];
        else break;
      }
      let next = i + 1;
      while (separator !== ' ' && text[next] === ' ') next++;
      const closed = next >= text.length || text[next] === separator || text[next] === '\t';
      // Text after a closing quote is kept with the quotes, so that the cell is no number.
      if (!closed) cell = `"${cell}"`;
      quoted = closed;
    } else if (character === separator || (separator === ' ' && character === '\t')) {
      end();
      if (separator === ' ') while (text[i + 1] === ' ' || text[i + 1] === '\t') i++;
    } else if (!quoted) {
      cell += character;
      bare &&= character === ' ' || character === '\t';
    }
    i++;
  }
  end();
  return cells;
}

/** Lines that say nothing about the numbers. A semicolon starts one where it is not the separator. */
export function isComment(line: string, separator: Separator | null): boolean {
  const start = line.trimStart();
  return /^(#|%|\/\/)/.test(start) || (start.startsWith(';') && separator !== null && separator !== ';');
}
