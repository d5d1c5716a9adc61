import { execFileSync } from 'node:child_process';
import { describe, expect, it } from 'vitest';
import { aLawValues, muLawValues } from '../../../../core/recordings/wav/g711';
import { openWav } from '../../../../core/recordings/wav/openWav';
import { needs } from '../../../support/programs';
import { strictSource, wavOf } from '../../../support/wavBytes';

const codes = Uint8Array.from({ length: 256 }, (_, code) => code);
const decodedBy = (command: string, args: string[]) => {
  const bytes = execFileSync(command, args, { input: codes, stdio: ['pipe', 'pipe', 'ignore'] });
  return Array.from(new Int16Array(new Uint8Array(bytes).buffer));
};

const laws: [name: string, tag: number, values: Float64Array, soxName: string, ffmpegName: string][] = [
  ['A-law', 6, aLawValues(), 'a-law', 'alaw'],
  ['µ-law', 7, muLawValues(), 'mu-law', 'mulaw'],
];

describe.each(laws)('all codes of %s', (_, tag, values, soxName, ffmpegName) => {
  it.skipIf(!needs('sox'))('are as sox decodes them', () => {
    const input = ['-D', '-t', 'raw', '-e', soxName, '-b', '8', '-r', '8000', '-c', '1', '-'];
    expect(decodedBy('sox', [...input, '-t', 's16', '-L', '-'])).toEqual(Array.from(values));
  });

  it.skipIf(!needs('ffmpeg'))('are as ffmpeg decodes them', () => {
    const input = ['-f', ffmpegName, '-ar', '8000', '-ac', '1', '-i', '-'];
    expect(decodedBy('ffmpeg', [...input, '-f', 's16le', '-'])).toEqual(Array.from(values));
  });

  it('are read from a file as fractions of full scale', async () => {
    const bytes = wavOf({ tag, channels: 1, sampleRate: 8000, bits: 8 }, codes);
    const { recording } = await openWav(strictSource(bytes), 'test.wav');
    const planes = await recording?.read([0], 0, 256);
    expect(planes).toEqual([values.map((value) => value / 32768)]);
  });
});

describe('ITU-T G.711', () => {
  it('table 1: decoder outputs of A-law', () => {
    // Values of the ends of the segments on the scale of 4096; the 16-bit scale is eight times as fine.
    const table = [1, 31, 33, 63, 66, 126, 132, 252, 264, 504, 528, 1008, 1056, 2016, 2112, 4032];
    // Character signals before the even bits are inverted: segments of 16 codes, 0x80 upwards.
    const ends = [
      0x80, 0x8f, 0x90, 0x9f, 0xa0, 0xaf, 0xb0, 0xbf, 0xc0, 0xcf, 0xd0, 0xdf, 0xe0, 0xef, 0xf0, 0xff,
    ];
    const values = aLawValues();
    expect(ends.map((code) => values[code ^ 0x55] / 8)).toEqual(table);
    expect(ends.map((code) => values[(code ^ 0x55) & 0x7f] / 8)).toEqual(table.map((value) => -value));
  });

  it('table 2: decoder outputs of µ-law', () => {
    // On the scale of 8192; the 16-bit scale is four times as fine. Codes are counted down from 0xff.
    const table = [0, 30, 33, 93, 99, 219, 231, 471, 495, 975, 1023, 1983, 2079, 3999, 4191, 8031];
    const ends = [
      0xff, 0xf0, 0xef, 0xe0, 0xdf, 0xd0, 0xcf, 0xc0, 0xbf, 0xb0, 0xaf, 0xa0, 0x9f, 0x90, 0x8f, 0x80,
    ];
    const values = muLawValues();
    expect(ends.map((code) => values[code] / 4)).toEqual(table);
    expect(ends.map((code) => 0 - values[code & 0x7f] / 4)).toEqual(table);
  });
});
