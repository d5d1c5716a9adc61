import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { say } from '../../../../core/findings/say';
import { openNpy } from '../../../../core/recordings/npy/openNpy';
import type { Opened } from '../../../../core/recordings/recording';
import { joined, little, strictSource } from '../../../support/wavBytes';

// Whatever happened to a file, it is either read to its end or refused. The source throws where a reader asks for bytes
// that are not there.

function npy(version: number, descr: string, fortran: string, shape: string): Uint8Array {
  const text = `{'descr': '${descr}', 'fortran_order': ${fortran}, 'shape': ${shape}, }\n`;
  const content = little(2, ...Array.from({ length: 60 }, (_, i) => 1000 * i - 30_000));
  return joined(
    '\x93NUMPY',
    little(1, version, 0),
    little(version === 1 ? 2 : 4, text.length),
    text,
    content,
  );
}

const files: [name: string, bytes: Uint8Array][] = [
  ['one axis', npy(1, '<i2', 'False', '(60,)')],
  ['two channels in turn', npy(2, '>i2', 'False', '(30, 2)')],
  ['two channels one after the other', npy(3, '|u1', 'True', '(60, 2)')],
  ['floats', npy(1, '<f8', 'False', '(3, 5)')],
];

const open = (bytes: Uint8Array): Promise<Opened> => openNpy(strictSource(bytes), 'a.npy');

/** Reads all that is offered. */
async function planesOf({ recording, findings }: Opened): Promise<Float64Array[]> {
  expect(findings.some((found) => found.severity === 'blocker')).toBe(recording === null);
  for (const found of findings) expect(say(found)).not.toMatch(/undefined|NaN/);
  if (recording === null) return [];
  expect(recording.samples).toBeGreaterThanOrEqual(2);
  expect(recording.channels.length).toBeGreaterThanOrEqual(1);
  const planes = await recording.read([...recording.channels.keys()], 0, recording.samples);
  for (const plane of planes) expect(plane.length).toBe(recording.samples);
  return planes;
}

describe.each(files)('damaged: %s', (_, whole) => {
  it('cut anywhere keeps the samples that are left', async () => {
    const wanted = await planesOf(await open(whole));
    expect(wanted.length).toBeGreaterThan(0);
    for (let length = 6; length < whole.length; length++) {
      const planes = await planesOf(await open(whole.slice(0, length)));
      planes.forEach((plane, c) => {
        expect(plane).toEqual(wanted[c].slice(0, plane.length));
      });
    }
  });

  it('with other bytes in places', async () => {
    const change = fc.tuple(fc.integer({ min: 6, max: whole.length - 1 }), fc.integer({ min: 0, max: 255 }));
    await fc.assert(
      fc.asyncProperty(fc.array(change, { maxLength: 5 }), async (changes) => {
        const bytes = whole.slice();
        for (const [at, value] of changes) bytes[at] = value;
        await planesOf(await open(bytes));
      }),
      { numRuns: 1500 },
    );
  });
});

describe('a header', () => {
  const piece = fc.constantFrom(
    ...`{ } ( ) [ ] , : ' " True False None L - 'descr': 'fortran_order': 'shape': '<f8'`.split(' '),
  );
  const whole = fc.oneof(fc.integer(), fc.bigInt(), fc.double()).map(String);

  async function openHeader(text: string) {
    const bytes = Buffer.from(text, 'latin1');
    const head = joined('\x93NUMPY\x01\0', little(2, bytes.length), bytes);
    await planesOf(await open(joined(head, new Uint8Array(64))));
  }

  it('of any words', async () => {
    const words = fc.array(fc.oneof(piece, whole), { maxLength: 30 }).map((found) => found.join(' '));
    await fc.assert(fc.asyncProperty(words, openHeader), { numRuns: 3000 });
  });

  it('of any characters', async () => {
    await fc.assert(fc.asyncProperty(fc.string({ unit: 'binary', maxLength: 80 }), openHeader), {
      numRuns: 1500,
    });
  });

  it('of any shape', async () => {
    const shape = fc
      .array(fc.oneof(fc.nat(9), whole), { maxLength: 3 })
      .map((axes) => `(${axes.join(', ')},)`);
    const type = fc.constantFrom('<f8', '>f4', '|i1', '<u2', '<i8', '|O', '=u4', '|V3');
    const header = fc
      .tuple(type, fc.constantFrom('True', 'False'), shape)
      .map(([descr, order, axes]) => `{'descr': '${descr}', 'fortran_order': ${order}, 'shape': ${axes}}`);
    await fc.assert(fc.asyncProperty(header, openHeader), { numRuns: 3000 });
  });
});
