import { expect } from 'vitest';
import { type ByteSource, memorySource } from '../../core/bytes/byteSource';
import { sayWithPlace } from '../../core/findings/say';
import { newPace } from '../../core/pace';
import type { Opened, Recording } from '../../core/recordings/recording';
import { openText } from '../../core/recordings/text/openText';

export type Encoding = 'utf-8' | 'utf-16le' | 'utf-16be';

/** A text's bytes, with a byte order mark where it is asked for. */
export function encoded(text: string, encoding: Encoding = 'utf-8', mark = false): Uint8Array {
  const marked = mark ? `\ufeff${text}` : text;
  if (encoding === 'utf-8') return new TextEncoder().encode(marked);
  const bytes = new Uint8Array(2 * marked.length);
  const view = new DataView(bytes.buffer);
  for (let i = 0; i < marked.length; i++) {
    view.setUint16(2 * i, marked.charCodeAt(i), encoding === 'utf-16le');
  }
  return bytes;
}

/** A source that hands out the same memory on every read, as {@link ByteSource} allows. */
export function reusingSource(bytes: Uint8Array): ByteSource {
  let memory = new Uint8Array(0);
  return {
    size: bytes.length,
    async read(offset, length) {
      const part = bytes.subarray(offset, offset + length);
      if (memory.length < part.length) memory = new Uint8Array(part.length);
      memory.fill(0x39);
      memory.set(part);
      return memory.subarray(0, part.length);
    },
  };
}

export function openBytes(content: string | Uint8Array, kept?: number): Promise<Opened> {
  const bytes = typeof content === 'string' ? encoded(content) : content;
  return openText(memorySource(bytes), 'x.csv', newPace(), kept);
}

/** All samples, one array a channel. */
export async function samplesOf(recording: Recording): Promise<number[][]> {
  const all = recording.channels.map((_, channel) => channel);
  return (await recording.read(all, 0, recording.samples)).map((plane) => [...plane]);
}

/** A text that must open: its recording, samples and the codes found. */
export async function readText(
  content: string | Uint8Array,
  kept?: number,
): Promise<{ recording: Recording; values: number[][]; codes: string[] }> {
  const { recording, findings } = await openBytes(content, kept);
  if (recording === null) throw new Error(findings.map(sayWithPlace).join('; '));
  return { recording, values: await samplesOf(recording), codes: findings.map(({ code }) => code) };
}

/** A text of signals without a rate, and what must be read from it. */
export interface TextCase {
  what: string;
  text: string;
  channels: (string | null)[];
  values: number[][];
}

/** Names and values as expected, nothing found, and the same where every row is read again from the file. */
export async function checkText({ text, channels, values }: TextCase): Promise<void> {
  const read = await readText(text);
  expect(read.recording.channels).toEqual(channels);
  expect(read.values).toEqual(values);
  expect(read.recording.samples).toBe(values[0].length);
  expect(read.codes).toEqual([]);
  expect(read.recording.sampleRate).toBeNull();
  expect((await readText(text, 0)).values).toEqual(values);
}

/** 1,000 rows of 1 kHz with 6 decimals below `time,a`; `shift` moves the time of a row, in seconds. */
export function timedText(
  shift: (n: number) => number,
  print = (time: number) => time.toFixed(6),
  name = 'time',
): string {
  const rows = Array.from({ length: 1000 }, (_, n) => `${print(n / 1000 + shift(n))},${(n * 7) % 5}\n`);
  return `${name},a\n${rows.join('')}`;
}
