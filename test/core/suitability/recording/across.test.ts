import { describe, expect, it } from 'vitest';
import { readDocument } from '../../../../core/document/readDocument';
import { resolveTakes } from '../../../../core/pair/resolveTakes';
import { recordingOf } from '../../../support/takes';

// Recordings beside each other: `rate-differs`, `rate-missing` and `length-differs` come of resolving the takes.

function codes(
  files: Record<string, [samples: number, rate: number | null]>,
  takes: [input: string, desired: string][],
  sampleRate?: number,
) {
  const { document } = readDocument(
    JSON.stringify({
      pairing: 1,
      job: 'identify',
      sampleRate,
      takes: takes.map(([input, desired], t) => ({
        name: `take ${t + 1}`,
        inputs: [{ file: input, channel: 1 }],
        desired: { file: desired, channel: 1 },
      })),
      filter: { length: 4, delay: 0 },
    }),
  );
  if (document === null) throw new Error('no document');
  const recordings = new Map(
    Object.entries(files).map(([file, [samples, rate]]) => [
      file,
      { ...recordingOf([new Float64Array(samples)], rate), file },
    ]),
  );
  return resolveTakes(document, recordings).findings.map(({ code, severity, file, values }) => ({
    code,
    severity,
    file,
    values,
  }));
}

describe('rate-differs', () => {
  it('stops where files have other rates than the first, or than the document', () => {
    const files: Record<string, [number, number]> = { 'a.wav': [900, 8000], 'b.wav': [900, 8001] };
    const found = {
      code: 'rate-differs',
      severity: 'blocker',
      file: 'b.wav',
      values: { rate: 8001, expected: 8000, other: 'a.wav' },
    };
    expect(codes(files, [['a.wav', 'b.wav']])).toEqual([found]);
    expect(codes(files, [['a.wav', 'b.wav']], 8000)).toEqual([
      { ...found, values: { ...found.values, other: 'the document' } },
    ]);
  });

  it('is none where the rates are the same, or one is not known', () => {
    expect(codes({ a: [900, 8000], b: [900, 8000] }, [['a', 'b']])).toEqual([]);
    expect(codes({ a: [900, 8000], b: [900, null] }, [['a', 'b']])).toEqual([]);
    // A time column printed with seven digits.
    expect(codes({ a: [900, 44100], b: [900, 44100.01] }, [['a', 'b']])).toEqual([]);
  });
});

describe('rate-missing', () => {
  it('stops where neither the files nor the document say a rate', () => {
    expect(codes({ a: [900, null], b: [900, null] }, [['a', 'b']]).map(({ code }) => code)).toEqual([
      'rate-missing',
    ]);
    expect(codes({ a: [900, null], b: [900, null] }, [['a', 'b']], 500)).toEqual([]);
  });
});

describe('length-differs', () => {
  it('cautions about the longer file of a take, once', () => {
    const files: Record<string, [number, number]> = { a: [1000, 8000], b: [900, 8000], c: [700, 8000] };
    expect(codes(files, [['a', 'b']])).toEqual([
      { code: 'length-differs', severity: 'caution', file: 'a', values: { samples: 1000, common: 900 } },
    ]);
    const twice = codes(files, [
      ['a', 'b'],
      ['a', 'c'],
    ]);
    expect(twice.map(({ file }) => file)).toEqual(['a']);
  });

  it('is none of files of other takes', () => {
    const files: Record<string, [number, number]> = {
      a: [1000, 8000],
      b: [1000, 8000],
      c: [700, 8000],
      d: [700, 8000],
    };
    expect(
      codes(files, [
        ['a', 'b'],
        ['c', 'd'],
      ]),
    ).toEqual([]);
  });
});
