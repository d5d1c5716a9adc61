/** A place in a text, both from 1; columns count UTF-16 units, as editors do. */
export interface Position {
  line: number;
  column: number;
}

/** The place of an offset. Lines end with LF, CR LF or CR. */
export function positionAt(text: string, offset: number): Position {
  const before = text.slice(0, offset).split(/\r\n|\n|\r/);
  return { line: before.length, column: before[before.length - 1].length + 1 };
}
