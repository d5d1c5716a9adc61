import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { say } from '../../../../core/findings/say';
import type { Opened } from '../../../../core/recordings/recording';
import { openWav } from '../../../../core/recordings/wav/openWav';
import {
  chunk,
  extensibleContent,
  fileOf,
  formatContent,
  joined,
  little,
  strictSource,
  wavOf,
} from '../../../support/wavBytes';

// Whatever happened to a file, it is either read to its end or refused. The source throws where a reader asks for bytes
// that are not there.

const stereo = { tag: 1, channels: 2, sampleRate: 8000, bits: 16 };
const counts = Array.from({ length: 40 }, (_, i) => 1000 * i - 20_000);
const samples = little(2, ...counts);
const list = chunk('LIST', joined('INFOISFT\x03\0\0\0abc'));
const ds64 = chunk('ds64', joined(little(8, 0, samples.length, 20), little(4, 0)));
const wide = chunk('data', samples, 0xffffffff);

const files: [name: string, bytes: Uint8Array][] = [
  ['PCM', wavOf(stereo, samples)],
  [
    'a file with odd chunks',
    fileOf('RIFF', list, chunk('fmt ', formatContent(stereo)), list, chunk('data', samples), list),
  ],
  [
    'an extensible header',
    fileOf('RIFF', chunk('fmt ', extensibleContent(stereo, 12)), chunk('data', samples)),
  ],
  ['RF64', fileOf('RF64', ds64, chunk('fmt ', formatContent(stereo)), wide)],
  ['BW64 with its format last', fileOf('BW64', ds64, wide, chunk('fmt ', formatContent(stereo)))],
  ['float 64 bit', wavOf({ ...stereo, tag: 3, bits: 64 }, samples)],
];

const open = (bytes: Uint8Array): Promise<Opened> => openWav(strictSource(bytes), 'test.wav');

/** Reads all that is offered. */
async function planesOf({ recording, findings }: Opened): Promise<Float64Array[]> {
  const blocked = findings.some((found) => found.severity === 'blocker');
  expect(blocked).toBe(recording === null);
  for (const found of findings) expect(say(found)).not.toMatch(/undefined|NaN/);
  if (recording === null) return [];
  expect(recording.samples).toBeGreaterThanOrEqual(2);
  expect(recording.channels.length).toBeGreaterThanOrEqual(1);
  expect(recording.sampleRate).toBeGreaterThanOrEqual(1);
  const planes = await recording.read([...recording.channels.keys()], 0, recording.samples);
  for (const plane of planes) expect(plane.length).toBe(recording.samples);
  return planes;
}

const numberOfBytes = fc.integer({ min: 0, max: 255 });

describe.each(files)('damaged: %s', (_, whole) => {
  it('cut anywhere keeps the samples that are left', async () => {
    const wanted = await planesOf(await open(whole));
    expect(wanted.length).toBe(2);
    for (let length = 0; length < whole.length; length++) {
      const planes = await planesOf(await open(whole.slice(0, length)));
      planes.forEach((plane, c) => {
        expect(plane).toEqual(wanted[c].slice(0, plane.length));
      });
    }
  });

  it('with other bytes in places', async () => {
    const place = fc.nat(whole.length - 1);
    await fc.assert(
      fc.asyncProperty(fc.array(fc.tuple(place, numberOfBytes), { maxLength: 6 }), async (changes) => {
        const bytes = whole.slice();
        for (const [at, value] of changes) bytes[at] = value;
        await planesOf(await open(bytes));
      }),
      { numRuns: 1500 },
    );
  });

  it('with every byte of the header at its extremes', async () => {
    for (let at = 0; at < Math.min(120, whole.length); at++) {
      for (const value of [0, 1, 0x7f, 0x80, 0xfe, 0xff]) {
        const bytes = whole.slice();
        bytes[at] = value;
        await planesOf(await open(bytes));
      }
    }
  });

  it('with pieces left out, doubled or put in', async () => {
    const place = fc.nat(whole.length);
    await fc.assert(
      fc.asyncProperty(place, place, fc.uint8Array({ maxLength: 30 }), async (end, start, put) => {
        await planesOf(await open(joined(whole.slice(0, end), put, whole.slice(start))));
      }),
      { numRuns: 1500 },
    );
  });
});

describe('bytes without sense', () => {
  it.each(['RIFF\0\0\0\0WAVE', 'RIFF\0\0\0\0WAVEfmt \x10\0\0\0', 'RF64\0\0\0\0WAVEds64', ''])(
    'after %j',
    async (start) => {
      await fc.assert(
        fc.asyncProperty(fc.uint8Array({ maxLength: 200 }), async (bytes) => {
          await planesOf(await open(joined(start, bytes)));
        }),
        { numRuns: 1500 },
      );
    },
  );
});
