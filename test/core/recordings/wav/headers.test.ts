import { describe, expect, it } from 'vitest';
import type { Recording } from '../../../../core/recordings/recording';
import { openWav } from '../../../../core/recordings/wav/openWav';
import {
  chunk,
  extensibleContent,
  type FormatFields,
  fileOf,
  formatContent,
  joined,
  little,
  strictSource,
  wavOf,
} from '../../../support/wavBytes';

// Layout of the header: Microsoft & IBM 1991 and Microsoft's "Multiple channel audio data and WAVE files" (2001).
// Full scale of PCM is 1: common practice.

const f32 = (...values: number[]) => new Uint8Array(Float32Array.from(values).buffer);
const f64 = (...values: number[]) => new Uint8Array(Float64Array.from(values).buffer);

/** Bytes of four samples and what they mean. */
const codecs: [format: string, tag: number, bits: number, samples: Uint8Array, values: number[]][] = [
  // 1991: samples of up to 8 bits are unsigned around 128, others two's complement.
  ['PCM 8 bit', 1, 8, little(1, 0, 128, 255, 129), [-1, 0, 127 / 128, 1 / 128]],
  ['PCM 16 bit', 1, 16, little(2, -32768, 0, 32767, -1), [-1, 0, 1 - 2 ** -15, -(2 ** -15)]],
  [
    'PCM 24 bit',
    1,
    24,
    little(3, -8388608, 66051, 8388607, -1),
    [-1, 66051 / 2 ** 23, 1 - 2 ** -23, -(2 ** -23)],
  ],
  [
    'PCM 32 bit',
    1,
    32,
    little(4, -(2 ** 31), 16909060, 2 ** 31 - 1, -1),
    [-1, 16909060 / 2 ** 31, 1 - 2 ** -31, -(2 ** -31)],
  ],
  // Floats keep their value, also beyond full scale.
  [
    'float 32 bit',
    3,
    32,
    f32(0.1, -1.5, 3e38, 2 ** -149),
    [Math.fround(0.1), -1.5, Math.fround(3e38), 2 ** -149],
  ],
  ['float 64 bit', 3, 64, f64(0.1, -1e300, 12345.678, 5e-324), [0.1, -1e300, 12345.678, 5e-324]],
  // ITU-T G.711, tables 1 and 2: the smallest and the largest value of either sign, on the 16-bit scale.
  ['A-law', 6, 8, little(1, 0xd5, 0x55, 0xaa, 0x2a), [8, -8, 32256, -32256].map((v) => v / 32768)],
  ['µ-law', 7, 8, little(1, 0xff, 0xfe, 0x80, 0x00), [0, 8, 32124, -32124].map((v) => v / 32768)],
];

const mono = (tag: number, bits: number): FormatFields => ({ tag, channels: 1, sampleRate: 12345, bits });

async function opened(bytes: Uint8Array) {
  return openWav(strictSource(bytes), 'test.wav');
}

async function only(bytes: Uint8Array): Promise<Recording> {
  const { recording, findings } = await opened(bytes);
  expect(findings).toEqual([]);
  if (recording === null) throw new Error('no recording');
  return recording;
}

describe.each(codecs)('a file of %s', (format, tag, bits, samples, values) => {
  const fields = mono(tag, bits);
  const headers: [string, Uint8Array][] = [
    ['16 bytes', formatContent(fields)],
    ['18 bytes', joined(formatContent(fields), little(2, 0))],
    ['an extension', extensibleContent(fields)],
  ];

  it.each(headers)('is read with a format of %s', async (_, header) => {
    const recording = await only(fileOf('RIFF', chunk('fmt ', header), chunk('data', samples)));
    expect(recording).toMatchObject({
      file: 'test.wav',
      format: `WAV, ${format}`,
      pcm: !format.startsWith('float'),
      lineEndsIgnored: false,
      sampleRate: 12345,
      samples: 4,
      channels: [null],
    });
    const [plane] = await recording.read([0], 0, 4);
    expect(Array.from(plane)).toEqual(values);
  });

  it('is read with the samples of two channels in turn', async () => {
    const recording = await only(wavOf({ ...fields, channels: 2 }, samples));
    const planes = await recording.read([1, 0], 0, 2);
    expect(planes.map((plane) => Array.from(plane))).toEqual([
      [values[1], values[3]],
      [values[0], values[2]],
    ]);
  });
});

describe('samples that are not numbers', () => {
  it.each([
    ['float 32 bit', 32, f32(Number.NaN, Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY)],
    ['float 64 bit', 64, f64(Number.NaN, Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY)],
  ])('stay what they are in %s', async (_, bits, samples) => {
    const [plane] = await (await only(wavOf(mono(3, bits), samples))).read([0], 0, 3);
    expect(Array.from(plane)).toEqual([Number.NaN, Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY]);
  });
});

describe('bits that mean nothing', () => {
  // 1991 and 2001: values stand at the high end of their container, so that full scale stays the container's.
  it.each([
    ['PCM 16 bit (12 valid)', chunk('fmt ', extensibleContent(mono(1, 16), 12)), 2],
    ['PCM 24 bit (20 valid)', chunk('fmt ', extensibleContent(mono(1, 24), 20)), 3],
    ['PCM 32 bit (24 valid)', chunk('fmt ', extensibleContent(mono(1, 32), 24)), 4],
    ['PCM 16 bit (12 valid)', chunk('fmt ', formatContent(mono(1, 12))), 2],
    ['PCM 24 bit (20 valid)', chunk('fmt ', formatContent(mono(1, 20))), 3],
  ])('%s, %#', async (format, header, width) => {
    const full = 2 ** (8 * width - 1);
    const samples = little(width, -full, full / 2, -full / 1024);
    const recording = await only(fileOf('RIFF', header, chunk('data', samples)));
    expect(recording.format).toBe(`WAV, ${format}`);
    expect(Array.from((await recording.read([0], 0, 3))[0])).toEqual([-1, 0.5, -1 / 1024]);
  });
});

describe('channels', () => {
  it.each([1, 2, 7, 64, 1024])('%i of them', async (channels) => {
    const samples = little(2, ...Array.from({ length: 5 * channels }, (_, i) => i - 2000));
    const recording = await only(wavOf({ ...mono(1, 16), channels }, samples));
    expect(recording).toMatchObject({ samples: 5, channels: new Array(channels).fill(null) });
    const planes = await recording.read([channels - 1, 0], 1, 5);
    const wanted = (channel: number) => [1, 2, 3, 4].map((n) => (n * channels + channel - 2000) / 32768);
    expect(planes.map((plane) => Array.from(plane))).toEqual([wanted(channels - 1), wanted(0)]);
  });
});
