import { isComment, type Separator, splitCells } from './cells';
import { parseNumber } from './parseNumber';
import { isTimestamp } from './timestamp';

/** How a text file writes its rows. */
export interface Dialect {
  separator: Separator;
  /** `.` or `,`. */
  decimal: '.' | ',';
  /** Cells of a row that count. */
  columns: number;
  /** Names and units above the rows, one a column, or null where there are none. */
  names: string[] | null;
  units: string[] | null;
  /** Lines before the first row, blank ones and comments included. */
  linesBefore: number;
  /** First row, to tell how times are written. */
  firstRow: string[];
}

const separators: readonly Separator[] = ['\t', ';', ',', ' '];

/** Lines of the start that are looked at. */
const mostLines = 300;

/**
 * The dialect of a text from its start: the separator and decimal sign that make numbers of most lines, then of most
 * columns, then the first of tab, semicolon, comma and blanks, a decimal point before a decimal comma.
 * @returns null where no line is a row of numbers
 */
export function findDialect(head: string, whole: boolean): Dialect | null {
  const lines = head.split(/\r\n|\n|\r/);
  if (!whole && lines.length > 1) lines.pop();
  const looked = lines.slice(0, mostLines);
  let best: { dialect: Dialect; rows: number } | null = null;
  for (const decimal of ['.', ','] as const) {
    for (const separator of separators) {
      if (separator === decimal) continue;
      const found = tryDialect(looked, separator, decimal);
      if (found === null) continue;
      if (best !== null && found.rows < best.rows) continue;
      if (best !== null && found.rows === best.rows && found.dialect.columns <= best.dialect.columns)
        continue;
      best = found;
    }
  }
  return best?.dialect ?? null;
}

function tryDialect(
  lines: readonly string[],
  separator: Separator,
  decimal: '.' | ',',
): { dialect: Dialect; rows: number } | null {
  const split = lines.map((line) =>
    line.trim() === '' || isComment(line, separator) ? null : splitCells(line, separator),
  );
  const numeric = split.map((cells) => cells !== null && isRow(cells, decimal));
  const first = numeric.indexOf(true);
  if (first < 0) return null;
  const firstRow = split[first] ?? [];
  const width = firstRow.length;
  const rows = split.filter((cells, i) => numeric[i] && cells?.length === width);
  const header = split.slice(0, first);
  // A separator at the end of every row starts no cell, unless the header names a column there.
  const open = separator !== ' ' && width > 1 && rows.every((cells) => cells?.[width - 1] === '');
  const named = header.some((cells) => cells?.length === width && cells[width - 1] !== '');
  const columns = open && !named ? width - 1 : width;
  const above = header.filter((cells) => cells !== null && fits(cells, columns));
  const [names, units] = above.length > 1 ? above.slice(-2) : [above[0] ?? null, null];
  const cut = (cells: string[] | null) => cells?.slice(0, columns) ?? null;
  return {
    dialect: {
      separator,
      decimal,
      columns,
      names: cut(names),
      units: cut(units),
      linesBefore: first,
      firstRow: firstRow.slice(0, columns),
    },
    rows: rows.length,
  };
}

function fits(cells: readonly string[], columns: number): boolean {
  return cells.length === columns || (cells.length === columns + 1 && cells[columns] === '');
}

/** At least one number, and nothing that is neither number nor empty; a date and time may come first. */
function isRow(cells: readonly string[], decimal: '.' | ','): boolean {
  let numbers = 0;
  for (const [i, cell] of cells.entries()) {
    if (i === 0 && cells.length > 1 && isTimestamp(cell)) continue;
    const value = numberOf(cell, decimal);
    if (value === undefined) return false;
    if (cell !== '' && /\d/.test(cell)) numbers++;
  }
  return numbers > 0;
}

function numberOf(cell: string, decimal: '.' | ','): number | undefined {
  if (/[^ -~]/.test(cell)) return undefined;
  const bytes = new TextEncoder().encode(cell);
  return parseNumber(bytes, 0, bytes.length, decimal.charCodeAt(0));
}
