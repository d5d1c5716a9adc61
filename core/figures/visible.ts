// Control, format (bidirectional marks among them) and separator characters, halves of surrogate pairs, unassigned code points.
const hidden = /[\p{C}\p{Zl}\p{Zp}]/gu;

/** A character as `\u` and four hexadecimal digits for each of its UTF-16 units. */
export function unicodeEscape(character: string): string {
  let escaped = '';
  for (let i = 0; i < character.length; i++) {
    escaped += `\\u${character.charCodeAt(i).toString(16).padStart(4, '0')}`;
  }
  return escaped;
}

/**
 * Text from a document or a file name on one line, with every character that cannot be seen (line ends, control
 * characters, marks that turn the writing direction) spelled out as `\uXXXX`, so that what is read is what is there.
 */
export function visible(text: string): string {
  return text.replace(hidden, unicodeEscape);
}
