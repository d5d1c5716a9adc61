import { closeSync, ftruncateSync, openSync, readFileSync, rmSync, writeFileSync, writeSync } from 'node:fs';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { newPace } from '../../../core/pace';
import { openRecording } from '../../../core/recordings/openRecording';
import { openFile } from '../../../extension/node/fileSource';
import { npyHeader } from '../../fuzz/seeds/arrays';
import { emptyFolder, tapwright } from '../../support/cli';
import { patience, small, smallDocument, smallPairing } from './smallPairing';

// Files of 4 GiB, of which the disk holds a few KiB since the rest is a hole, and of no bytes at all.

const fourGiB = 2 ** 32;
const rows = fourGiB / 16;

let folder: string;
beforeAll(() => {
  folder = emptyFolder();
  const header = Buffer.from(npyHeader("'<f8'", 'False', `(${rows}, 2)`), 'latin1');
  const start = Buffer.concat([
    Buffer.from('\x93NUMPY\x01\0', 'latin1'),
    Buffer.from([header.length, 0]),
    header,
  ]);
  const end = Buffer.from(Float64Array.of(0.25, -0.5).buffer);
  sparse('large.npy', start, start.length + fourGiB, end);
  sparse('large.csv', Buffer.from('x,d\n0,1\n1,2\n'), fourGiB, Buffer.from('\n1,2\n'));
  for (const name of ['none.wav', 'none.csv', 'none.npy']) writeFileSync(join(folder, name), '');
});
afterAll(() => rmSync(folder, { recursive: true }));

/** A file that begins and ends so, with a hole between. */
function sparse(name: string, start: Uint8Array, size: number, end: Uint8Array): void {
  const file = openSync(join(folder, name), 'w');
  writeSync(file, start);
  ftruncateSync(file, size);
  writeSync(file, end, 0, end.length, size - end.length);
  closeSync(file);
}

describe('a file of 4 GiB', { timeout: patience }, () => {
  it('is read by ranges to its very end', async () => {
    const source = await openFile(join(folder, 'large.npy'));
    if (typeof source === 'string') throw new Error(source);
    const { recording, findings } = await openRecording(source, 'large.npy', newPace());
    expect([findings, recording?.samples]).toEqual([[], rows]);
    const [x, d] = (await recording?.read([0, 1], rows - 3, rows)) ?? [];
    await source.close();
    expect([[...x], [...d]]).toEqual([
      [0, 0, 0.25],
      [0, 0, -0.5],
    ]);
  });

  it('gets a pairing document over its whole length', () => {
    const { status, err } = tapwright(folder, 'pair', 'large.npy', '--rate', '48000', '-o', 'l.pairing.json');
    expect([status, err]).toEqual([0, '']);
    const [take] = JSON.parse(readFileSync(join(folder, 'l.pairing.json'), 'utf8')).takes;
    // The draft ends at a whole second.
    expect(take.heldOut.to).toBe(Math.floor(rows / 48_000));
  });

  it('that is no recording is told at once', () => {
    const { status, out, err } = tapwright(folder, 'inspect', 'large.csv');
    expect([status, out + err]).toEqual([2, expect.stringMatching(/^large\.csv:.* error: .*\[[a-z-]+\]$/m)]);
    expect(err).not.toMatch(/\n\s+at /);
  });
});

describe('a file of no bytes', { timeout: patience }, () => {
  it.each(['none.wav', 'none.csv', 'none.npy'])('%s is told', (name) => {
    const { status, out, err } = tapwright(folder, 'inspect', name);
    expect([status, out + err]).toEqual([2, expect.stringContaining('[empty-file]')]);
  });

  it('is no document and no taps file', () => {
    const place = smallPairing();
    writeFileSync(join(place, small), '');
    const design = tapwright(place, 'design', small);
    expect([design.status, design.err]).toEqual([2, expect.stringContaining('[broken-json]')]);
    writeFileSync(join(place, small), smallDocument());
    expect(tapwright(place, 'design', small).status).toBe(0);
    writeFileSync(join(place, 'generated', 'case.taps.json'), '');
    const check = tapwright(place, 'check', small);
    expect([check.status, check.out]).toEqual([2, expect.stringContaining('[not-taps]')]);
    // A name that somebody else's empty file has is not taken from them.
    const again = tapwright(place, 'design', small);
    expect([again.status, again.err]).toEqual([2, expect.stringContaining('[foreign-file]')]);
  });
});
