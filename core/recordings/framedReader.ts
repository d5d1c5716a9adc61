import type { ByteSource } from '../bytes/byteSource';
import { refuse } from '../findings/finding';
import type { Decoder } from './decoder';
import type { Recording } from './recording';

/** Bytes decoded at a time, so that they stay in the processor's cache. */
const most = 1 << 18;

/**
 * A reader of interleaved frames: `[from, to)` of the asked channels by ranges of at most 256 KiB.
 * @param start of the first frame in the file
 * @param frameBytes bytes of a frame
 * @param sampleBytes bytes of one channel's sample
 * @throws Refusal `file-changed` where bytes are gone that were there when the file was opened
 */
export function framedReader(
  source: ByteSource,
  file: string,
  start: number,
  frameBytes: number,
  sampleBytes: number,
  decode: Decoder,
): Recording['read'] {
  const frames = Math.max(1, Math.floor(most / frameBytes));
  return async (channels, from, to, into) => {
    const planes = planesFor(channels.length, to - from, into);
    for (let n = from; n < to; n += frames) {
      const count = Math.min(frames, to - n);
      const bytes = await source.read(start + n * frameBytes, count * frameBytes);
      if (bytes.length < count * frameBytes) refuse('file-changed', {}, { file });
      channels.forEach((channel, c) => {
        decode(bytes, frameBytes, channel * sampleBytes, planes[c], n - from);
      });
    }
    return planes;
  };
}

/** Arrays of the length asked for, of the memory given where there is some. */
export function planesFor(count: number, length: number, into?: readonly Float64Array[]): Float64Array[] {
  return Array.from({ length: count }, (_, c) => into?.[c].subarray(0, length) ?? new Float64Array(length));
}
