import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import type { FuzzInput, ReaderName } from './makeInput';
import { tryInput } from './tryInput';

// What runs have found, made smaller, named for what is wrong with it; the extension names the reader.

const folder = join('test', 'fixtures', 'fuzz');

/** What each must be told by now. */
const expected: Record<string, string[]> = {
  // Every sentence about its channel repeated the name of 2,000 characters.
  'endlessChannelName.recording': ['opened', 'low-level', 'low-level', 'offset'],
  // Its quoted type made a sentence of 64 KiB.
  'endlessElementType.recording': ['unsupported-dtype'],
  // The sentence said that "taps" is undefined.
  'noVersionOfTaps.taps': ['not-taps'],
  // Its levels had an rms that was NaN, and its offset was told as "– times the rms".
  'squaresBeyondDoubles.recording': ['opened', 'low-level', 'offset'],
};

describe('an input that once failed', () => {
  it.each(readdirSync(folder))('%s is told in findings', async (name) => {
    const reader = name.split('.').at(-1) as ReaderName;
    const bytes = new Uint8Array(readFileSync(join(folder, name)));
    expect(await tryInput({ reader, bytes, disk: 'steady', made: name })).toEqual(expected[name]);
  });
});

describe('a large input that once took minutes', () => {
  const inTime = { timeout: 20_000 };
  const input = (reader: ReaderName, text: string): FuzzInput => ({
    reader,
    bytes: new TextEncoder().encode(text),
    disk: 'steady',
    made: 'by hand',
  });

  it('has a hundred findings, for each of which the document was parsed again', inTime, async () => {
    const keys = Array.from({ length: 30_000 }, (_, k) => `"k${k}": [${k}, 2]`).join(',\n');
    const codes = await tryInput(input('document', `{"pairing": 1, ${keys}}`));
    expect(codes).toHaveLength(101);
    expect(codes.slice(0, 3)).toEqual(['missing-key', 'missing-key', 'unknown-key']);
  });

  it('begins as a mark at every word', inTime, async () => {
    const codes = await tryInput(input('mark', `{"generated": "${'by Tapwright from '.repeat(50_000)}"}`));
    expect(codes).toEqual(['no mark', 'no mark']);
  });
});
