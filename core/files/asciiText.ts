import { unicodeEscape } from '../figures/visible';

/**
 * Text from a document for a comment in source code: one line of printable ASCII, everything else spelled out as
 * `\uXXXX`. No `*`, no backslash of its own and no two `?` in a row, so that it neither closes a comment nor makes a
 * line continuation or a trigraph.
 */
export function asciiText(text: string): string {
  return text.replace(/[^ -~]|[*\\]|(?<=\?)\?/gu, unicodeEscape);
}

/** Breaks text at spaces into lines of up to `width` characters; a longer word keeps a line to itself. */
export function wrapped(text: string, width: number): string[] {
  const lines: string[] = [];
  let current = '';
  for (const word of text.split(' ')) {
    if (current !== '' && current.length + 1 + word.length > width) {
      lines.push(current);
      current = word;
    } else {
      current = current === '' ? word : `${current} ${word}`;
    }
  }
  return [...lines, current];
}
