import { execFileSync } from 'node:child_process';
import { closeSync, mkdtempSync, openSync, rmSync, truncateSync, writeFileSync, writeSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { viewOf } from '../../../../core/recordings/viewOf';
import { floatWavHeader, floatWavSamples } from '../../../../core/recordings/writeWav';
import { needs } from '../../../support/programs';

const channels = 2;
const samples = 700_000_001;
const dataBytes = 8 * samples;
const open = 0xffffffff;

/** The fields of a header as a list: ids and the form are texts, sizes and contents numbers of the widths given. */
function fieldsOf(header: Uint8Array, widths: Record<string, number[]>) {
  const view = viewOf(header);
  const text = (at: number) => Buffer.from(header).toString('latin1', at, at + 4);
  const unsigned: Record<number, (at: number) => number> = {
    2: (at) => view.getUint16(at, true),
    4: (at) => view.getUint32(at, true),
    8: (at) => Number(view.getBigUint64(at, true)),
  };
  const fields: (string | number)[][] = [[text(0), unsigned[4](4), text(8)]];
  for (let at = 12; at < header.length; ) {
    const id = text(at);
    const chunk = [id, unsigned[4](at + 4)];
    at += 8;
    for (const width of widths[id]) {
      chunk.push(unsigned[width](at));
      at += width;
    }
    fields.push(chunk);
  }
  return fields;
}

// EBU Tech 3306: a DataSize64Chunk has the sizes of the RIFF and of the samples, the sample count and the length of a
// table. Microsoft 1994 (WAVEFORMATEX): other formats than PCM give the size of their extension, and a fact chunk.
const widths = { ds64: [8, 8, 8, 4], 'fmt ': [2, 2, 4, 4, 2, 2, 2], fact: [4], data: [] };

describe('the header', () => {
  it('of more than 4 GiB has the fields of EBU Tech 3306', () => {
    const header = floatWavHeader(96000, channels, samples);
    expect(fieldsOf(header, widths)).toEqual([
      ['RF64', open, 'WAVE'],
      ['ds64', 28, header.length - 8 + dataBytes, dataBytes, samples, 0],
      ['fmt ', 18, 3, 2, 96000, 768000, 8, 32, 0],
      ['fact', 4, samples],
      ['data', open],
    ]);
  });

  it('leaves a sample count open that 32 bits cannot hold', () => {
    const [, ds64, , fact] = fieldsOf(floatWavHeader(96000, 1, 5e9), widths);
    expect([ds64[4], fact[2]]).toEqual([5e9, open]);
  });

  it('is a RIFF as long as its sizes hold 32 bits', () => {
    // A few bytes below the limit; a little earlier does no harm.
    const most = 2 ** 30 - 30;
    const header = floatWavHeader(8000, 1, most);
    expect(fieldsOf(header, widths)).toEqual([
      ['RIFF', header.length - 8 + 4 * most, 'WAVE'],
      ['fmt ', 18, 3, 1, 8000, 32000, 4, 32, 0],
      ['fact', 4, most],
      ['data', 4 * most],
    ]);
    // RIFF: at least 48 bytes of other fields, and the samples.
    expect(fieldsOf(floatWavHeader(8000, 1, 2 ** 30 - 12), widths)[0]).toEqual(['RF64', open, 'WAVE']);
  });

  it.skipIf(!needs('ffmpeg'))('of more than 4 GiB is understood by ffmpeg', () => {
    const folder = mkdtempSync(join(tmpdir(), 'large-'));
    const large = join(folder, 'large.wav');
    const run = (command: string, args: string[]) =>
      execFileSync(command, args, { stdio: ['ignore', 'pipe', 'ignore'] });
    try {
      const header = floatWavHeader(96000, channels, samples);
      writeFileSync(large, header);
      // The samples are a hole, which takes no room on the disk, but for the last two.
      truncateSync(large, header.length + dataBytes);
      const last = floatWavSamples([Float64Array.of(0.5), Float64Array.of(-0.25)]);
      const handle = openSync(large, 'r+');
      writeSync(handle, last, 0, 8, header.length + dataBytes - 8);
      closeSync(handle);
      const entries = 'stream=codec_name,sample_rate,channels,duration_ts';
      const about = run('ffprobe', ['-show_entries', entries, '-of', 'csv=p=0', large]);
      expect(about.toString().trim()).toBe(`pcm_f32le,96000,${channels},${samples}`);
      const end = run('ffmpeg', ['-sseof', '-0.01', '-i', large, '-f', 'f64le', '-']);
      expect(Array.from(new Float64Array(new Uint8Array(end.subarray(-16)).buffer))).toEqual([0.5, -0.25]);
    } finally {
      rmSync(folder, { recursive: true });
    }
  });
});
