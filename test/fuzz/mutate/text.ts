import { encoded } from '../../support/textBytes';
import type { Dice } from '../dice';
import { hostileNumbers } from '../hostile';
import type { Change } from './bytes';

const separators = [',', ';', '\t', ' ', '|', ', ', '  '];
const ends = ['\n', '\r\n', '\r', '\n\r', '\u2028', '\n\n'];
const names = [
  'time',
  'Time [ms]',
  't (µs)',
  'time_ns',
  'Zeit',
  'sample',
  'index',
  '',
  '#',
  'x',
  '"a;b"',
  '1',
  'nan',
  'ö漢',
  '{cell}',
  '\u202ex',
];
const extraLines = [
  '',
  ' ',
  '# comment',
  '; comment',
  '% 1,2,3',
  '// 1;2',
  '[s],[V],[V]',
  'x',
  'a,b,c',
  '1',
  '1,2',
  ',,,,',
  '"',
  '\t',
  'version https://git-lfs.github.com/spec/v1',
];

function decoded(bytes: Uint8Array): string {
  const wide = bytes[1] === 0 ? 'utf-16le' : bytes[0] === 0 ? 'utf-16be' : 'utf-8';
  return new TextDecoder(wide).decode(bytes);
}

function ofText(change: (text: string, dice: Dice) => string): Change<Uint8Array> {
  return (bytes, dice) => encoded(change(decoded(bytes), dice));
}

function ofLines(change: (lines: string[], dice: Dice) => void): Change<Uint8Array> {
  return ofText((text, dice) => {
    const lines = text.split('\n');
    change(lines, dice);
    return lines.join('\n');
  });
}

/** One cell of one line, its separators left where they are; half of all lines are among the first. */
const ofCell = (change: (cell: string, dice: Dice) => string) =>
  ofLines((lines, dice) => {
    const at = dice.onceIn(2) ? dice.below(Math.min(3, lines.length)) : dice.below(lines.length);
    const cells = lines[at].split(/([,;\t ]+)/);
    const cell = 2 * dice.below((cells.length + 1) / 2);
    cells[cell] = change(cells[cell], dice);
    lines[at] = cells.join('');
  });

export const textChanges: Record<string, Change<Uint8Array>> = {
  number: ofCell((_, dice) => dice.one(hostileNumbers)),
  name: ofLines((lines, dice) => {
    const cells = lines[0].split(',');
    cells[dice.onceIn(2) ? 0 : dice.below(cells.length)] = dice.one(names);
    lines[0] = cells.join(',');
  }),
  'quoted cell': ofCell((cell, dice) =>
    dice.one([`"${cell}"`, `"${cell}`, `${cell}"`, `""${cell}""`, `"${cell}" x`, `"${cell}\n"`]),
  ),
  'drop line': ofLines((lines, dice) => lines.splice(dice.below(lines.length), 1 + dice.size(5))),
  'double line': ofLines((lines, dice) => {
    const at = dice.below(lines.length);
    const count = dice.onceIn(50) ? 5000 : 1 + dice.size(20);
    lines.splice(at, 0, ...new Array<string>(count).fill(lines[at]));
  }),
  'swap lines': ofLines((lines, dice) => {
    const [a, b] = [dice.below(lines.length), dice.below(lines.length)];
    [lines[a], lines[b]] = [lines[b], lines[a]];
  }),
  'new line': ofLines((lines, dice) => {
    const at = dice.onceIn(2) ? dice.below(Math.min(4, lines.length)) : dice.below(lines.length);
    const count = dice.onceIn(100) ? dice.one([300, 1200, 20_000]) : 1 + dice.size(4);
    lines.splice(at, 0, ...new Array<string>(count).fill(dice.one(extraLines)));
  }),
  'every separator': ofText((text, dice) =>
    text.replaceAll(dice.one([',', ';', '\t']), dice.one(separators)),
  ),
  'decimal sign': ofText((text, dice) =>
    text.replace(/(\d)\.(\d)/g, `$1${dice.one([',', "'", '..', ''])}$2`),
  ),
  'line ends': ofText((text, dice) => text.replace(/\r?\n/g, dice.one(ends))),
  'a line end': ofLines((lines, dice) => {
    const at = dice.below(lines.length);
    lines[at] = `${lines[at]}${dice.one(ends)}`;
  }),
  'time column': ofText((text, dice) => timed(text, dice)),
  'more columns': ofText((text, dice) => {
    const more = dice.onceIn(6) ? dice.one([1021, 1023, 1024, 1030]) : dice.one([1, 2, 30]);
    const [separator] = /[,;\t]/.exec(text) ?? [','];
    const lines = text.split('\n').slice(0, more > 100 ? 1 + dice.size(100) : 400);
    return lines
      .map((line) => (line === '' ? line : `${line}${`${separator}${dice.below(10)}`.repeat(more)}`))
      .join('\n');
  }),
  'long cell': ofCell(
    (cell, dice) => cell + dice.one(['0', '9', ' ', '"', 'x', 'ö']).repeat(dice.size(20_000)),
  ),
  encoding: (bytes, dice) =>
    encoded(decoded(bytes), dice.one(['utf-8', 'utf-16le', 'utf-16be'] as const), dice.onceIn(2)),
  'zero byte': ofCell((cell) => `${cell}\0`),
};

/** The first column as times that rise evenly, nearly evenly, not at all, or as dates. */
function timed(text: string, dice: Dice): string {
  const lines = text.split('\n');
  const step = dice.one([0.001, 1 / 3, 1, 0, -1, 1e-12, 1e300]);
  const start = dice.one([0, 0, 1e9, -5, 1e15]);
  const printed = dice.one<(time: number) => string>([
    (time) => time.toFixed(6),
    (time) => String(time),
    (time) => time.toPrecision(4),
    (time) => new Date(8.64e15 * Math.tanh(time / 8.64e15)).toISOString(),
  ]);
  const jump = dice.onceIn(2) ? dice.below(lines.length) : -1;
  const body = lines.map((line, n) =>
    line === '' ? line : `${printed(start + step * (n + (n > jump ? 0.4 : 0)))},${line}`,
  );
  if (dice.onceIn(2)) body[0] = `${dice.one(names)},${lines[0]}`;
  return body.join('\n');
}
