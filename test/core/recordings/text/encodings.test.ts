import { describe, expect, it } from 'vitest';
import { encoded, readText } from '../../../support/textBytes';

// The byte order marks are those of the Unicode standard, section 23.8 (U+FEFF).

const text = 'Größe;b\n1,5;10\n-2;20\n3;30\n';
const values = [
  [1.5, -2, 3],
  [10, 20, 30],
];

describe('encodings', () => {
  it.each([
    ['utf-8', false],
    ['utf-8', true],
    ['utf-16le', true],
    ['utf-16be', true],
    ['utf-16le', false],
    ['utf-16be', false],
  ] as const)('%s, mark: %s', async (encoding, mark) => {
    for (const end of ['\n', '\r\n', '\r']) {
      const bytes = encoded(text.replaceAll('\n', end), encoding, mark);
      for (const kept of [undefined, 0]) {
        const read = await readText(bytes, kept);
        expect(read.recording.channels).toEqual(['Größe', 'b']);
        expect(read.values).toEqual(values);
        // Line ends of UTF-16 are no single bytes, so that the digest cannot leave them out of account.
        expect(read.recording.lineEndsIgnored).toBe(encoding === 'utf-8');
      }
    }
  });

  it.each(['utf-8', 'utf-16le', 'utf-16be'] as const)(
    '%s with a mark before the first number',
    async (encoding) => {
      for (const start of ['', '# x\n', '"1","20"\n']) {
        const { values } = await readText(encoded(`${start}1.5,10\n-2,20\n3,30\n`, encoding, true));
        expect(values[0].slice(-3)).toEqual([1.5, -2, 3]);
        expect(values[1].length).toBe(start.startsWith('"') ? 4 : 3);
      }
    },
  );

  it('says what it reads', async () => {
    expect((await readText(text)).recording.format).toBe('text, 2 columns separated by ";", decimal comma');
    expect((await readText(encoded('1\n2\n', 'utf-16be', true))).recording.format).toBe(
      'text (UTF-16), 1 column',
    );
    expect((await readText('1\t2\n3\t4\n')).recording).toMatchObject({ format: /tabs/, pcm: false });
  });

  it('reads letters beyond Latin-1 in UTF-16, also those whose low byte is a line end or a separator', async () => {
    // U+0A0A, U+0D2C, U+2C0A and U+3B3B hold the bytes of LF, CR, comma and semicolon; U+1F600 is a pair of units.
    const names = ['ਊ\u0d2c', 'Ⰺ㬻', '\u{1f600}'];
    for (const encoding of ['utf-16le', 'utf-16be'] as const) {
      const read = await readText(encoded(`${names.join(',')}\n1,2,3\n4,5,6\n`, encoding, true));
      expect(read.recording.channels).toEqual(names);
      expect(read.values).toEqual([
        [1, 4],
        [2, 5],
        [3, 6],
      ]);
    }
  });

  it('does not take a comment in a foreign alphabet for numbers', async () => {
    // U+0131 and U+0132 end in the bytes of the digits 1 and 2.
    const read = await readText(encoded('# \u0131\n3,2\n# \u0131,\u0132\n1,4\n', 'utf-16le', true));
    expect(read.values).toEqual([
      [3, 1],
      [2, 4],
    ]);
  });
});
