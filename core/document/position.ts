/** A place in a text, both from 1; columns count UTF-16 units, as editors do. */
export interface Position {
  line: number;
  column: number;
}

/** The place of an offset. Lines end with LF, CR LF or CR. */
export function positionAt(text: string, offset: number): Position {
  const end = Math.min(offset, text.length);
  let line = 1;
  let start = 0;
  for (let i = 0; i < end; i++) {
    const unit = text.charCodeAt(i);
    // Of CR LF the LF ends the line; an offset between the two is on the next.
    if (unit === 10 || (unit === 13 && !(i + 1 < end && text.charCodeAt(i + 1) === 10))) {
      line++;
      start = i + 1;
    }
  }
  return { line, column: end - start + 1 };
}
