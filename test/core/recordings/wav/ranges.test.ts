import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Refusal } from '../../../../core/findings/finding';
import { openWav } from '../../../../core/recordings/wav/openWav';
import { normals } from '../../../support/random';
import { type FormatFields, strictSource, wavOf } from '../../../support/wavBytes';

// Any way to take a recording in pieces gives what one piece gives; here every frame is known.

const frames = 30_000;
const channels = 3;
const noise = normals(5, frames * channels);
const fields: FormatFields = { tag: 3, channels, sampleRate: 48000, bits: 64 };
// 720 kB: three of the reader's own blocks.
const file = wavOf(fields, new Uint8Array(noise.buffer));
const plane = (channel: number, from: number, to: number) =>
  Float64Array.from({ length: to - from }, (_, n) => noise[(from + n) * channels + channel]);

async function opened() {
  const { recording } = await openWav(strictSource(file), 'test.wav');
  if (recording === null) throw new Error('no recording');
  return recording;
}

describe('a range of a recording', () => {
  it.each([
    ['whole', 0, frames],
    ['the first sample', 0, 1],
    ['the last sample', frames - 1, frames],
    ['nothing at the start', 0, 0],
    ['nothing at the end', frames, frames],
    ['around the end of the first block', 10_900, 10_950],
    ['one block exactly', 0, 10_922],
    ['one sample more than a block', 5, 10_928],
  ])('%s', async (_, from, to) => {
    const read = await (await opened()).read([0, 1, 2], from, to);
    expect(read).toEqual([0, 1, 2].map((channel) => plane(channel, from, to)));
  });

  it('is the same whatever pieces it is read in', async () => {
    const recording = await opened();
    const cuts = fc.array(fc.nat(frames), { maxLength: 12 });
    const wanted = fc.array(fc.nat(channels - 1), { maxLength: 4 });
    await fc.assert(
      fc.asyncProperty(cuts, wanted, async (at, asked) => {
        const ends = [...at, frames].sort((a, b) => a - b);
        let from = ends[0];
        for (const to of ends) {
          const read = await recording.read(asked, from, to);
          expect(read).toEqual(asked.map((channel) => plane(channel, from, to)));
          from = to;
        }
      }),
      { numRuns: 30 },
    );
  });

  it('is a new array each time', async () => {
    const recording = await opened();
    const [first] = await recording.read([1], 0, 100);
    await recording.read([1], 100, 200);
    expect(first).toEqual(plane(1, 0, 100));
    const [one, other] = await recording.read([1, 1], 0, 2);
    one.fill(7);
    expect(other).toEqual(plane(1, 0, 2));
  });
});

describe('memory that is given', () => {
  it('receives the samples', async () => {
    const into = [new Float64Array(20_000).fill(7), new Float64Array(12_000)];
    const read = await (await opened()).read([2, 0], 5000, 17_000, into);
    expect(read).toEqual([plane(2, 5000, 17_000), plane(0, 5000, 17_000)]);
    expect(read.map(({ buffer }) => buffer)).toEqual(into.map(({ buffer }) => buffer));
    expect(into[0].subarray(12_000)).toEqual(new Float64Array(8000).fill(7));
  });
});

/** A file that is cut to `left` bytes once the reader asked for more than `asks` ranges. */
function shrinking(left: number, asks: number) {
  let count = 0;
  return {
    size: file.length,
    read: async (offset: number, length: number) =>
      file.slice(offset, Math.min(offset + length, ++count > asks ? left : file.length)),
  };
}

describe('a file that becomes shorter', () => {
  it('while samples are read is a finding', async () => {
    const { recording } = await openWav(shrinking(300_000, 10), 'test.wav');
    if (recording === null) throw new Error('no recording');
    for (let i = 0; i < 10; i++) await recording.read([0], 0, 10);
    await expect(recording.read([0], 0, 10)).resolves.toEqual([plane(0, 0, 10)]);
    const failure = await recording.read([0], 0, frames).catch((error) => error);
    expect(failure).toBeInstanceOf(Refusal);
    expect(failure.findings).toMatchObject([{ code: 'file-changed', severity: 'blocker', file: 'test.wav' }]);
  });

  it.each([0, 1, 2, 3])('after %i reads of the header is a finding', async (asks) => {
    const result = await openWav(shrinking(10, asks), 'test.wav').catch((error) => error);
    expect(result).not.toBeInstanceOf(RangeError);
    expect(result.recording ?? null).toBeNull();
    expect(result.findings[0].severity).toBe('blocker');
  });
});

describe('a reader', () => {
  it('asks for 256 KiB at most at a time', async () => {
    const asked: number[] = [];
    const strict = strictSource(file);
    const read = (offset: number, length: number) => {
      asked.push(length);
      return strict.read(offset, length);
    };
    const { recording } = await openWav({ size: strict.size, read }, 'test.wav');
    await recording?.read([0], 0, frames);
    expect(Math.max(...asked)).toBeLessThanOrEqual(1 << 18);
    expect(Math.max(...asked)).toBeGreaterThan(1 << 17);
  });
});
