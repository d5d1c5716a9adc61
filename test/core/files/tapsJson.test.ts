import { describe, expect, it } from 'vitest';
import { jsonText } from '../../../core/files/jsonText';
import { tapsJson } from '../../../core/files/tapsJson';
import { finding } from '../../../core/findings/finding';
import { hostileNames } from '../../support/hostileNames';
import { type SampleOptions, sampleChoice, sampleResult } from '../../support/sampleResult';

const mark = { document: 'belt.pairing.json', digest: 'a'.repeat(64) };
const files = { 'belt_taps.h': 'b'.repeat(64) };

function read(options: SampleOptions = {}) {
  return JSON.parse(tapsJson(sampleResult(options), mark, files));
}

describe('NAME.taps.json', () => {
  it('begins with the mark and has the keys of the contract', () => {
    const json = read();
    expect(Object.keys(json).slice(0, 2)).toEqual(['generated', 'taps']);
    expect(json.taps).toBe(1);
    expect(json).toMatchObject({
      document: { file: 'belt.pairing.json', sha256: expect.stringMatching(/^[0-9a-f]{64}$/) },
      title: 'Checkweigher belt',
      job: 'cancel',
      sampleRate: 2000,
      filter: { length: 64, delay: 0, regularisation: 1e-4, windowing: 'covariance' },
      recordings: [
        {
          file: 'slow.csv',
          sha256: expect.any(String),
          samples: 120000,
          channels: ['frame_x', 'frame_z', 'cell'],
        },
      ],
      means: { inputs: [0.25, -0.25], desired: 12.5 },
      fit: { samples: 79937, mse: 0.0123456789, nmseDb: -31.2 },
      heldOut: {
        samples: 20000,
        mse: 0.0131234,
        nmseDb: -30.83,
        bands: expect.arrayContaining([{ from: 0, to: 250, reductionDb: 12.1, attainableDb: null }]),
        takes: [{ name: 'slow belt', nmseDb: -30.83, standardErrorDb: 0.21 }],
      },
      conditionNumber: 1043.7,
      arithmetic: {
        word: 16,
        fractionBits: 15,
        rounding: 'error-aware',
        heldOutNmseDb: -30.82,
        quantisationLossDb: 0.01,
        outputErrorDb: -71.05,
        accumulatorBits: 34,
        overflows: 0,
      },
      findings: [],
      files,
    });
  });

  it('holds the cross-validated lines, with null where there is no solution', () => {
    const result = { ...sampleResult(), choice: sampleChoice() };
    expect(JSON.parse(tapsJson(result, mark, files)).choice).toMatchObject({
      validation: { by: 'blocks', blocks: 10, gap: 128, samples: 77_000 },
      length: { values: [32, 48, 64, 80], nmseDb: [-12.5, -24.25, -30.5, -30.52] },
      regularisation: { nmseDb: [null, -30.5, -3], standardErrorDb: [0.21, 0.21, 0.21] },
    });
    const withheld = { ...sampleResult(), choice: { withheld: 'Too short.' } };
    expect(JSON.parse(tapsJson(withheld, mark, files)).choice).toEqual({ withheld: 'Too short.' });
  });

  it('gives coefficients and values back bit by bit, newest-first whatever the order elsewhere', () => {
    const result = sampleResult({ order: 'oldest-first' });
    const json = JSON.parse(tapsJson(result, mark, files));
    expect(json.coefficients).toEqual(result.coefficients.map((row) => Array.from(row)));
    expect(json.arithmetic.values).toEqual(result.arithmetic.values.map((row) => Array.from(row)));
    expect(json.write).toEqual({ symbol: 'belt', order: 'oldest-first' });
  });

  it('adds overflows up, and writes the worst case as decimal text since it can pass 2^53', () => {
    const result = sampleResult();
    result.arithmetic.accumulatorOverflows = 3;
    result.arithmetic.outputOverflows = 4;
    result.arithmetic.worstCase = { min: -(2n ** 62n), max: 2n ** 62n + 1n, bits: 64 };
    const { arithmetic } = JSON.parse(tapsJson(result, mark, files));
    expect(arithmetic).toMatchObject({ overflows: 7, accumulatorOverflows: 3, outputOverflows: 4 });
    expect(arithmetic.worstCase).toEqual({
      bits: 64,
      min: '-4611686018427387904',
      max: '4611686018427387905',
    });
  });

  it('has null for what is not there or not finite', () => {
    expect(read({ heldOut: 'none' }).heldOut).toBeNull();
    const floats = read({ word: 'float32' }).arithmetic;
    expect(floats).toMatchObject({ fractionBits: null, accumulatorBits: null, worstCase: null });
    const result = sampleResult();
    result.fit.nmseDb = Number.NEGATIVE_INFINITY;
    result.conditionNumber = Number.POSITIVE_INFINITY;
    const json = JSON.parse(tapsJson(result, mark, files));
    expect([json.fit.nmseDb, json.conditionNumber]).toEqual([null, null]);
  });

  it('shows findings with their code, severity, place and sentence', () => {
    const result = sampleResult();
    result.findings = [
      finding(
        'not-finite',
        { count: 3, first: 100 },
        { file: 'slow.csv', channel: 'cell', from: 100 },
        'caution',
      ),
    ];
    expect(JSON.parse(tapsJson(result, mark, files)).findings).toEqual([
      {
        code: 'not-finite',
        severity: 'caution',
        file: 'slow.csv',
        channel: 'cell',
        from: 100,
        message: expect.stringContaining('3 samples are NaN or infinite, the first at sample 100'),
      },
    ]);
  });

  it.each(hostileNames)('carries the name %j as it is', (hostile) => {
    const json = read({ title: hostile, file: hostile, inputs: [hostile], desired: hostile, take: hostile });
    expect([json.title, json.inputs[0], json.desired, json.takes[0].name]).toEqual(Array(4).fill(hostile));
  });
});

describe('jsonText', () => {
  it('keeps what is short on one line and fills lines of up to 110 characters, two spaces a level, LF', () => {
    const text = jsonText({
      a: 1,
      long: Array.from({ length: 100 }, (_, i) => i / 7),
      b: { c: [1, 2], d: 'x' },
    });
    const lines = text.split('\n');
    expect(Math.max(...lines.map((line) => line.length))).toBeLessThanOrEqual(110);
    expect(lines.filter((line) => /^ {4}\d/.test(line)).every((line) => line.length > 85)).toBe(true);
    expect(lines).toContain('  "b": { "c": [1, 2], "d": "x" }');
    expect(text.endsWith('}\n')).toBe(true);
    expect(text).not.toContain('\r');
  });

  it('writes what JSON.parse reads back, minus zero as zero', () => {
    const value = {
      empty: {},
      none: [],
      deep: [
        [1e21, -0.1],
        [{ x: null, y: ['a"b', '\n'] }],
        Array.from({ length: 60 }, (_, i) => `name ${i}`),
      ],
      t: true,
    };
    expect(JSON.parse(jsonText(value))).toEqual(value);
    expect(jsonText({ zero: -0, not: Number.NaN })).toBe('{\n  "zero": 0,\n  "not": null\n}\n');
  });
});
