import { createHash } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { type ByteSource, memorySource } from '../../../core/bytes/byteSource';
import { digestSource } from '../../../core/bytes/digest';
import { newSha256 } from '../../../extension/node/nodeHost';
import { pace } from '../../support/takes';

const bytes = (text: string) => new TextEncoder().encode(text);
const sha256 = (text: string) => createHash('sha256').update(text).digest('hex');

/** Hands out a few bytes at a time, as a slow pipe would. */
function sliced(text: string, size: number): ByteSource {
  const whole = memorySource(bytes(text));
  return { size: whole.size, read: (offset, length) => whole.read(offset, Math.min(size, length)) };
}

describe('digestSource', () => {
  // FIPS 180-4, example "abc".
  it('is SHA-256', async () => {
    expect(await digestSource(memorySource(bytes('abc')), newSha256, false, pace)).toBe(
      'ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad',
    );
  });

  it.each(['a\r\nb\r\n', 'a\rb\r', 'a\nb\n', 'a\r\nb\n'])(
    'gives %j the digest of its text with LF',
    async (text) => {
      for (const size of [1, 2, 3, 100]) {
        expect(await digestSource(sliced(text, size), newSha256, true, pace)).toBe(sha256('a\nb\n'));
      }
      if (text.includes('\r')) {
        expect(await digestSource(memorySource(bytes(text)), newSha256, false, pace)).toBe(sha256(text));
      }
    },
  );

  it('keeps empty lines apart', async () => {
    expect(await digestSource(sliced('a\r\r\n\n', 1), newSha256, true, pace)).toBe(sha256('a\n\n\n'));
  });
});
