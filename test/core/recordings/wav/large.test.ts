import { describe, expect, it } from 'vitest';
import type { ByteSource } from '../../../../core/bytes/byteSource';
import { openWav } from '../../../../core/recordings/wav/openWav';
import { chunk, type FormatFields, fileOf, formatContent, joined, little } from '../../../support/wavBytes';

// Files beyond 4 GiB (EBU Tech 3306), whose bytes are made as they are asked for.

const fields: FormatFields = { tag: 1, channels: 2, sampleRate: 96000, bits: 16 };
const format = chunk('fmt ', formatContent(fields));
const dataBytes = 5 * 2 ** 30;
const frames = dataBytes / 4;
const open = 0xffffffff;

/** Two primes, so that a place that lost its high bits has other samples. */
const sample = (frame: number, channel: number) => (frame % (channel === 0 ? 65521 : 65519)) - 32760;

/** The bytes before, 5 GiB of frames, the bytes after. */
function largeFile(
  before: Uint8Array,
  after: Uint8Array = new Uint8Array(0),
): ByteSource & { asked: number } {
  const end = before.length + dataBytes;
  const byteAt = (at: number): number => {
    if (at < before.length) return before[at];
    if (at >= end) return after[at - end];
    const place = at - before.length;
    const value = sample(Math.floor(place / 4), Math.floor(place / 2) % 2);
    return place % 2 === 0 ? value & 255 : (value >> 8) & 255;
  };
  return {
    size: end + after.length,
    asked: 0,
    async read(offset, length) {
      if (offset < 0 || offset + length > this.size) throw new Error(`read of ${length} bytes at ${offset}`);
      this.asked += length;
      return Uint8Array.from({ length }, (_, i) => byteAt(offset + i));
    },
  };
}

const ds64 = chunk('ds64', joined(little(8, dataBytes + 72, dataBytes, frames), little(4, 0)));
const data = joined('data', little(4, open));
const tail = chunk('LIST', joined('INFO'));

const files: [name: string, source: () => ByteSource & { asked: number }, findings: string[]][] = [
  ['RF64', () => largeFile(fileOf('RF64', ds64, format, data)), []],
  ['BW64 with chunks after the samples', () => largeFile(fileOf('BW64', ds64, format, data), tail), []],
  [
    'RF64 with its format after the samples',
    () => largeFile(fileOf('RF64', ds64, data), joined(tail, format)),
    [],
  ],
  // Common practice of writers to a pipe.
  ['RIFF that leaves its size open', () => largeFile(fileOf('RIFF', format, data)), ['open-data']],
];

describe.each(files)('5 GiB of %s', (_, source, codes) => {
  it('is opened by its first bytes', async () => {
    const large = source();
    const { recording, findings } = await openWav(large, 'large.wav');
    expect(findings.map(({ code }) => code)).toEqual(codes);
    expect(recording).toMatchObject({ samples: frames, sampleRate: 96000, channels: [null, null] });
    expect(large.asked).toBeLessThan(1000);
  });

  it.each([
    ['at the start', 0],
    ['across 2 GiB', 2 ** 29 - 40_000],
    ['across 4 GiB', 2 ** 30 - 40_000],
    ['far beyond 4 GiB', 1_200_000_017],
    ['up to the end', frames - 80_000],
  ])('is read %s', async (_, from) => {
    const { recording } = await openWav(source(), 'large.wav');
    if (recording === null) throw new Error('no recording');
    const planes = await recording.read([0, 1], from, from + 80_000);
    const wrong = planes.map((plane, channel) =>
      plane.findIndex((value, n) => value !== sample(from + n, channel) / 32768),
    );
    expect(wrong).toEqual([-1, -1]);
    expect(planes.map((plane) => plane.length)).toEqual([80_000, 80_000]);
  });
});
