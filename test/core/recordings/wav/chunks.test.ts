import { describe, expect, it } from 'vitest';
import { openWav } from '../../../../core/recordings/wav/openWav';
import {
  chunk,
  type FormatFields,
  fileOf,
  formatContent,
  joined,
  little,
  strictSource,
} from '../../../support/wavBytes';

// Chunks: Microsoft & IBM 1991. RF64: EBU Tech 3306. BW64: ITU-R BS.2088.

const fields: FormatFields = { tag: 1, channels: 1, sampleRate: 8000, bits: 8 };
const format = chunk('fmt ', formatContent(fields));
const bytes = little(1, 128, 192, 64, 128, 0);
const data = chunk('data', bytes);
const values = [0, 0.5, -0.5, 0, -1];
const odd = chunk('note', joined('abc'));
const unknown = chunk('LIST', joined('INFOISFT\x04\0\0\0abc\0'));
const otherFormat = chunk('fmt ', formatContent({ ...fields, channels: 5 }));
const open = 0xffffffff;

const opened = (file: Uint8Array) => openWav(strictSource(file), 'test.wav');

/** All samples, and what was found. */
async function read(file: Uint8Array) {
  const { recording, findings } = await opened(file);
  const [plane] = recording === null ? [null] : await recording.read([0], 0, recording.samples);
  return {
    samples: plane && Array.from(plane),
    findings: findings.map(({ code, values }) => ({ code, ...values })),
  };
}

const ds64 = (dataBytes: number, riffBytes = 0) =>
  chunk('ds64', joined(little(8, riffBytes, dataBytes, 0), little(4, 0)));

describe('chunks around the samples', () => {
  it.each([
    ['unknown ones before and after', [unknown, format, unknown, data, unknown]],
    ['odd ones with their pad byte', [odd, format, odd, odd, data, odd]],
    ['empty ones', [chunk('JUNK', little(1)), format, chunk('JUNK', little(1)), data]],
    ['the format after the samples', [data, unknown, odd, format]],
    ['a second format after the samples', [format, data, otherFormat]],
    ['a second format before the samples', [format, otherFormat, data]],
    ['a last chunk that is cut', [format, data, chunk('LIST', joined('abcd'), 4000)]],
    ['stray bytes at the end', [format, data, joined('\0\0\0')]],
    ['no pad byte at the end of the file', [format, data.slice(0, -1)]],
  ])('%s', async (_, chunks) => {
    expect(await read(fileOf('RIFF', ...chunks))).toEqual({ samples: values, findings: [] });
  });

  it('are lost where a pad byte is missing, as SciPy, sox and ffmpeg see it too', async () => {
    const unpadded = odd.slice(0, -1);
    const { recording, findings } = await opened(fileOf('RIFF', format, unpadded, data));
    expect(recording).toBeNull();
    expect(findings).toMatchObject([{ code: 'unreadable-header', values: { what: 'no "data" chunk' } }]);
  });

  it('end the search where there is no end of them', async () => {
    const empty = chunk('JUNK', little(1));
    const { findings } = await opened(fileOf('RIFF', format, ...new Array(20_000).fill(empty), data));
    expect(findings).toMatchObject([{ code: 'unreadable-header' }]);
  });
});

describe('a data chunk', () => {
  const declaring = (declared: number) => fileOf('RIFF', format, chunk('data', bytes.slice(0, 4), declared));

  it('that declares more than there is', async () => {
    const findings = [{ code: 'truncated', declared: 400, there: 4 }];
    expect(await read(declaring(400))).toEqual({ samples: values.slice(0, 4), findings });
  });

  // What writers to a pipe leave: common practice.
  it.each([0, open])('that declares %i bytes reaches to the end of the file', async (declared) => {
    const findings = [{ code: 'open-data', declared, there: 4 }];
    expect(await read(declaring(declared))).toEqual({ samples: values.slice(0, 4), findings });
  });

  it('that ends within a frame', async () => {
    const stereo = chunk('fmt ', formatContent({ ...fields, channels: 2 }));
    const findings = [{ code: 'partial-frame', bytes: 1, frame: 2 }];
    expect(await read(fileOf('RIFF', stereo, data))).toEqual({ samples: [0, -0.5], findings });
  });

  it.each([0, 1])('of %i samples is too short', async (samples) => {
    const findings = [{ code: 'too-short', samples }];
    expect(await read(fileOf('RIFF', format, chunk('data', bytes.slice(0, samples))))).toEqual({
      samples: null,
      findings,
    });
  });
});

describe.each(['RF64', 'BW64'] as const)('%s', (form) => {
  it('takes the size of the samples from its ds64 chunk', async () => {
    const file = fileOf(form, ds64(5), format, chunk('data', bytes, open), unknown);
    expect(await read(file)).toEqual({ samples: values, findings: [] });
  });

  it('with a 32-bit size keeps to that', async () => {
    expect(await read(fileOf(form, ds64(3), format, data, unknown))).toEqual({
      samples: values,
      findings: [],
    });
  });

  it('whose ds64 chunk declares more than there is', async () => {
    const findings = [{ code: 'truncated', declared: 2 ** 40, there: 6 }];
    const file = fileOf(form, ds64(2 ** 40), format, chunk('data', bytes, open));
    expect(await read(file)).toEqual({ samples: [...values, -1], findings });
  });

  it.each([
    ['without a ds64 chunk', [format], open],
    ['with a ds64 chunk that is too short', [chunk('ds64', little(4, 1, 1)), format], open],
    ['whose ds64 chunk leaves the size open', [ds64(0), format], 0],
  ])('%s reaches to the end of the file', async (_, before, declared) => {
    const file = fileOf(form, ...before, chunk('data', bytes.slice(0, 4), open));
    const findings = [{ code: 'open-data', declared, there: 4 }];
    expect(await read(file)).toEqual({ samples: values.slice(0, 4), findings });
  });
});
