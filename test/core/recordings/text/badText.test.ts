import { describe, expect, it } from 'vitest';
import type { Finding } from '../../../../core/findings/finding';
import { sayWithPlace } from '../../../../core/findings/say';
import { encoded, openBytes } from '../../../support/textBytes';

// Files that are no recordings, or broken ones. What a finding must say is the contract of `Finding`; the lines are
// counted by eye, as an editor counts them.

/** The one blocker that a file must yield. */
async function blockerOf(content: string | Uint8Array): Promise<Finding> {
  const { recording, findings } = await openBytes(content);
  expect(recording).toBeNull();
  expect(findings.length).toBe(1);
  expect(findings[0]).toMatchObject({ severity: 'blocker', file: 'x.csv' });
  expect(sayWithPlace(findings[0])).not.toMatch(/\{\w+\}|undefined|\n/);
  return findings[0];
}

const pretty = JSON.stringify({ a: 'x', list: ['y', 'z'] }, null, 2);

describe('files that are no recordings', () => {
  it.each([
    ['nothing', '', 'empty-file'],
    ['only blanks', '  \n\t\n \r\n', 'not-a-recording'],
    ['only a byte order mark', encoded('', 'utf-8', true), 'not-a-recording'],
    ['only comments', '# 1,2\n# 3,4\n', 'not-a-recording'],
    ['only a header', 'time,a,b\n', 'not-a-recording'],
    ['a header and units', 'time,a,b\ns,V,V\n', 'not-a-recording'],
    ['one row', '1,2,3\n', 'too-short'],
    ['a header and one row', 'a,b\n1,2', 'too-short'],
    // The format of https://github.com/git-lfs/git-lfs/blob/main/docs/spec.md
    [
      'an LFS pointer',
      `version https://git-lfs.github.com/spec/v1\noid sha256:${'4d'.repeat(32)}\nsize 12345\n`,
      'lfs-pointer',
    ],
    // ISO/IEC 15948, 5.2: the signature, then an IHDR chunk.
    ['PNG', Uint8Array.of(0x89, 80, 78, 71, 13, 10, 26, 10, 0, 0, 0, 13, 73, 72, 68, 82), 'not-a-recording'],
    // System V ABI, ELF header: 64 bit, little-endian.
    ['ELF', Uint8Array.of(0x7f, 69, 76, 70, 2, 1, 1, 0, 0, 0, 0, 0, 0, 0, 0, 0, 3, 0), 'not-a-recording'],
    ['HTML', '<!DOCTYPE html>\n<html><body>1,2</body></html>\n', 'not-a-recording'],
    ['JSON', '{"a": [1, 2, 3], "b": 4}\n', 'not-a-recording'],
    ['indented JSON', pretty, 'not-a-recording'],
    ['prose', 'It was a dark night; 2 men came, 3 left.\nNobody saw.\n', 'not-a-recording'],
    ['rows of words', 'a,b\nx,y\nz,w\n', 'not-a-recording'],
    ['zeros', new Uint8Array(100), 'not-a-recording'],
  ] as const)('%s', async (_, content, code) => {
    expect((await blockerOf(content)).code).toBe(code);
  });

  it('show what the file starts with', async () => {
    expect(sayWithPlace(await blockerOf('<html>\n'))).toContain('starting with "<html>"');
    expect(sayWithPlace(await blockerOf(`${'x'.repeat(500)}\n`)).length).toBeLessThan(300);
    expect((await blockerOf('a,b\n1,2')).values).toEqual({ samples: 1 });
  });

  it('is an array of numbers in JSON', async () => {
    await blockerOf('[\n1,\n2,\n3\n]\n');
    await blockerOf('[[1, 2], [3, 4]]\n');
  });
});

describe('broken rows', () => {
  const many = (from: number, to: number) =>
    Array.from({ length: to - from }, (_, n) => `${from + n},${(n * 7) % 5}`).join('\n');

  it.each([
    ['short', '7', 1],
    ['long', '7,8,9', 3],
    ['long by an empty cell and one more', '7,8,,9', 4],
    ['long by two separators', '7,8,,', 3],
  ])('%s', async (_, row, got) => {
    const found = await blockerOf(`a,b\n1.5,2\n3,4\n${row}\n5,6\n`);
    expect(found).toMatchObject({ code: 'ragged-row', line: 4, values: { got, expected: 2 } });
  });

  it('short among whole numbers', async () => {
    const found = await blockerOf('a,b\n1,2\n3,4\n7\n5,6\n');
    expect(found).toMatchObject({ code: 'ragged-row', line: 4, values: { got: 1, expected: 2 } });
  });

  it('ragged between blanks', async () => {
    expect(await blockerOf('1 2\n3 4 \n5\n')).toMatchObject({ code: 'ragged-row', line: 3 });
    expect(await blockerOf('1 2\n3  4\n5 6 7\n')).toMatchObject({ line: 3, values: { got: 3 } });
  });

  it('counts the cells of a long row', async () => {
    const row = (cells: number) => Array.from({ length: cells }, (_, c) => `${c}.125`).join(',');
    const found = await blockerOf(`${row(900)}\n${row(900)}\n${row(899)}\n`);
    expect(found).toMatchObject({ code: 'ragged-row', line: 3, values: { got: 899, expected: 900 } });
  });

  it.each(['\n', '\r\n', '\r'])('finds a bad cell late in the file, lines ending in %j', async (end) => {
    const text = `# run 3\n\na,b\nV,A\n${many(0, 1000)}\n# pause\n\n${many(1000, 2500)}\n2500,oops\n1,2\n`;
    for (const encoding of ['utf-8', 'utf-16le'] as const) {
      const found = await blockerOf(encoded(text.replaceAll('\n', end), encoding, true));
      // 4 lines before the rows, 2 in the pause, 2,500 rows, then the bad one.
      expect(found).toMatchObject({
        code: 'not-a-number-cell',
        line: 2507,
        values: { column: 2, cell: 'oops' },
      });
    }
  });

  it.each([
    ['a comma where the point is the decimal sign', 'a;b\n1.5;2\n3,5;4\n', '3,5'],
    ['a point where the comma is', 'a;b\n1,5;2\n1,5;2\n3.5;4\n', '3.5'],
    ['two numbers in a cell', 'a,b\n1,2\n3 4,5\n', '3 4'],
    ['a word', 'a,b\n1,2\nOVER,4\n', 'OVER'],
    ['a header again', 'a,b\n1,2\na,b\n3,4\n', 'a'],
  ])('%s', async (_, text, cell) => {
    const line = text.split('\n').findIndex((row) => row.includes(cell) && !/^[a]([,;])b$/.test(row));
    const found = await blockerOf(text);
    expect(found).toMatchObject({ code: 'not-a-number-cell', values: { column: 1, cell } });
    expect(found.line).toBe(cell === 'a' ? 3 : line + 1);
  });

  it.each(['"1,5","10"\n"2,5","20"\n', 'a,b\n"1"2,3\n"4"5,6\n', 'a,b\n1,2\n"1"2,3\n'])(
    'text after a closing quote: %j',
    async (text) => {
      await blockerOf(text);
    },
  );

  it('cuts a long cell short', async () => {
    const found = await blockerOf(`1,2\n3,4\n5,${'z'.repeat(5000)}\n`);
    expect(String(found.values.cell).length).toBeLessThan(50);
  });
});
