import type { ByteSource } from '../../bytes/byteSource';
import { type Finding, finding, refuse } from '../../findings/finding';
import type { Pace } from '../../pace';
import { openSafely } from '../openSafely';
import type { Opened, Recording } from '../recording';
import { splitCells } from './cells';
import { type Dialect, findDialect } from './dialect';
import { eachLine } from './eachLine';
import { type TextSource, textSource } from './encoding';
import { newRowParser, type RowProblem } from './rowParser';
import { newRowStore } from './rowStore';
import {
  addToCourse,
  type Course,
  countsUp,
  type FirstColumn,
  finestResolution,
  firstColumn,
  newCourse,
  rateOf,
  risesEvenly,
  stepsByOne,
} from './timeColumn';

const mostColumns = 1024;
const separatorNames = { '\t': 'tabs', ';': '";"', ',': '","', ' ': 'blanks' };

/**
 * Opens rows of numbers in UTF-8 or UTF-16, whatever their separator and decimal sign, with or without a header, a units
 * row, comments and a column of times, from which the rate is taken. Every row is looked at once. Empty cells are NaN.
 * @param kept numbers kept in memory at most; tests make it small
 */
export async function openText(source: ByteSource, file: string, pace: Pace, kept?: number): Promise<Opened> {
  return openSafely(source, file, (whole) => open(whole, file, pace, kept));
}

async function open(source: ByteSource, file: string, pace: Pace, kept?: number): Promise<Opened> {
  if (source.size === 0) refuse('empty-file', {}, { file });
  const text = await textSource(source);
  const dialect = dialectOf(text, file);
  const first = firstColumn(dialect);
  const parse = newRowParser(dialect, first.kind === 'time' && first.stamps);
  const store = newRowStore(text.bytes, file, dialect.columns, parse, kept);
  const course = newCourse();
  const row = new Float64Array(dialect.columns);
  let line = 0;
  const visit = (bytes: Uint8Array, start: number, end: number, offset: number) => {
    if (++line <= dialect.linesBefore) return true;
    const kind = parse(bytes, start, end, row);
    if (kind === 'blank') return true;
    if (kind !== 'row') refuseRow(kind, dialect, file, line);
    store.add(row, offset);
    addToCourse(course, row[0]);
    return true;
  };
  await eachLine(text.bytes, 0, file, visit, (offset) => pace.step('reading', offset, text.bytes.size));
  if (store.rows < 2) refuse('too-short', { samples: store.rows }, { file });

  const lastCells =
    first.kind === 'channel' ? [] : await store.lastLines((line) => splitCells(line, dialect.separator)[0]);
  const { leadsIn, rate, findings } = judgeFirst(withCoarsest(first, lastCells, dialect), course, file);
  const channels = Array.from(
    { length: dialect.columns - (leadsIn ? 1 : 0) },
    (_, c) => c + (leadsIn ? 1 : 0),
  );
  const recording: Recording = {
    file,
    format: formatInWords(text, dialect),
    pcm: false,
    lineEndsIgnored: !text.utf16,
    sampleRate: rate,
    samples: store.rows,
    channels: channels.map((column) => dialect.names?.[column]?.trim() || null),
    read: (asked, from, to, into) =>
      store.read(
        asked.map((channel) => channels[channel]),
        from,
        to,
        into,
      ),
  };
  return { recording: findings.some((f) => f.severity === 'blocker') ? null : recording, findings };
}

function dialectOf({ head, whole }: TextSource, file: string): Dialect {
  if (head.startsWith('version https://git-lfs.github.com/spec/')) refuse('lfs-pointer', {}, { file });
  if (head.includes('\0')) refuse('not-a-recording', { what: 'binary data' }, { file });
  const dialect = findDialect(head, whole);
  if (dialect === null) {
    const start = head
      .trim()
      .slice(0, 40)
      .split(/[\r\n]/)[0];
    const what =
      start === '' ? 'only blank lines' : `text without a row of numbers, starting with "${start}",`;
    refuse('not-a-recording', { what }, { file });
  }
  if (dialect.columns > mostColumns) {
    refuse('not-a-recording', { what: `${dialect.columns} columns, more than ${mostColumns},` }, { file });
  }
  return dialect;
}

function refuseRow(problem: RowProblem, { columns }: Dialect, file: string, line: number): never {
  if (problem.kind === 'ragged') {
    refuse('ragged-row', { got: problem.got, expected: columns }, { file, line });
  }
  const cell = problem.cell.length > 40 ? `${problem.cell.slice(0, 40)}…` : problem.cell;
  refuse('not-a-number-cell', { column: problem.column + 1, cell }, { file, line });
}

/** Times can be printed more coarsely at the end than at the start. */
function withCoarsest(first: FirstColumn, lastCells: readonly string[], { decimal }: Dialect): FirstColumn {
  if (first.kind !== 'time' && first.kind !== 'perhaps-time') return first;
  const unit = first.kind === 'time' ? first.unit : 1;
  const last = unit * finestResolution(lastCells, decimal);
  return Number.isFinite(last) ? { ...first, resolution: Math.max(first.resolution, last) } : first;
}

/** Whether the first column is no channel, and the rate that it tells. */
function judgeFirst(
  first: FirstColumn,
  course: Course,
  file: string,
): { leadsIn: boolean; rate: number | null; findings: Finding[] } {
  const none = { rate: null, findings: [] };
  if (first.kind === 'time')
    return { leadsIn: true, ...rateOf(inSeconds(course, first.unit), first.resolution, file) };
  if (first.kind === 'index') return { leadsIn: stepsByOne(course), ...none };
  if (first.kind === 'channel') return { leadsIn: false, ...none };
  if (countsUp(course)) return { leadsIn: true, ...none };
  if (!risesEvenly(course, first.resolution)) return { leadsIn: false, ...none };
  const { rate, findings } = rateOf(course, first.resolution, file);
  return {
    leadsIn: true,
    rate,
    findings: [...findings, finding('taken-as-time', { rate: rate ?? 0 }, { file })],
  };
}

function inSeconds(course: Course, unit: number): Course {
  const { first, last, smallestStep, largestStep } = course;
  return {
    ...course,
    first: first * unit,
    last: last * unit,
    smallestStep: smallestStep * unit,
    largestStep: largestStep * unit,
  };
}

function formatInWords({ utf16 }: TextSource, { columns, separator, decimal }: Dialect): string {
  const parts = [utf16 ? 'text (UTF-16)' : 'text'];
  parts.push(columns === 1 ? '1 column' : `${columns} columns separated by ${separatorNames[separator]}`);
  if (decimal === ',') parts.push('decimal comma');
  return parts.join(', ');
}
