import { describe, expect, it } from 'vitest';
import type { ByteSource } from '../../../../core/bytes/byteSource';
import { openWav } from '../../../../core/recordings/wav/openWav';
import { normals } from '../../../support/random';
import { wavOf } from '../../../support/wavBytes';

// A source may lend any part of any buffer: samples are the same wherever their bytes lie in memory.

const codecs: [name: string, tag: number, bits: number][] = [
  ['PCM 8 bit', 1, 8],
  ['PCM 16 bit', 1, 16],
  ['PCM 24 bit', 1, 24],
  ['PCM 32 bit', 1, 32],
  ['float 32 bit', 3, 32],
  ['float 64 bit', 3, 64],
  ['A-law', 6, 8],
  ['µ-law', 7, 8],
];
const content = new Uint8Array(normals(9, 90).buffer);

/** Lends each range at a place that is `shift` beyond a multiple of eight, among bytes that are none of the file. */
function shiftedSource(bytes: Uint8Array, shift: number): ByteSource {
  return {
    size: bytes.length,
    read: async (offset, length) => {
      const buffer = new Uint8Array(length + 32).fill(0x5a);
      buffer.set(bytes.subarray(offset, offset + length), 8 + shift);
      return buffer.subarray(8 + shift, 8 + shift + length);
    },
  };
}

/** All channels, as bits, so that floats that are no numbers count too. */
async function bitsOf(bytes: Uint8Array, shift: number): Promise<BigUint64Array[]> {
  const { recording } = await openWav(shiftedSource(bytes, shift), 'test.wav');
  if (recording === null) throw new Error('no recording');
  // From the second frame on, so that frames of odd length move the bytes once more.
  const planes = await recording.read([...recording.channels.keys()], 1, recording.samples);
  return planes.map((plane) => new BigUint64Array(plane.buffer));
}

describe.each(codecs)('%s', (_, tag, bits) => {
  it.each([1, 2, 3])('of %i channels', async (channels) => {
    const frame = (channels * bits) / 8;
    const whole = content.subarray(0, content.length - (content.length % frame));
    const bytes = wavOf({ tag, channels, sampleRate: 1000, bits }, whole);
    const wanted = await bitsOf(bytes, 0);
    expect(wanted.map((plane) => plane.length)).toEqual(new Array(channels).fill(whole.length / frame - 1));
    for (let shift = 1; shift < 8; shift++) expect(await bitsOf(bytes, shift)).toEqual(wanted);
  });
});
