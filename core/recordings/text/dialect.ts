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
  /** First cells of the rows that were looked at, to tell how times are written. */
  firstCells: string[];
}

const separators: readonly Separator[] = ['\t', ';', ',', ' '];

/** Characters of numbers, dates, separators and quotes. */
const mayBeRow = /^[\s\d+\-.,;:"eEdDnNaAiIfFtTyYzZ]*$/;

/** Lines that are looked at together: from the start on, until some of them are rows. */
const lookedAt = 300;

/**
 * The dialect of a text from its start: the separator and decimal sign that make numbers of most lines, then of most
 * columns, then the first of tab, semicolon, comma and blanks, a decimal point before a decimal comma.
 * @returns null where no line is a row of numbers
 */
export function findDialect(head: string, whole: boolean): Dialect | null {
  const lines = head.split(/\r\n|\n|\r/);
  if (!whole && lines.length > 1) lines.pop();
  for (let end = lookedAt; ; end *= 4) {
    const found = bestDialect(lines.slice(0, end));
    if (found !== null || end >= lines.length) return found;
  }
}

function bestDialect(looked: readonly string[]): Dialect | null {
  if (!looked.some((line) => mayBeRow.test(line) && /\d/.test(line))) return null;
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
  const numeric = split.map((cells, i) => cells !== null && mayBeRow.test(lines[i]) && isRow(cells, decimal));
  const first = firstRowOf(split, numeric);
  if (first < 0) return null;
  const width = split[first]?.length ?? 0;
  const header = split.slice(0, first);
  // Rows that agree with a header in their commas are no decimal numbers.
  if (decimal === ',' && width === 1 && header.some((cells) => cells?.[0].includes(','))) return null;
  const rows = split.slice(first).filter((cells, i) => numeric[first + i] && cells?.length === width);
  // A separator at the end of every row starts no cell, unless the header names a column there.
  const open = separator !== ' ' && width > 1 && rows.every((cells) => cells?.[width - 1] === '');
  const named = header.some((cells) => cells?.length === width && cells[width - 1] !== '');
  const columns = open && !named ? width - 1 : width;
  const above = header.filter((cells) => cells !== null && fits(cells, columns));
  const cut = (cells: readonly string[] | null | undefined) => cells?.slice(0, columns) ?? null;
  const last = above.at(-1);
  const before = above.at(-2);
  const units = last && before && isUnits(last) && !isRow(before.slice(0, columns), decimal);
  return {
    dialect: {
      separator,
      decimal,
      columns,
      names: cut(units ? before : last),
      units: cut(units ? last : null),
      linesBefore: first,
      firstCells: rows.map((cells) => cells?.[0] ?? ''),
    },
    rows: rows.length,
  };
}

/** The first row of numbers; one that only counts its columns after an empty cell is a header. */
function firstRowOf(split: readonly (string[] | null)[], numeric: readonly boolean[]): number {
  const first = numeric.indexOf(true);
  const cells = split[first];
  const counts = cells?.every((cell, c) => cell === (c === 0 ? '' : String(c - 1)));
  const top = split.slice(0, first).every((line) => line === null);
  return cells && cells.length > 1 && counts && top ? numeric.indexOf(true, first + 1) : first;
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
    if (/\d/.test(cell)) numbers++;
  }
  return numbers > 0;
}

const unit =
  /^[[(]?\s*(?:1|-|%|#|[kMGmunpµμ]?(?:s|sec|V|A|N|Pa|bar|g|m|Hz|W|J|K|T|l|L|Nm|Ohm|Ω|rad|dB|FS)|°?C|°?F|deg|°|min|h|psi|rpm|counts?|LSB|digits?)(?:\^?-?[0-9²³])?(?:[/*·.]\s*[kmµμ]?(?:s|m|min|h|V|A|rad|K)(?:\^?-?[0-9²³])?)?\s*[\])]?$/;

/** A row of units has one that is known or in brackets, and no long words. */
function isUnits(cells: readonly string[]): boolean {
  const filled = cells.filter((cell) => cell !== '');
  const known = filled.some((cell) => unit.test(cell) || /^[[(].*[\])]$/.test(cell));
  return known && filled.every((cell) => cell.length <= 12);
}

function numberOf(cell: string, decimal: '.' | ','): number | undefined {
  if (/[^ -~]/.test(cell)) return undefined;
  const bytes = new TextEncoder().encode(cell.trim());
  return parseNumber(bytes, 0, bytes.length, decimal.charCodeAt(0));
}
