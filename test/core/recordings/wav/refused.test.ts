import { describe, expect, it } from 'vitest';
import { newPace } from '../../../../core/pace';
import { openRecording } from '../../../../core/recordings/openRecording';
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

// Tags and their names: Microsoft's registry of WAVE formats (RFC 2361).

const fields: FormatFields = { tag: 1, channels: 2, sampleRate: 8000, bits: 16 };
const format = chunk('fmt ', formatContent(fields));
const data = chunk('data', little(2, 1, 2, 3, 4, 5, 6));

/** The codes of a file that gives no recording, and the values of the first. */
async function refusal(bytes: Uint8Array) {
  const { recording, findings } = await openWav(strictSource(bytes), 'test.wav');
  expect(recording).toBeNull();
  expect(findings[0]).toMatchObject({ file: 'test.wav', severity: 'blocker' });
  return { codes: findings.map((found) => found.code), values: findings[0].values };
}

describe('codecs that are not read', () => {
  it.each([
    ['Microsoft ADPCM', 0x0002, 4],
    ['IMA ADPCM', 0x0011, 4],
    ['GSM 6.10', 0x0031, 0],
    ['MPEG layer 2', 0x0050, 0],
    ['MPEG layer 3', 0x0055, 0],
    ['0x1234', 0x1234, 16],
  ])('%s is named', async (name, tag, bits) => {
    const found = await refusal(wavOf({ ...fields, tag, bits }, little(2, 1, 2, 3, 4)));
    expect(found.codes).toEqual(['unsupported-codec']);
    expect(found.values.what).toContain(name);
  });

  it.each([
    ['PCM of 64 bits', { tag: 1, bits: 64 }],
    ['PCM of 0 bits', { tag: 1, bits: 0 }],
    ['floats of 16 bits', { tag: 3, bits: 16 }],
    ['A-law of 16 bits', { tag: 6, bits: 16 }],
    ['frames of 5 bytes', { tag: 1, align: 5 }],
    ['frames shorter than their samples', { tag: 1, align: 2 }],
    ['frames of no bytes', { tag: 1, align: 0 }],
    ['frames of containers that the bits do not fill', { tag: 1, align: 8 }],
    ['floats in frames of another length', { tag: 3, bits: 32, align: 4 }],
  ])('%s', async (_, changed) => {
    const found = await refusal(wavOf({ ...fields, ...changed }, little(4, 1, 2, 3, 4, 5, 6, 7, 8)));
    expect(found.codes).toEqual(['unsupported-codec']);
  });

  it('an extension whose GUID is none of the WAVE formats', async () => {
    // Ambisonic B-format, whose GUID also starts with 1.
    const ambisonic = '\0\0\x21\x07\xd3\x11\x86\x44\xc8\xc1\xca\0\0\0';
    const header = chunk('fmt ', extensibleContent(fields, 16, ambisonic));
    expect((await refusal(fileOf('RIFF', header, data))).codes).toEqual(['unsupported-codec']);
  });

  it('an extension that is not there', async () => {
    const header = chunk('fmt ', formatContent({ ...fields, tag: 0xfffe }));
    expect((await refusal(fileOf('RIFF', header, data))).codes).toEqual(['unsupported-codec']);
  });

  it('big-endian RIFX', async () => {
    const found = await refusal(fileOf('RIFX', format, data));
    expect(found.codes).toEqual(['unsupported-codec']);
    expect(found.values.what).toContain('RIFX');
  });
});

describe('headers that cannot be read', () => {
  it.each([
    ['no format', fileOf('RIFF', data), 'fmt'],
    ['no samples', fileOf('RIFF', format), 'data'],
    ['nothing after the form', fileOf('RIFF'), 'fmt'],
    ['a format of 14 bytes', fileOf('RIFF', chunk('fmt ', formatContent(fields).slice(0, 14)), data), '14'],
    ['no channels', wavOf({ ...fields, channels: 0 }, little(2, 1, 2)), '0 channels'],
    ['1025 channels', wavOf({ ...fields, channels: 1025 }, little(2, 1, 2)), '1025 channels'],
    ['a rate of 0', wavOf({ ...fields, sampleRate: 0 }, little(2, 1, 2)), '0 Hz'],
    ['another form', joined('RIFF', little(4, 4), 'AVI LIST'), 'AVI'],
    ['only four bytes', joined('RIFF'), '""'],
  ])('%s', async (_, bytes, said) => {
    const found = await refusal(bytes);
    expect(found.codes).toEqual(['unreadable-header']);
    expect(found.values.what).toContain(said);
  });

  it('are told also where the samples are cut', async () => {
    const cut = fileOf('RIFF', chunk('data', little(2, 1, 2), 100));
    expect((await refusal(cut)).codes).toEqual(['unreadable-header', 'truncated']);
  });
});

describe('the choice by content', () => {
  it.each([
    ['RIFF', fileOf('RIFF', format, data), 'WAV'],
    ['RF64', fileOf('RF64', format, data), 'WAV'],
    ['BW64', fileOf('BW64', format, data), 'WAV'],
    ['digits', joined('1,2\n3,4\n5,6\n'), 'text'],
    ['words that start with RIF', joined('RIF,x\n3,4\n5,6\n'), 'text'],
  ])('%s', async (_, bytes, wanted) => {
    const { recording } = await openRecording(strictSource(bytes), 'a.bin', newPace());
    expect(recording?.format.slice(0, wanted.length)).toBe(wanted);
  });

  it.each([['RIFX'], ['RIFF']])('a bare %s is no text', async (form) => {
    const { recording, findings } = await openRecording(strictSource(joined(form)), 'a.csv', newPace());
    expect(recording).toBeNull();
    expect(findings.map(({ code }) => code)).toEqual([
      form === 'RIFX' ? 'unsupported-codec' : 'unreadable-header',
    ]);
  });
});
