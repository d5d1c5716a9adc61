import { splitCells } from './cells';
import type { Dialect } from './dialect';
import { parseNumber } from './parseNumber';
import { parseTimestamp } from './timestamp';

/** A line that is neither a row of numbers nor blank nor a comment. */
export type RowProblem = { kind: 'cell'; column: number; cell: string } | { kind: 'ragged'; got: number };

/** Puts the numbers of a line into `row`; `blank` for blank lines and comments. */
export type RowParser = (
  bytes: Uint8Array,
  start: number,
  end: number,
  row: Float64Array,
) => 'row' | 'blank' | RowProblem;

const blank = 32;
const tab = 9;
const quote = 34;

/**
 * A parser of the lines below the header. Empty cells and `nan` are NaN. Dates and times become seconds from the first
 * row's, so that their fractions keep all digits.
 * @param stamps the first column holds dates and times
 */
export function newRowParser(dialect: Dialect, stamps: boolean): RowParser {
  const { columns } = dialect;
  const separator = dialect.separator.charCodeAt(0);
  const decimal = dialect.decimal.charCodeAt(0);
  const blanks = separator === blank;
  const epoch = stamps ? (parseTimestamp(dialect.firstCells[0])?.seconds ?? 0) : 0;
  const isBlank = (byte: number) => byte === blank || (byte === tab && (blanks || separator !== tab));

  function value(bytes: Uint8Array, start: number, end: number, column: number): number | undefined {
    if (!stamps || column > 0 || start === end) return parseNumber(bytes, start, end, decimal);
    const stamp = parseTimestamp(textOf(bytes, start, end));
    return stamp && stamp.seconds - epoch + stamp.fraction;
  }

  return (bytes, lineStart, lineEnd, row) => {
    let start = lineStart;
    let end = lineEnd;
    while (end > start && isBlank(bytes[end - 1])) end--;
    while (start < end && isBlank(bytes[start])) start++;
    if (start === end || startsComment(bytes, start, end, separator)) return 'blank';
    // A quoted line is rare, and splitting it as a string costs little.
    if (bytes.subarray(start, end).includes(quote)) return quotedRow(bytes, start, end, row);
    let column = 0;
    let from = start;
    while (true) {
      let to = from;
      while (to < end && bytes[to] !== separator && !(blanks && bytes[to] === tab)) to++;
      if (column < columns) {
        let last = to;
        while (last > from && isBlank(bytes[last - 1])) last--;
        while (from < last && isBlank(bytes[from])) from++;
        const number = value(bytes, from, last, column);
        if (number === undefined)
          return { kind: 'cell', column, cell: textOf(bytes, from, Math.min(last, from + 200)) };
        row[column] = number;
      } else if (column > columns || to > from) return { kind: 'ragged', got: countCells(bytes, start, end) };
      column++;
      if (to === end) break;
      from = to + 1;
      if (blanks) while (isBlank(bytes[from])) from++;
    }
    // A separator at the end of a row starts no cell.
    return column === columns || column === columns + 1
      ? 'row'
      : { kind: 'ragged', got: countCells(bytes, start, end) };
  };

  function quotedRow(bytes: Uint8Array, start: number, end: number, row: Float64Array): 'row' | RowProblem {
    const cells = splitCells(textOf(bytes, start, end), dialect.separator);
    if (cells.length === columns + 1 && cells[columns] === '') cells.pop();
    if (cells.length !== columns) return { kind: 'ragged', got: cells.length };
    for (const [column, cell] of cells.entries()) {
      const encoded = new TextEncoder().encode(cell.trim());
      const number = value(encoded, 0, encoded.length, column);
      if (number === undefined) return { kind: 'cell', column, cell };
      row[column] = number;
    }
    return 'row';
  }

  function countCells(bytes: Uint8Array, start: number, end: number): number {
    const cells = splitCells(textOf(bytes, start, end), dialect.separator);
    return cells.at(-1) === '' ? cells.length - 1 : cells.length;
  }
}

/** `#`, `%` and `//` start a comment, and `;` does where it separates nothing. */
function startsComment(bytes: Uint8Array, start: number, end: number, separator: number): boolean {
  const first = bytes[start];
  if (first === 35 || first === 37) return true;
  if (first === 59) return separator !== 59;
  return first === 47 && start + 1 < end && bytes[start + 1] === 47;
}

function textOf(bytes: Uint8Array, start: number, end: number): string {
  return new TextDecoder().decode(bytes.subarray(start, end));
}
