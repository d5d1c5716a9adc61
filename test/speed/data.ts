import { closeSync, openSync, writeFileSync, writeSync } from 'node:fs';
import { join } from 'node:path';
import { seededNormal } from '../support/random';

/** Ten minutes at 48 kHz. */
export const longSamples = 28_800_000;

/** Writes doubles as the reference reads them. */
export function writeDoubles(folder: string, name: string, values: Float64Array): void {
  writeFileSync(join(folder, name), new Uint8Array(values.buffer, values.byteOffset, values.byteLength));
}

/** A white input and the output of a path of 600 decaying taps in noise, made from a table of normal numbers. */
export function longPair(samples: number): { x: Float64Array; d: Float64Array } {
  const normal = seededNormal(9);
  const table = Float64Array.from({ length: 1 << 20 }, normal);
  const x = new Float64Array(samples);
  const d = new Float64Array(samples);
  // Windows of the table that differ from repetition to repetition, so that nothing is periodic.
  for (let n = 0; n < samples; n++) {
    const turn = Math.floor(n / table.length);
    x[n] = table[n % table.length] * (turn % 2 === 0 ? 1 : -1) + 0.3 * table[(n * 7 + turn) % table.length];
  }
  // A recursion with complex poles stands for the path.
  let one = 0;
  let two = 0;
  for (let n = 0; n < samples; n++) {
    const y = x[n] + 1.9 * one - 0.975 * two;
    two = one;
    one = y;
    d[n] = 0.05 * y + 0.01 * table[(n * 13 + 5) % table.length];
  }
  return { x, d };
}

/** A 16-bit WAV file of two channels. */
export function writeWav16(path: string, rate: number, pair: { x: Float64Array; d: Float64Array }): void {
  const file = openSync(path, 'w');
  writeSync(file, waveHeader(rate, 4 * pair.x.length));
  writeFrames(file, pair);
  closeSync(file);
}

/** The same signals over and over again as RF64 (EBU Tech 3306), whose sizes pass 4 GiB. */
export function writeRf64(
  path: string,
  rate: number,
  pair: { x: Float64Array; d: Float64Array },
  times: number,
): void {
  const dataBytes = 4 * pair.x.length * times;
  const sizes = Buffer.alloc(36);
  sizes.write('ds64', 0, 'latin1');
  sizes.writeUInt32LE(28, 4);
  sizes.writeBigUInt64LE(BigInt(72 + dataBytes), 8);
  sizes.writeBigUInt64LE(BigInt(dataBytes), 16);
  sizes.writeBigUInt64LE(BigInt(pair.x.length * times), 24);
  const header = waveHeader(rate, 0xffffffff - 36);
  header.write('RF64', 0, 'latin1');
  header.writeUInt32LE(0xffffffff, 4);
  header.writeUInt32LE(0xffffffff, 40);
  const file = openSync(path, 'w');
  writeSync(file, header.subarray(0, 12));
  writeSync(file, sizes);
  writeSync(file, header.subarray(12));
  for (let k = 0; k < times; k++) writeFrames(file, pair);
  closeSync(file);
}

function waveHeader(rate: number, dataBytes: number): Buffer {
  const header = Buffer.alloc(44);
  header.write('RIFF', 0, 'latin1');
  header.writeUInt32LE(36 + dataBytes, 4);
  header.write('WAVEfmt ', 8, 'latin1');
  header.writeUInt32LE(16, 16);
  header.writeUInt16LE(1, 20);
  header.writeUInt16LE(2, 22);
  header.writeUInt32LE(rate, 24);
  header.writeUInt32LE(4 * rate, 28);
  header.writeUInt16LE(4, 32);
  header.writeUInt16LE(16, 34);
  header.write('data', 36, 'latin1');
  header.writeUInt32LE(dataBytes, 40);
  return header;
}

function writeFrames(file: number, { x, d }: { x: Float64Array; d: Float64Array }): void {
  const block = 1 << 16;
  const scale = 32767 / 16;
  for (let from = 0; from < x.length; from += block) {
    const count = Math.min(block, x.length - from);
    const words = new Int16Array(2 * count);
    for (let n = 0; n < count; n++) {
      words[2 * n] = Math.max(-32768, Math.min(32767, Math.round(x[from + n] * scale)));
      words[2 * n + 1] = Math.max(-32768, Math.min(32767, Math.round(d[from + n] * scale)));
    }
    writeSync(file, words);
  }
}
