import { describe, expect, it } from 'vitest';
import { encoded, readText } from '../../../support/textBytes';

// What one cell may hold, and how many of them a row may have.

const spellings: [string, number][] = [
  ['+1', 1],
  ['-.5', -0.5],
  ['+.5', 0.5],
  ['1.', 1],
  ['-1.', -1],
  ['007', 7],
  ['-0', -0],
  ['1e5', 1e5],
  ['1E+5', 1e5],
  ['1.e2', 100],
  ['.5e-3', 5e-4],
  // Fortran's double precision exponent (ISO/IEC 1539-1, 10.7.2.3).
  ['1D-3', 1e-3],
  ['1.5d+02', 150],
  ['nan', Number.NaN],
  ['NaN', Number.NaN],
  ['-nan', Number.NaN],
  ['inf', Number.POSITIVE_INFINITY],
  ['+Inf', Number.POSITIVE_INFINITY],
  ['-INF', Number.NEGATIVE_INFINITY],
  ['Infinity', Number.POSITIVE_INFINITY],
  ['-infinity', Number.NEGATIVE_INFINITY],
  ['1e400', Number.POSITIVE_INFINITY],
  ['1e-400', 0],
  // 2^53 + 1 lies between two doubles and goes to the even one (IEEE 754).
  ['9007199254740993', 9007199254740992],
  ['0.1000000000000000055511151231257827', 0.1],
  ['', Number.NaN],
];

describe('cells', () => {
  it.each(spellings)('reads "%s" as %d', async (spelled, value) => {
    const texts = [
      `a,b\n1,2\n${spelled},7\n7,${spelled}\n`,
      `a;b\n1,5;2\n${spelled.replace('.', ',')};7\n7;${spelled.replace('.', ',')}\n`,
      `a,b\n1,2\n"${spelled}",7\n7,"${spelled}"\n`,
    ];
    for (const text of texts) {
      const { values } = await readText(text);
      expect(Object.is(values[0][1], value)).toBe(true);
      expect(Object.is(values[1][2], value)).toBe(true);
    }
  });

  it('reads empty cells as NaN, whole rows of them too', async () => {
    const { values, recording } = await readText('a,b,c\n1,2,3\n,,\n , ,6\n7,,\n');
    const hole = Number.NaN;
    expect(recording.samples).toBe(4);
    expect(values).toEqual([
      [1, hole, hole, 7],
      [2, hole, hole, hole],
      [3, hole, 6, hole],
    ]);
  });

  it('reads empty cells between tabs', async () => {
    const { values } = await readText('a\tb\tc\n1\t2\t3\n\t5\t\n');
    expect(values).toEqual([
      [1, Number.NaN],
      [2, 5],
      [3, Number.NaN],
    ]);
  });

  it('starts with an empty cell', async () => {
    const { values } = await readText('a;b\n;2\n3;4\n');
    expect(values).toEqual([
      [Number.NaN, 3],
      [2, 4],
    ]);
  });

  const wide = (columns: number, cell: (column: number) => string) =>
    Array.from({ length: columns }, (_, c) => cell(c)).join(',');

  it.each([
    ['plain', (c: number) => String(c), (c: number) => `c${c}`],
    ['quoted', (c: number) => `"${c}.25"`, (c: number) => `"c${c}"`],
    [
      'named at length',
      (c: number) => String(c),
      (c: number) => `acceleration of the bearing housing beside the belt in m/s² at point ${c}`,
    ],
  ])('reads 1,024 columns, %s', async (_, cell, name) => {
    const row = wide(1024, cell);
    const { recording, values } = await readText(`${wide(1024, name)}\n${row}\n${row}\n`);
    expect(recording.channels.length).toBe(1024);
    expect(recording.channels[1023]).toMatch(/1023/);
    expect(values.map(([first]) => Math.floor(first))).toEqual(Array.from({ length: 1024 }, (_, c) => c));
  });

  it('refuses 1,025 columns', async () => {
    const row = wide(1025, String);
    await expect(readText(encoded(`${row}\n${row}\n`))).rejects.toThrow('1025 columns, more than 1024');
  });
});
