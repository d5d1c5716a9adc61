import type { ByteSource } from '../../bytes/byteSource';
import { refuse } from '../../findings/finding';

/** Longest line in bytes; rows of numbers are far shorter. */
const longestLine = 1 << 20;
const chunk = 1 << 20;

/**
 * Visits a line: its bytes are `bytes[start, end)`, line end left out; `offset` is where it starts in the source.
 * Returning false ends the walk.
 */
export type LineVisitor = (bytes: Uint8Array, start: number, end: number, offset: number) => boolean;

/**
 * Walks the lines from an offset on; LF, CR LF and CR end a line, and the last one needs no end.
 * @param progress called after each chunk with the offset reached
 * @throws Refusal `line-too-long`
 */
export async function eachLine(
  source: ByteSource,
  from: number,
  file: string,
  visit: LineVisitor,
  progress: (offset: number) => Promise<void> = async () => {},
): Promise<void> {
  let buffer = new Uint8Array(0);
  // Where the buffer stands in the source.
  let base = from;
  let afterReturn = false;
  while (true) {
    const position = base + buffer.length;
    const more =
      position < source.size ? await source.read(position, Math.min(chunk, source.size - position)) : null;
    const last = more === null || more.length === 0;
    if (!last) buffer = joined(buffer, more);
    let start = 0;
    for (let i = 0; i < buffer.length; i++) {
      const byte = buffer[i];
      if (byte !== 10 && byte !== 13) {
        afterReturn = false;
        continue;
      }
      const secondHalf = byte === 10 && afterReturn && i === start;
      afterReturn = byte === 13;
      if (i - start > longestLine) refuse('line-too-long', { limit: longestLine }, { file });
      if (!secondHalf && !visit(buffer, start, i, base + start)) return;
      start = i + 1;
    }
    if (last) {
      if (start < buffer.length) visit(buffer, start, buffer.length, base + start);
      return;
    }
    base += start;
    buffer = buffer.slice(start);
    // The kept rest is scanned again with what follows it; a CR before it has been seen.
    if (buffer.length > 0) afterReturn = false;
    if (buffer.length > longestLine) refuse('line-too-long', { limit: longestLine }, { file });
    await progress(base);
  }
}

function joined(left: Uint8Array, right: Uint8Array): Uint8Array<ArrayBuffer> {
  const whole = new Uint8Array(left.length + right.length);
  whole.set(left);
  whole.set(right, left.length);
  return whole;
}
