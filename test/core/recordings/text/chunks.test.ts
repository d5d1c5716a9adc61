import { describe, expect, it } from 'vitest';
import type { ByteSource } from '../../../../core/bytes/byteSource';
import { newPace } from '../../../../core/pace';
import type { Recording } from '../../../../core/recordings/recording';
import { openText } from '../../../../core/recordings/text/openText';
import { seededUniform } from '../../../support/random';
import { encoded, openBytes, reusingSource, samplesOf } from '../../../support/textBytes';

// Texts are read by chunks of 1 MiB; whatever falls on the border between two must not show. Expected values are those
// that the rows were made from.

const border = 1 << 20;

async function open(source: ByteSource, kept?: number): Promise<Recording> {
  const { recording, findings } = await openText(source, 'x.csv', newPace(), kept);
  if (recording === null) throw new Error(JSON.stringify(findings));
  return recording;
}

const signal = (n: number) => ((n * 7919) % 1000) / 8;

/** Rows of `a,b` whose first line end lies at `border + shift`, and the number of rows. */
function textAt(shift: number, end: string, after = 3): { text: string; rows: number } {
  const rows: string[] = [];
  let length = 4 + end.length;
  // Some 1,000 rows far from the border are enough; comments fill the rest.
  for (let n = 0; n < 1000; n++) {
    rows.push(`${signal(n)},${n % 3}`);
    length += rows[n].length + end.length;
  }
  const filler = `#${'x'.repeat(999 - end.length)}`;
  const last = `${signal(1000)},1`;
  while (length + filler.length + end.length + 100 < border) {
    rows.push(filler);
    length += filler.length + end.length;
  }
  rows.push(`#${'y'.repeat(border + shift - length - last.length - end.length - 1)}`, last);
  for (let n = 1001; n < 1001 + after; n++) rows.push(`${signal(n)},${n % 3}`);
  return { text: ['a, b', ...rows].join(end) + end, rows: 1001 + after };
}

describe('the border between two chunks', () => {
  const ends = [
    ['LF', '\n'],
    ['CR LF', '\r\n'],
    ['CR', '\r'],
  ] as const;

  it.each(ends)('with %s at it, and rows across it', async (_, end) => {
    for (let shift = -8; shift <= 8; shift++) {
      const { text, rows } = textAt(shift, end);
      expect(text.slice(border + shift, border + shift + end.length)).toBe(end);
      const wanted = Array.from({ length: rows }, (_, n) => signal(n));
      for (const kept of [undefined, 0]) {
        const recording = await open(reusingSource(encoded(text)), kept);
        const [a, b] = await samplesOf(recording);
        expect(a).toEqual(wanted);
        expect(b.length).toBe(rows);
      }
    }
  });

  it.each(ends)('with the end of the file at it, lines ending in %s', async (_, end) => {
    for (const cut of [-2, -1, 0, 1, 2]) {
      const { text, rows } = textAt(-end.length, end, 0);
      const whole = cut <= 0 ? text.slice(0, border + cut) : text + end.repeat(cut);
      // Two bytes less take a line end of one byte and the last cell of `b` with it, or the line end of two.
      const recording = await open(reusingSource(encoded(whole)), 0);
      expect(recording.samples).toBe(rows);
      expect((await samplesOf(recording))[0]).toEqual(Array.from({ length: rows }, (_, n) => signal(n)));
    }
  });

  it.each(ends)('with a bad cell after it, counted in lines ending in %s', async (_, end) => {
    for (let shift = -3; shift <= 3; shift++) {
      const { text } = textAt(shift, end);
      const bad = `${text}1,oops${end}`;
      const { findings } = await openBytes(encoded(bad));
      const line = bad.split(end).findIndex((row) => row.includes('oops')) + 1;
      expect(findings).toMatchObject([{ code: 'not-a-number-cell', line }]);
    }
  });
});

describe('a text of several chunks', () => {
  // 300,000 rows of some 17 bytes: 5 chunks, 74 blocks of 4,096 rows.
  const rows = 300_000;
  const value = (n: number, column: number) => Math.round(1e6 * Math.sin(n * (column + 1) + column)) / 1e6;
  const lines = Array.from({ length: rows }, (_, n) => {
    const pause = n % 5000 === 4999 ? '\r\n# pause\r\n\r\n' : '\r\n';
    return `${value(n, 0)};${value(n, 1)}${pause}`;
  });
  const text = `# run\r\na;b\r\n${lines.join('')}`;

  it.each([undefined, 0, 16])('gives any range, kept: %s', async (kept) => {
    for (const encoding of ['utf-8', 'utf-16le'] as const) {
      const recording = await open(reusingSource(encoded(text, encoding, true)), kept);
      expect(recording.samples).toBe(rows);
      const uniform = seededUniform(3);
      const edges = [0, 1, 4095, 4096, 4097, 8192, rows - 1, rows];
      const ranges = edges.flatMap((from) =>
        edges.filter((to) => to >= from && to - from < 9000).map((to) => [from, to]),
      );
      for (let k = 0; k < 12; k++) {
        const from = Math.floor(uniform() * rows);
        ranges.push([from, Math.min(rows, from + Math.floor(uniform() * 20_000))]);
      }
      for (const [from, to] of ranges) {
        const [b, a] = await recording.read([1, 0], from, to);
        expect([a.length, b.length]).toEqual([to - from, to - from]);
        const wrong = a.findIndex((x, n) => x !== value(from + n, 0) || b[n] !== value(from + n, 1));
        expect(wrong).toBe(-1);
      }
    }
  });

  it('gives the same arrays to nobody else', async () => {
    for (const kept of [undefined, 0]) {
      const recording = await open(reusingSource(encoded(text)), kept);
      const [once, twice] = await recording.read([0, 0], 10, 20);
      once.fill(0);
      expect(twice[0]).toBe(value(10, 0));
      expect((await recording.read([0], 10, 11))[0][0]).toBe(value(10, 0));
    }
  });

  it('says so where the file has become shorter or other', async () => {
    for (const change of [
      (bytes: Uint8Array) => bytes.subarray(0, 2 << 20),
      (bytes: Uint8Array) => bytes.slice().fill(120, 3 << 20, (3 << 20) + 20),
    ]) {
      const bytes = encoded(text);
      let current = bytes;
      const source: ByteSource = {
        size: bytes.length,
        read: async (offset, length) => current.subarray(offset, offset + length),
      };
      const recording = await open(source, 0);
      current = change(bytes);
      await expect(recording.read([0], 0, rows)).rejects.toThrow('file-changed');
      expect((await recording.read([0], 5, 6))[0][0]).toBe(value(5, 0));
    }
  });
});
